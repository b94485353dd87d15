import { putNode, type Scope, type Sheet } from './sketch-sheet.ts';
import type { Cursor } from './sketch-tokens.ts';

/**
 * `A > B > C`. A node may be placed where it is first named: `B (east 0.8 fall 1:50)` goes on from the node before it,
 * `A (at 0 0 -0.3)` begins. A place without a name, `(up 2)`, is a bend that nobody needs to name.
 */
export function readPath(cursor: Cursor, sheet: Sheet, scope: Scope): readonly string[] {
  const path: string[] = [];
  do {
    const previous = path.at(-1) ?? null;
    const nameless = cursor.peek() === '(';
    if (nameless && previous === null) cursor.fail('the first node needs a name');
    const name = nameless ? unused(sheet, `${previous}+`) : scope.nameOf(cursor.name('node'));
    if (cursor.took('(')) {
      if (cursor.took(')')) cursor.fail('the brackets are empty');
      putNode(sheet, cursor, scope, name, previous);
      cursor.need(')');
    }
    if (name === previous) cursor.fail(`${name} follows itself`);
    path.push(name);
  } while (cursor.took('>'));
  if (path.length < 2) cursor.fail('a pipe needs two nodes');
  return path;
}

function unused(sheet: Sheet, base: string): string {
  for (let count = 1; ; count += 1) if (!sheet.places.has(base + count)) return base + count;
}
