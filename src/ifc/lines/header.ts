import { Cursor } from './cursor.ts';

/** Schema names of FILE_SCHEMA(('IFC4')) whose `(` stands at `open`; none where there is no such entity. */
export function schemaNames(bytes: Uint8Array, open: number | undefined): readonly string[] {
  if (open === undefined || open < 0) return [];
  return new Cursor(bytes).at(open).texts();
}
