import { deflateSync } from 'fflate';
import type { MendResult } from '../schedule/mend.ts';
import type { PageData } from './page-data.ts';
import { noFabric } from './page-fabric.ts';
import { type PackedRows, packRows, unpackRows } from './page-rows.ts';

/**
 * Page data as few bytes: whole numbers column by column as differences of seven bits each, rows of the result as
 * columns over their distinct values, then deflate. Layout after inflating: length of the head (4 bytes, little
 * end first), the head as JSON, the columns in the order that the head lists them.
 */
export function packPage(data: PageData): Uint8Array {
  const blocks: Uint8Array[] = [];
  const column = (numbers: Int32Array): Column => {
    const block = packNumbers(numbers);
    blocks.push(block);
    return { count: numbers.length, bytes: block.length };
  };
  const head: Head = {
    ...sideOf(data, column),
    mend: data.mend === null ? null : { plan: data.mend.plan, after: sideOf(withoutFabric(data.mend.after), column) },
  };
  const json = new TextEncoder().encode(JSON.stringify(head));
  const plain = new Uint8Array(blocks.reduce((sum, block) => sum + block.length, 4 + json.length));
  new DataView(plain.buffer).setUint32(0, json.length, true);
  plain.set(json, 4);
  let at = 4 + json.length;
  for (const block of blocks) {
    plain.set(block, at);
    at += block.length;
  }
  return deflateSync(plain, { level: 9 });
}

/** The way back, from inflated bytes: the browser inflates faster than any script. */
export function unpackPage(plain: Uint8Array): PageData {
  const length = new DataView(plain.buffer, plain.byteOffset).getUint32(0, true);
  const head: Head = JSON.parse(new TextDecoder().decode(plain.subarray(4, 4 + length)));
  let at = 4 + length;
  const numbers = ({ count, bytes }: Column): Int32Array => {
    const block = plain.subarray(at, at + bytes);
    at += bytes;
    return unpackNumbers(block, count);
  };
  const before = unpackSide(head, numbers);
  if (head.mend === null) return before;
  const after = unpackSide(head.mend.after, numbers);
  const { fabric, fabricNames } = before.scene;
  return {
    ...before,
    mend: { plan: head.mend.plan, after: { ...after, scene: { ...after.scene, fabric, fabricNames } } },
  };
}

/** The columns of a building stand in the order in which they are asked for here; `unpackSide` asks in the same. */
function sideOf(data: PageData, column: (numbers: Int32Array) => Column): Side {
  const { pipes, fixtures, findings, ...result } = data.result;
  return {
    result: { ...result, elements: [] },
    rows: {
      pipes: packRows(pipes, column),
      fixtures: packRows(fixtures, column),
      findings: packRows(findings, column),
    },
    margins: { pipes: packRows(data.margins.pipes, column), batteries: data.margins.batteries },
    scene: replaced(data.scene, (value) => (value instanceof Int32Array ? { column: column(value) } : undefined)),
    risers: data.risers,
    sizes: data.sizes,
    questions: data.questions,
    weighed: data.weighed,
  };
}

function unpackSide(side: Side, numbers: (column: Column) => Int32Array): PageData {
  const { rows, risers, sizes, questions, weighed } = side;
  const result = {
    ...side.result,
    pipes: unpackRows(rows.pipes, numbers),
    fixtures: unpackRows(rows.fixtures, numbers),
    findings: unpackRows(rows.findings, numbers),
  };
  const margins = { pipes: unpackRows(side.margins.pipes, numbers), batteries: side.margins.batteries };
  const scene = replaced(side.scene, (value) => (isColumn(value) ? numbers(value.column) : undefined));
  const head = { format: 'drainwright-page', version: 1, result, sizes, questions, weighed, margins, mend: null };
  return { ...head, scene, risers } as PageData;
}

/** The changed building stands in the same walls: they are not written twice. */
const withoutFabric = (data: PageData): PageData => ({
  ...data,
  scene: { ...data.scene, fabric: noFabric, fabricNames: [] },
});

interface Column {
  readonly count: number;
  readonly bytes: number;
}

interface Head extends Side {
  readonly mend: { readonly plan: MendResult; readonly after: Side } | null;
}

/** One building, as modelled or as mended. */
interface Side {
  readonly result: object;
  readonly rows: { readonly pipes: PackedRows; readonly fixtures: PackedRows; readonly findings: PackedRows };
  readonly margins: { readonly pipes: PackedRows; readonly batteries: PageData['margins']['batteries'] };
  readonly scene: unknown;
  readonly risers: PageData['risers'];
  readonly sizes: PageData['sizes'];
  readonly questions: PageData['questions'];
  readonly weighed: PageData['weighed'];
}

const isColumn = (value: unknown): value is { readonly column: Column } =>
  typeof value === 'object' && value !== null && 'column' in value;

/** A copy in which every value that `change` answers for is replaced; keys keep their order, so columns keep theirs. */
function replaced(value: unknown, change: (value: unknown) => unknown): unknown {
  const changed = change(value);
  if (changed !== undefined) return changed;
  if (Array.isArray(value)) return value.map((item) => replaced(item, change));
  if (typeof value !== 'object' || value === null) return value;
  return Object.fromEntries(Object.entries(value).map(([name, item]) => [name, replaced(item, change)]));
}

/** Differences, sign in the lowest bit, seven bits a byte. */
export function packNumbers(numbers: Int32Array): Uint8Array {
  const bytes = new Uint8Array(numbers.length * 5);
  let at = 0;
  let before = 0;
  for (const value of numbers) {
    const step = (value - before) | 0;
    before = value;
    let rest = ((step << 1) ^ (step >> 31)) >>> 0;
    while (rest > 127) {
      bytes[at++] = (rest & 127) | 128;
      rest >>>= 7;
    }
    bytes[at++] = rest;
  }
  return bytes.slice(0, at);
}

export function unpackNumbers(bytes: Uint8Array, count: number): Int32Array {
  const numbers = new Int32Array(count);
  let at = 0;
  let value = 0;
  for (let index = 0; index < count; index++) {
    let rest = 0;
    let shift = 0;
    let byte = 128;
    while (byte > 127) {
      byte = bytes[at++]!;
      rest |= (byte & 127) << shift;
      shift += 7;
    }
    value = (value + ((rest >>> 1) ^ -(rest & 1))) | 0;
    numbers[index] = value;
  }
  return numbers;
}
