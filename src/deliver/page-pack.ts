import { deflateSync } from 'fflate';
import type { PageData } from './page-data.ts';
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
  const { pipes, fixtures, findings, ...result } = data.result;
  const head: Head = {
    result: { ...result, elements: [] },
    rows: {
      pipes: packRows(pipes, column),
      fixtures: packRows(fixtures, column),
      findings: packRows(findings, column),
    },
    scene: replaced(data.scene, (value) => (value instanceof Int32Array ? { column: column(value) } : undefined)),
    risers: data.risers,
    sizes: data.sizes,
    questions: data.questions,
    weighed: data.weighed,
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
  const result = {
    ...head.result,
    pipes: unpackRows(head.rows.pipes, numbers),
    fixtures: unpackRows(head.rows.fixtures, numbers),
    findings: unpackRows(head.rows.findings, numbers),
  };
  const scene = replaced(head.scene, (value) => (isColumn(value) ? numbers(value.column) : undefined));
  const { risers, sizes, questions, weighed } = head;
  return { format: 'drainwright-page', version: 1, result, sizes, questions, weighed, scene, risers } as PageData;
}

interface Column {
  readonly count: number;
  readonly bytes: number;
}

interface Head {
  readonly result: object;
  readonly rows: { readonly pipes: PackedRows; readonly fixtures: PackedRows; readonly findings: PackedRows };
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
