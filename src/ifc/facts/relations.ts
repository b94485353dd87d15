import type { Cursor } from '../lines/cursor.ts';
import type { Reader } from '../reader.ts';

/** Visits every relation of a class in order of STEP ids, the cursor in front of its fifth argument (number 4). */
export function eachRelation(reader: Reader, type: string, visit: (cursor: Cursor, record: number) => void): void {
  const cursor = reader.cursor();
  for (const record of reader.all(type)) visit(cursor.at(reader.index.args[record]!).skip(4), record);
}
