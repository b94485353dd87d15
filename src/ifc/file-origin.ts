import { Cursor } from './lines/cursor.ts';
import type { OpenedFile } from './open.ts';

/** What tells other programs which file is meant, and how old it is. */
export interface FileOrigin {
  readonly name: string;
  /** GlobalId of the project; null where the file has none. */
  readonly project: string | null;
  /** When the header says the file was written, with its zone, UTC where it names none; null where it does not say. */
  readonly written: string | null;
}

export function fileOrigin({ name, index }: OpenedFile): FileOrigin {
  const [record] = index.recordsOf('IFCPROJECT');
  const cursor = new Cursor(index.bytes);
  const project = record === undefined ? null : cursor.at(index.args[record] ?? 0).text();
  const open = index.header.get('FILE_NAME');
  const stamp = open === undefined || open < 0 ? null : cursor.at(open).skip(1).text();
  return { name, project, written: dateTime(stamp ?? '') };
}

/** As the issues of other programs want it: seconds stated, no parts of them, a zone. */
function dateTime(stamp: string): string | null {
  const read =
    /^(\d{4}-(?:0[1-9]|1[0-2])-(?:0[1-9]|[12]\d|3[01])T(?:[01]\d|2[0-3]):[0-5]\d)(:[0-5]\d)?(?:\.\d*)?(Z|[+-]\d\d:?\d\d)?$/.exec(
      stamp,
    );
  if (read === null) return null;
  const [, minute = '', second = ':00', zone = 'Z'] = read;
  return `${minute}${second}${zone.replace(/^([+-]\d\d)(\d\d)$/, '$1:$2')}`;
}
