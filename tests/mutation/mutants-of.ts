import { changesOf } from './changes.ts';
import { conditionsOf, isCondition, predicates } from './conditions.ts';
import { childrenOf, type Node, parse, partOf, partsOf, wordOf } from './tree.ts';

/** One small fault that can be switched on. */
export interface Mutant {
  /** `src/codes/npc/checks.ts: never: size > limit (2)`: stays the same while other lines come and go. */
  readonly key: string;
  readonly file: string;
  readonly line: number;
  /** Where the faulty piece stands in the source. */
  readonly start: number;
  readonly end: number;
  readonly what: string;
}

export interface Mutated {
  /** The source with every mutant in it, each asleep until `__mutant(<number>)` says yes. */
  readonly text: string;
  readonly mutants: readonly Mutant[];
}

/** All mutants of one file. Numbers run on from `first`. */
export function mutantsOf(file: string, source: string, first = 0): Mutated {
  const mutants: Mutant[] = [];
  const seen = new Map<string, number>();
  const textOf = ({ start, end }: Node): string => source.slice(start, end);

  const number = (node: Node, what: string): number => {
    const shown = textOf(node).replace(/\s+/g, ' ');
    const name = `${file}: ${what}: ${shown.length > 90 ? `${shown.slice(0, 90)}…` : shown}`;
    const nth = (seen.get(name) ?? 0) + 1;
    seen.set(name, nth);
    const line = source.slice(0, node.start).split('\n').length;
    mutants.push({ key: nth === 1 ? name : `${name} (${nth})`, file, line, start: node.start, end: node.end, what });
    return first + mutants.length - 1;
  };
  const switched = (node: Node, changes: readonly Change[], text: string): string =>
    changes.length === 0
      ? text
      : `(${changes.map(({ what, text: other }) => `__mutant(${number(node, what)})?${other}:`).join('')}${text})`;

  /** The text of a node with the mutants of all that stands under it. */
  const within = (node: Node, above: readonly Node[]): string => {
    let text = '';
    let at = node.start;
    for (const child of childrenOf(node)) {
      text += source.slice(at, child.start) + mutated(child, [node, ...above]);
      at = child.end;
    }
    return text + source.slice(at, node.end);
  };

  /** A condition: each of its parts always and never, and each limit one step off. */
  const condition = (node: Node, above: readonly Node[], loop = false): string => {
    const inner =
      node.type === 'LogicalExpression' && wordOf(node, 'operator') !== '??'
        ? chain(node, above)
        : switched(node, changesOf(node, above, textOf), within(node, above));
    return switched(node, conditionsOf(node, loop), inner);
  };
  const chain = (node: Node, above: readonly Node[]): string => {
    const [left, right] = [partOf(node, 'left')!, partOf(node, 'right')!];
    const operator = wordOf(node, 'operator');
    const side = (part: Node): string => {
      const same = part.type === 'LogicalExpression' && wordOf(part, 'operator') === operator;
      if (same) return chain(part, [node, ...above]);
      const without = { what: 'left out', text: String(operator === '&&') };
      const nested =
        part.type === 'LogicalExpression' && wordOf(part, 'operator') !== '??'
          ? chain(part, [node, ...above])
          : switched(part, changesOf(part, [node, ...above], textOf), within(part, [node, ...above]));
      return switched(part, [without], nested);
    };
    return (
      source.slice(node.start, left.start) +
      side(left) +
      source.slice(left.end, right.start) +
      side(right) +
      source.slice(right.end, node.end)
    );
  };

  const mutated = (node: Node, above: readonly Node[]): string => {
    const parent = above[0];
    if (isOurOwnFault(node, textOf)) return textOf(node);
    const isTest = parent !== undefined && partOf(parent, 'test') === node;
    if (isTest || isCondition(node) || isPredicate(node, above))
      return condition(node, above, isTest && /^(While|For|DoWhile)/.test(parent.type));
    if (node.type === 'ExpressionStatement' || node.type === 'ContinueStatement' || node.type === 'BreakStatement') {
      const isDone = ['CallExpression', 'AssignmentExpression', 'UpdateExpression'].includes(
        partOf(node, 'expression')?.type ?? '',
      );
      if (node.type === 'ExpressionStatement' && !isDone) return within(node, above);
      if (node.type === 'BreakStatement') return textOf(node);
      return `{if(!__mutant(${number(node, 'left undone')})){${within(node, above)}}}`;
    }
    if (node.type === 'ArrayExpression' && isList(node, parent)) {
      const parts = partsOf(node, 'elements').map((part) => {
        const text = mutated(part, [node, ...above]);
        const one = part.type === 'SpreadElement' ? `(${text.slice(3)})` : `[${text}]`;
        return `...(__mutant(${number(part, 'not in the list')})?[]:${one})`;
      });
      return `[${parts.join(',')}]`;
    }
    return switched(node, changesOf(node, above, textOf), within(node, above));
  };

  return { text: within(parse(source), []), mutants };
}

/** One way to read a node wrongly. */
export interface Change {
  readonly what: string;
  readonly text: string;
}

/** A guard that throws a plain error speaks of our own fault: nothing that a user hands us reaches it. */
const isOurOwnFault = (node: Node, textOf: (node: Node) => string): boolean =>
  node.type === 'IfStatement' && /^\{?\s*throw new Error\(/.test(textOf(partOf(node, 'consequent')!));

/** `({ closet }) => closet`, where a list is asked by it. */
const isPredicate = (node: Node, [parent, call]: readonly Node[]): boolean =>
  parent?.type === 'ArrowFunctionExpression' &&
  partOf(parent, 'body') === node &&
  node.type !== 'BlockStatement' &&
  call?.type === 'CallExpression' &&
  predicates.has(wordOf(partOf(partOf(call, 'callee')!, 'property'), 'name'));

/** Rules, findings, spread parts, members of a set; pairs and triples of values are none. */
const isList = (node: Node, parent: Node | undefined): boolean => {
  const elements = partsOf(node, 'elements');
  const ofSet = parent?.type === 'NewExpression' && wordOf(partOf(parent, 'callee'), 'name') === 'Set';
  return (
    elements.length > 0 &&
    (ofSet ||
      elements.some(({ type }) => type === 'ObjectExpression' || type === 'SpreadElement') ||
      elements.every(({ type }) => type === 'CallExpression'))
  );
};
