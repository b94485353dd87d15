import { predicates } from './conditions.ts';
import type { Change } from './mutants-of.ts';
import { type Node, partOf, partsOf, wordOf } from './tree.ts';

const neighbours: Readonly<Record<string, string>> = {
  '<': '<=',
  '<=': '<',
  '>': '>=',
  '>=': '>',
  '+': '-',
  '-': '+',
  '*': '/',
  '/': '*',
};

/** Of a lookup by load, the argument that carries the amount, and how far a step off it is. */
const lookups: Readonly<Record<string, readonly { readonly at: number; readonly by: readonly string[] }[]>> = {
  sizeForLoad: [{ at: 2, by: ['+1', '-60'] }],
  sizeAtSlope: [{ at: 1, by: ['+1', '-60'] }],
  sizeForLength: [
    { at: 2, by: ['+1', '-60'] },
    { at: 3, by: ['+0.5', '-0.5'] },
  ],
};

/** Ways to read one expression wrongly, apart from conditions answered always or never. */
export function changesOf(node: Node, above: readonly Node[], textOf: (node: Node) => string): readonly Change[] {
  const parent = above[0];
  switch (node.type) {
    case 'BinaryExpression': {
      const [left, right] = [partOf(node, 'left')!, partOf(node, 'right')!];
      const operator = wordOf(node, 'operator');
      const other = neighbours[operator];
      const isText = [left, right].some((side) => side.type === 'TemplateLiteral' || typeof side.value === 'string');
      // What is measured has room for its uncertainty beyond the limit: nothing lies exactly on the far edge of that room.
      const hasRoom = /\b(coordinateMetres|turnDegrees|room)\b/.test(textOf(node));
      if (other === undefined || isText || (hasRoom && /[<>]/.test(operator))) return [];
      return [{ what: `${operator} as ${other}`, text: `(${textOf(left)})${other}(${textOf(right)})` }];
    }
    case 'LogicalExpression':
      return wordOf(node, 'operator') === '??'
        ? [{ what: 'as if nothing stood there', text: `(${textOf(partOf(node, 'right')!)})` }]
        : [];
    case 'Literal': {
      const isIndex =
        parent?.type === 'MemberExpression' || (parent?.type === 'Property' && partOf(parent, 'key') === node);
      return typeof node.value === 'number' && !isIndex ? [{ what: 'one more', text: String(node.value + 1) }] : [];
    }
    case 'CallExpression':
      return callChanges(node, textOf);
    default:
      return [];
  }
}

function callChanges(call: Node, textOf: (node: Node) => string): readonly Change[] {
  const callee = partOf(call, 'callee')!;
  const list = partsOf(call, 'arguments');
  const texts = list.map(textOf);
  const again = (name: string, replaced: readonly string[] = texts): string => `${name}(${replaced.join(',')})`;
  if (callee.type === 'Identifier') {
    const name = wordOf(callee, 'name');
    if (name === 'oneSizeBelow' || name === 'oneSizeAbove') return [{ what: 'no step', text: `(${texts[1]})` }];
    if (name === 'rowAtSize') {
      const [shorter, longer] = ["'smaller'", "'larger'"];
      const swapped = texts.map((text) => (text === shorter ? longer : text === longer ? shorter : text));
      return [{ what: 'the row on the other side', text: again(name, swapped) }];
    }
    return (lookups[name] ?? []).flatMap(({ at, by }) =>
      by.map((step) => ({
        what: `read ${step} off`,
        text: again(
          name,
          texts.map((text, nth) => (nth === at ? `(${text})${step}` : text)),
        ),
      })),
    );
  }
  if (callee.type !== 'MemberExpression') return [];
  const [of, method] = [textOf(partOf(callee, 'object')!), wordOf(partOf(callee, 'property'), 'name')];
  if (of === 'Math' && (method === 'max' || method === 'min') && texts.length > 1)
    return [{ what: 'the other extreme', text: again(method === 'max' ? 'Math.min' : 'Math.max') }];
  if (/(^|\.)family$/.test(of) && texts[0]?.startsWith("'") === true) {
    if (method === 'number')
      return ['up', 'down'].map((way) => ({
        what: `limit ${way}`,
        text: `__limit(${textOf(call)},${texts[1]},'${way}')`,
      }));
    if (method === 'size')
      return ['up', 'down'].map((way) => ({
        what: `size ${way}`,
        text: `__size(${textOf(call)},${of}.series,'${way}')`,
      }));
  }
  // Within `a?.b` the rest of the chain hangs on the question mark.
  if (of.includes('?.') || callee.optional === true) return [];
  if (method === 'some' || method === 'every')
    return [
      {
        what: `${method} as ${method === 'some' ? 'every' : 'some'}`,
        text: again(`${of}.${method === 'some' ? 'every' : 'some'}`),
      },
    ];
  const isNamed = list[0] !== undefined && list[0].type !== 'ArrowFunctionExpression';
  if (method === 'filter' && predicates.has(method) && isNamed) return [{ what: 'all of them', text: `(${of})` }];
  if (method === 'sort' || method === 'reverse' || method === 'toSorted')
    return [{ what: 'as they come', text: `(${of})` }];
  return [];
}
