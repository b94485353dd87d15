import type { Change } from './mutants-of.ts';
import { type Node, wordOf } from './tree.ts';

/** Methods that ask each of a list. */
export const predicates = new Set(['filter', 'some', 'every', 'find', 'findLast', 'findIndex', 'findLastIndex']);

const comparisons = new Set(['===', '!==', '<', '<=', '>', '>=', 'in', 'instanceof']);

/** An expression that can only be true or false. */
export const isCondition = (node: Node): boolean =>
  (node.type === 'BinaryExpression' && comparisons.has(wordOf(node, 'operator'))) ||
  (node.type === 'UnaryExpression' && wordOf(node, 'operator') === '!') ||
  (node.type === 'LogicalExpression' && wordOf(node, 'operator') !== '??');

/** Answered always and never. Of several that must all hold, one left out is its own mutant, so only the whole is answered. */
export function conditionsOf(node: Node, loop: boolean): readonly Change[] {
  const [always, never] = [
    { what: 'always', text: 'true' },
    { what: 'never', text: 'false' },
  ];
  // A loop that never ends tells nothing that a loop never begun does not.
  if (loop) return [never];
  if (node.type !== 'LogicalExpression') return [always, never];
  return wordOf(node, 'operator') === '&&' ? [never] : [always];
}
