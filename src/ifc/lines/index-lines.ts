import type { CutOff, Damage } from './damage.ts';
import { cutInComment, cutInString, endOfComment, endOfStatement, type StringWatch } from './end-of-statement.ts';
import { ById } from './find-by-id.ts';
import { schemaNames } from './header.ts';
import { instances, newRecordList, type RecordList } from './instances.ts';
import { IndexedLines, type LineIndex } from './line-index.ts';
import { atMark, beginMark, endMark, pastLineEnd } from './own-block.ts';

/**
 * One pass over the bytes of a STEP file: where each instance stands, its id and its class. Nothing is decoded.
 * Never throws; what is wrong with the bytes stands in `damage`. Files of 4 GiB and more are refused before this.
 */
export function indexLines(source: Uint8Array): LineIndex {
  const bytes = new Uint8Array(source.buffer, source.byteOffset, source.length);
  const plain = scan(bytes, false);
  // A missing quote turns text and lines inside out until the end. Then the beginnings of lines decide.
  return finish(bytes, plain.cutOff?.where === 'in a string' ? scan(bytes, true) : plain);
}

interface Scan {
  readonly records: RecordList;
  readonly watch: StringWatch;
  readonly header: ReadonlyMap<string, number>;
  readonly dataEnd: number | null;
  readonly ownBlock: LineIndex['ownBlock'];
  readonly cutOff: Damage['cutOff'];
  readonly unreadable: readonly number[];
  readonly outsideData: number;
}

const sections = new Set(['HEADER', 'DATA', 'ANCHOR', 'REFERENCE', 'SIGNATURE']);

function scan(b: Uint8Array, lineGuided: boolean): Scan {
  const watch: StringWatch = { lineGuided, openStrings: [], oddStrings: [] };
  const view = new DataView(b.buffer, b.byteOffset, b.length);
  const records = newRecordList(view);
  const header = new Map<string, number>();
  const unreadable: number[] = [];
  let section = '';
  let outsideData = 0;
  let dataEnd: number | null = null;
  let cutOff: Damage['cutOff'] = null;
  let ownBlock: LineIndex['ownBlock'] = null;
  /** While our own block is passed over: what to go back to should its closing mark be missing. */
  let own: { readonly from: number; readonly count: number; readonly maxId: number } | null = null;
  let ownIsBroken = false;

  let i = b[0] === 0xef && b[1] === 0xbb && b[2] === 0xbf ? 3 : 0;
  while (cutOff === null) {
    const before = records.count;
    i = instances(b, view, i, records, watch);
    if (section !== 'DATA') outsideData += records.count - before;
    const at = i;
    if (records.cut !== 0) cutOff = { offset: at, where: whereCut(records.cut) };
    else if (at >= b.length) {
      const where = dataEnd === null || section === 'DATA' ? 'before ENDSEC' : 'before END-ISO-10303-21';
      cutOff = { offset: at, where };
    } else if (b[at] === 47 && b[at + 1] === 42) {
      i = endOfComment(b, at) + 1;
      if (i === 0) cutOff = { offset: at, where: 'in a comment' };
      else if (own === null && !ownIsBroken && atMark(b, at, beginMark)) {
        own = { from: at, count: records.count, maxId: records.maxId };
      } else if (own !== null && atMark(b, at, endMark)) {
        i = pastLineEnd(b, i);
        ownBlock = { from: own.from, to: i };
        forgetSince(records, own);
        own = null;
      }
    } else {
      const end = endOfStatement(b, view, at + 1, watch);
      if (end < 0) {
        cutOff = { offset: at, where: whereCut(end) };
        break;
      }
      i = b[end] === 35 ? end : end + 1;
      const word = keywordAt(b, at);
      if (word === 'END-ISO-10303-21') break;
      if (word === 'ENDSEC') {
        if (own !== null) {
          // The block's closing mark is gone: its lines are read like any others.
          i = own.from;
          forgetSince(records, own);
          own = null;
          ownIsBroken = true;
          continue;
        }
        if (section === 'DATA') dataEnd = at;
        section = '';
      } else if (sections.has(word)) {
        section = word;
        if (word === 'DATA') dataEnd = null;
      } else if (section === 'HEADER' && word !== '') header.set(word, b.indexOf(40, at));
      else if ((section === '' || section === 'DATA') && word !== 'ISO-10303-21') unreadable.push(at);
    }
  }
  return { records, watch, header, dataEnd, ownBlock, cutOff, unreadable, outsideData };
}

function finish(bytes: Uint8Array, found: Scan): LineIndex {
  const { records, header, watch } = found;
  const { count, maxId } = records;
  const ids = records.ids.subarray(0, count);
  const typeOf = records.typeOf.subarray(0, count);
  const byId = new ById(ids, maxId);
  for (const record of byId.doubled) typeOf[record] = 0;
  const types = records.table.names;
  return new IndexedLines(
    {
      bytes,
      count,
      ids,
      typeOf,
      args: records.args.subarray(0, count),
      types,
      schemas: schemaNames(bytes, header.get('FILE_SCHEMA')),
      header,
      maxId,
      dataEnd: found.dataEnd,
      eol: lineEnd(bytes),
      ownBlock: found.ownBlock,
      damage: {
        cutOff: found.cutOff,
        merged: records.merged,
        openStrings: watch.openStrings,
        oddStrings: watch.oddStrings,
        unreadable: found.unreadable,
        idsTooLarge: records.idsTooLarge,
        doubledIds: byId.doubled.map((record) => ids[record] as number),
        outsideData: found.outsideData,
      },
    },
    byId,
    grouped(typeOf, types.length),
  );
}

function forgetSince(records: RecordList, mark: { readonly count: number; readonly maxId: number }): void {
  records.count = mark.count;
  records.maxId = mark.maxId;
}

/** Records by class code, in file order: counted first, so that each list is exactly as long as it must be. */
function grouped(typeOf: Uint16Array, types: number): readonly Uint32Array[] {
  const sizes = new Uint32Array(types);
  for (let r = 0; r < typeOf.length; r++) sizes[typeOf[r] as number] = (sizes[typeOf[r] as number] as number) + 1;
  const lists = Array.from(sizes, (size) => new Uint32Array(size));
  const next = new Uint32Array(types);
  for (let r = 0; r < typeOf.length; r++) {
    const code = typeOf[r] as number;
    (lists[code] as Uint32Array)[next[code] as number] = r;
    next[code] = (next[code] as number) + 1;
  }
  return lists;
}

function whereCut(reason: number): CutOff {
  if (reason === cutInString) return 'in a string';
  return reason === cutInComment ? 'in a comment' : 'in an instance';
}

/** Keyword in upper case, or '' where the statement begins with something else. */
function keywordAt(b: Uint8Array, at: number): string {
  let word = '';
  for (let i = at; word.length < 64; i++) {
    const c = b[i] ?? 0;
    const isWord = (c >= 65 && c <= 90) || (c >= 97 && c <= 122) || (c >= 48 && c <= 57) || c === 45 || c === 95;
    if (!isWord) break;
    word += String.fromCharCode(c);
  }
  return word.toUpperCase();
}

function lineEnd(bytes: Uint8Array): LineIndex['eol'] {
  for (let i = 0; i < bytes.length; i++) {
    if (bytes[i] === 10) return '\n';
    if (bytes[i] === 13) return bytes[i + 1] === 10 ? '\r\n' : '\r';
  }
  return '\n';
}
