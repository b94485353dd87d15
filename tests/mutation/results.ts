import { createHash } from 'node:crypto';
import { appendFileSync, existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Recorded } from './ground.ts';

/** What earlier runs found out, in a folder outside the project. */
export interface Results {
  /** Test file that notices the mutant; null where none is known. */
  killer(key: string): string | null;
  add(key: string, by: string | null): void;
  /** What the tests of a file reach: worked out once for the same text. */
  recorded(body: string, record: () => readonly Recorded[]): readonly Recorded[];
}

export function openResults(folder: string = join(tmpdir(), 'drainwright-mutants')): Results {
  mkdirSync(folder, { recursive: true });
  const file = join(folder, 'results.jsonl');
  const lines = existsSync(file) ? readFileSync(file, 'utf8').split('\n').filter(Boolean) : [];
  const killers = new Map(lines.map((line) => JSON.parse(line) as [string, string | null]));
  return {
    killer: (key) => killers.get(key) ?? null,
    add: (key, by) => {
      killers.set(key, by);
      appendFileSync(file, `${JSON.stringify([key, by])}\n`);
    },
    recorded: (body, record) => {
      const kept = join(folder, `${createHash('sha256').update(body).digest('hex').slice(0, 24)}.json`);
      if (!existsSync(kept)) {
        const found = record().map(({ reached, ...one }) => ({ ...one, reached: packed(reached) }));
        writeFileSync(kept, JSON.stringify(found));
      }
      const read = JSON.parse(readFileSync(kept, 'utf8')) as (Omit<Recorded, 'reached'> & { reached: string })[];
      return read.map((one) => ({ ...one, reached: unpacked(one.reached) }));
    },
  };
}

const packed = (flags: Uint8Array): string => {
  const bits = Buffer.alloc(Math.ceil(flags.length / 8));
  flags.forEach((flag, at) => {
    bits[at >> 3]! |= flag << (at & 7);
  });
  return bits.toString('base64');
};
const unpacked = (text: string): Uint8Array => {
  const bits = Buffer.from(text, 'base64');
  return Uint8Array.from({ length: bits.length * 8 }, (_, at) => ((bits[at >> 3] ?? 0) >> (at & 7)) & 1);
};
