import type { Damage } from './damage.ts';
import type { ById } from './find-by-id.ts';

/**
 * Where every instance of a STEP file stands. Instances are counted as *records* in file order (0, 1, 2 …);
 * a record's arguments are read from the bytes when somebody asks for them.
 */
export interface IndexedFacts {
  readonly bytes: Uint8Array;
  /** Records found, our own block left out. */
  readonly count: number;
  /** STEP id by record. */
  readonly ids: Uint32Array;
  /** Code of the class by record: an index into `types`. 0 where a later record with the same id took its place. */
  readonly typeOf: Uint16Array;
  /** Offset of the `(` that opens the arguments, by record. */
  readonly args: Uint32Array;
  /** Class names in upper case by code; `types[0]` is empty, complex instances are `(`. */
  readonly types: readonly string[];
  /** Schema names as FILE_SCHEMA states them; empty when there is none. */
  readonly schemas: readonly string[];
  /** Offset of the `(` of each header entity, by its name in upper case. */
  readonly header: ReadonlyMap<string, number>;
  /** Largest STEP id outside our own block, 0 in a file without instances. */
  readonly maxId: number;
  /** Offset of the `ENDSEC` keyword that closes the last DATA section; null when the file is cut off before it. */
  readonly dataEnd: number | null;
  readonly eol: '\n' | '\r\n' | '\r';
  /** Our own block, from the first byte of its opening mark past the line end behind its closing mark. */
  readonly ownBlock: { readonly from: number; readonly to: number } | null;
  readonly damage: Damage;
}

/** The facts, and the two ways to look a record up. */
export interface LineIndex extends IndexedFacts {
  /** Record with this STEP id, the last one where the file doubles it; -1 when there is none. */
  find(id: number): number;
  /** Records of one class (upper case, exact), in file order. */
  recordsOf(type: string): Uint32Array;
}

const noRecords = new Uint32Array(0);

export class IndexedLines implements LineIndex {
  readonly bytes: Uint8Array;
  readonly count: number;
  readonly ids: Uint32Array;
  readonly typeOf: Uint16Array;
  readonly args: Uint32Array;
  readonly types: readonly string[];
  readonly schemas: readonly string[];
  readonly header: ReadonlyMap<string, number>;
  readonly maxId: number;
  readonly dataEnd: number | null;
  readonly eol: LineIndex['eol'];
  readonly ownBlock: LineIndex['ownBlock'];
  readonly damage: Damage;
  private readonly byId: ById;
  private readonly byType: ReadonlyMap<string, Uint32Array>;

  /** `byType`: records by class code. */
  constructor(facts: IndexedFacts, byId: ById, byType: readonly Uint32Array[]) {
    this.bytes = facts.bytes;
    this.count = facts.count;
    this.ids = facts.ids;
    this.typeOf = facts.typeOf;
    this.args = facts.args;
    this.types = facts.types;
    this.schemas = facts.schemas;
    this.header = facts.header;
    this.maxId = facts.maxId;
    this.dataEnd = facts.dataEnd;
    this.eol = facts.eol;
    this.ownBlock = facts.ownBlock;
    this.damage = facts.damage;
    this.byId = byId;
    this.byType = new Map(facts.types.map((name, code) => [name, byType[code] ?? noRecords]));
  }

  find(id: number): number {
    return this.byId.find(id);
  }

  recordsOf(type: string): Uint32Array {
    return this.byType.get(type) ?? noRecords;
  }
}

/** Offset of the `#` that begins a record. */
export function startOf(index: LineIndex, record: number): number {
  const { bytes, args } = index;
  let i = args[record] ?? 0;
  // Backwards over the class name and the `=`; a comment in between only makes the search a little longer.
  while (i > 0 && bytes[i] !== 61) i--;
  while (i > 0 && bytes[i] !== 35) i--;
  return i;
}

/** Line of an offset as editors count it, from 1: LF, CRLF and lone CR all end a line. */
export function lineNumber(bytes: Uint8Array, offset: number): number {
  let line = 1;
  for (let i = 0; i < offset; i++) {
    const c = bytes[i];
    if (c === 10 || (c === 13 && bytes[i + 1] !== 10)) line++;
  }
  return line;
}

/** Bytes without our own block: what digests are taken over. The same array where there is no block. */
export function withoutOwnBlock(index: LineIndex): Uint8Array {
  const { bytes, ownBlock } = index;
  if (ownBlock === null) return bytes;
  const rest = new Uint8Array(bytes.length - (ownBlock.to - ownBlock.from));
  rest.set(bytes.subarray(0, ownBlock.from));
  rest.set(bytes.subarray(ownBlock.to), ownBlock.from);
  return rest;
}
