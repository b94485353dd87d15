import type { DeskOwn, OwnTables } from './messages.ts';

/** What came with one drop or choice: models, and what is known beside them. Null: nothing of that kind came. */
export interface Dropped {
  readonly models: readonly File[];
  readonly answers: File | null;
  /** Table files of a folder, by path in it. */
  readonly tables: { readonly name: string; readonly files: readonly (readonly [path: string, file: File])[] } | null;
}

interface Found {
  /** `folder/npc/branch.json`; a bare name for a file that came by itself. */
  readonly path: string;
  readonly file: File;
}

/** Of several answers files the last counts, as of several words on one thing. */
function sorted(found: readonly Found[]): Dropped {
  const inFolder = ({ path }: Found): boolean => path.includes('/');
  const isJson = ({ path }: Found): boolean => /\.json$/i.test(path);
  const tables = found.filter((one) => inFolder(one) && isJson(one));
  const name = tables[0]?.path.split('/')[0];
  return {
    models: found.filter((one) => !isJson(one)).map(({ file }) => file),
    answers: found.findLast((one) => isJson(one) && !inFolder(one))?.file ?? null,
    tables:
      name === undefined
        ? null
        : {
            name,
            files: tables
              .filter(({ path }) => path.startsWith(`${name}/`))
              .map(({ path, file }) => [path.slice(name.length + 1), file]),
          },
  };
}

/** Files that were chosen; those of a chosen folder say where in it they stand. */
export const chosenFiles = (files: Iterable<File>): Dropped =>
  sorted([...files].map((file) => ({ path: file.webkitRelativePath || file.name, file })));

/** What lies in a drop, folders opened. To be called while the drop is handled: later the browser has forgotten it. */
export function droppedFiles(transfer: DataTransfer): Promise<Dropped> {
  const items = [...transfer.items].filter(({ kind }) => kind === 'file');
  const wanted = items.map((item) => {
    const entry = item.webkitGetAsEntry();
    const file = item.getAsFile();
    if (entry?.isDirectory === true) return filesIn(entry as FileSystemDirectoryEntry, entry.name, 0);
    return Promise.resolve(file === null ? [] : [{ path: file.name, file }]);
  });
  return Promise.all(wanted).then((lists) => sorted(lists.flat()));
}

/** Folders of tables have two levels; whoever drops a whole disk is spared the wait. */
const deepest = 4;
const mostFiles = 2000;

async function filesIn(folder: FileSystemDirectoryEntry, path: string, depth: number): Promise<Found[]> {
  const found: Found[] = [];
  for (const entry of await entriesOf(folder)) {
    const inside = `${path}/${entry.name}`;
    if (found.length >= mostFiles) break;
    if (entry.isFile) {
      const file = await new Promise<File>((done, failed) => (entry as FileSystemFileEntry).file(done, failed));
      found.push({ path: inside, file });
    } else if (depth < deepest) found.push(...(await filesIn(entry as FileSystemDirectoryEntry, inside, depth + 1)));
  }
  return found.sort((a, b) => (a.path < b.path ? -1 : 1));
}

/** The browser hands a folder's entries over in portions; an empty one is the last. */
async function entriesOf(folder: FileSystemDirectoryEntry): Promise<FileSystemEntry[]> {
  const reader = folder.createReader();
  const entries: FileSystemEntry[] = [];
  for (;;) {
    const portion = await new Promise<FileSystemEntry[]>((done, failed) => reader.readEntries(done, failed));
    if (portion.length === 0) return entries;
    entries.push(...portion);
  }
}

/** What was given before with what came now laid over it. */
export async function withDropped(own: DeskOwn, { answers, tables }: Dropped): Promise<DeskOwn> {
  return {
    answers: answers === null ? own.answers : { name: answers.name, text: await answers.text() },
    tables: tables === null ? own.tables : await read(tables),
  };
}

async function read({ name, files }: NonNullable<Dropped['tables']>): Promise<OwnTables> {
  return { name, files: await Promise.all(files.map(async ([path, file]) => [path, await file.text()] as const)) };
}
