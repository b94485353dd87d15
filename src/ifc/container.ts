import { Gunzip, unzipSync } from 'fflate';
import { InputError } from '../findings/input-error.ts';

/** Largest model in bytes; offsets stand in 32 bits. */
const largestModel = 4_294_967_295;
/** Bytes that an archive may unfold to, as a whole and for each byte of it. */
const largestUnpacked = 2_147_483_647;
const largestRatio = 200;
const mostEntries = 20_000;

export interface Unpacked {
  /** Base name of the model itself: of the entry where it came in an archive. */
  readonly name: string;
  readonly bytes: Uint8Array;
}

/**
 * The STEP text of what a user hands us: plain, gzipped or in an ifcZIP. Throws an InputError that says what was found
 * instead and what to do, for everything else.
 */
export function unpack(name: string, bytes: Uint8Array): Unpacked {
  const plain = unwrapped(name, bytes);
  if (plain.bytes.length > largestModel)
    throw new InputError(name, 'the model is larger than 4 GiB; split it and read the parts');
  refuseOtherFormats(plain);
  return plain;
}

function unwrapped(name: string, bytes: Uint8Array): Unpacked {
  if (bytes[0] === 0x1f && bytes[1] === 0x8b)
    return { name: name.replace(/\.gz$/i, ''), bytes: gunzipped(name, bytes) };
  if (bytes[0] === 0x50 && bytes[1] === 0x4b && (bytes[2] === 3 || bytes[2] === 5 || bytes[2] === 7))
    return fromZip(name, bytes);
  return { name, bytes };
}

/** Sizes that an archive states may lie, and a cut-off one states nothing: what comes out is counted. */
function gunzipped(name: string, bytes: Uint8Array): Uint8Array {
  const chunks: Uint8Array[] = [];
  let size = 0;
  let isWhole = false;
  const stream = new Gunzip((chunk, isLast) => {
    size += chunk.length;
    refuseBomb(name, bytes.length, size);
    chunks.push(chunk);
    isWhole = isLast;
  });
  try {
    for (let at = 0; at < bytes.length; at += packedAtOnce) {
      stream.push(bytes.subarray(at, at + packedAtOnce), at + packedAtOnce >= bytes.length);
    }
  } catch (cause) {
    if (cause instanceof InputError) throw cause;
    throw new InputError(name, 'the gzip file is damaged or cut off; fetch or export it again', { cause });
  }
  if (!isWhole) throw new InputError(name, 'the gzip file is damaged or cut off; fetch or export it again');
  const all = new Uint8Array(size);
  let at = 0;
  for (const chunk of chunks) {
    all.set(chunk, at);
    at += chunk.length;
  }
  return all;
}

const packedAtOnce = 1 << 18;

function fromZip(name: string, bytes: Uint8Array): Unpacked {
  const models: { readonly name: string; readonly size: number }[] = [];
  let entries = 0;
  try {
    unzipSync(bytes, {
      filter: (entry) => {
        entries++;
        if (isModel(entry.name)) models.push({ name: entry.name, size: entry.originalSize });
        return false;
      },
    });
  } catch (cause) {
    throw new InputError(name, 'the zip file is damaged or cut off; fetch or export it again', { cause });
  }
  if (entries > mostEntries)
    throw new InputError(name, `the zip file holds ${entries} entries; at most ${mostEntries} are read`);
  const names = models.map((model) => model.name);
  if (names.length === 0)
    throw new InputError(name, 'the zip file holds no .ifc file; put the model in it, or give the .ifc itself');
  if (names.length > 1) {
    const list = names.slice(0, 10).map(baseName).join(', ');
    const more = names.length > 10 ? ` and ${names.length - 10} more` : '';
    throw new InputError(
      name,
      `the zip file holds ${names.length} models (${list}${more}); unpack it and name those to read`,
    );
  }
  const [only] = models;
  refuseBomb(name, bytes.length, only!.size);
  let found: Uint8Array | undefined;
  try {
    // The first entry of that name only, so that a doubled name cannot be unpacked twice.
    let isTaken = false;
    const filter = (entry: { readonly name: string }): boolean => {
      const isWanted = entry.name === only!.name && !isTaken;
      isTaken ||= isWanted;
      return isWanted;
    };
    found = unzipSync(bytes, { filter })[only!.name];
  } catch (cause) {
    throw new InputError(name, 'the zip file is damaged, or packed in a way that is not read; unpack it first', {
      cause,
    });
  }
  if (found === undefined) throw new InputError(name, 'the zip file is damaged; fetch or export it again');
  if (found[0] === 0x50 && found[1] === 0x4b)
    throw new InputError(name, 'the zip file holds another zip file; unpack it first');
  return { name: baseName(only!.name), bytes: found };
}

const isModel = (entry: string): boolean => /\.ifc$/i.test(entry) && !entry.startsWith('__MACOSX/');
const baseName = (path: string): string => path.split(/[\\/]/).at(-1) ?? path;

function refuseBomb(name: string, packed: number, unpacked: number): void {
  if (unpacked > packed * largestRatio + 65_536) {
    throw new InputError(
      name,
      `it unpacks to more than ${largestRatio} times its size: that is no model, or it is damaged; fetch it again`,
    );
  }
  if (unpacked > largestUnpacked)
    throw new InputError(name, 'unpacked, the model would be larger than 2 GiB; unpack it first');
}

function refuseOtherFormats({ name, bytes }: Unpacked): void {
  if (bytes.length === 0) throw new InputError(name, 'the file is empty; export the model again');
  const [a, b] = bytes;
  if ((a === 0xff && b === 0xfe) || (a === 0xfe && b === 0xff) || (a === 73 && b === 0) || (a === 0 && b === 73)) {
    throw new InputError(name, 'the text is UTF-16; an IFC file is plain text of single bytes: save it as such');
  }
  const start = startOfText(bytes);
  const head = String.fromCharCode(...bytes.subarray(start, start + 400));
  if (/^ISO-10303-21\s*;/.test(head)) return;
  // A comment may stand in front of everything.
  if (head.startsWith('/*') && String.fromCharCode(...bytes.subarray(start, start + 4096)).includes('ISO-10303-21'))
    return;
  if (start >= bytes.length) throw new InputError(name, 'the file holds nothing but blanks; export the model again');
  if (/^<(?:!doctype html|html)/i.test(head))
    throw new InputError(name, 'this is a web page, no IFC model; was it downloaded while signed out?');
  if (head.startsWith('<'))
    throw new InputError(name, 'this is XML (ifcXML?); export the model as IFC-SPF, the plain .ifc text');
  if (/^[{[]/.test(head)) throw new InputError(name, 'this is JSON; export the model as IFC-SPF, the plain .ifc text');
  if (/^(?:HEADER|DATA)\s*;/.test(head)) {
    throw new InputError(name, 'the file does not begin with ISO-10303-21; its first line is missing: export it again');
  }
  throw new InputError(name, 'this is no IFC file: it does not begin with ISO-10303-21');
}

function startOfText(bytes: Uint8Array): number {
  let i = bytes[0] === 0xef && bytes[1] === 0xbb && bytes[2] === 0xbf ? 3 : 0;
  while (i < bytes.length && bytes[i]! <= 32) i++;
  return i;
}
