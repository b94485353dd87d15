import { parseAst } from 'rolldown/parseAst';

/** A node of the parsed source: its kind, where it stands in the text, and whatever hangs under it. */
export interface Node {
  readonly type: string;
  readonly start: number;
  readonly end: number;
  readonly [part: string]: unknown;
}

export const parse = (text: string): Node => parseAst(text, { lang: 'ts' }) as unknown as Node;

const isNode = (value: unknown): value is Node =>
  typeof value === 'object' && value !== null && typeof (value as { type?: unknown }).type === 'string';

/** A part that is one node; undefined where it is none. */
export const partOf = (node: Node, part: string): Node | undefined => {
  const value = node[part];
  return isNode(value) ? value : undefined;
};

export const partsOf = (node: Node, part: string): readonly Node[] => {
  const value = node[part];
  return Array.isArray(value) ? value.filter(isNode) : [];
};

/** A name or an operator of a node. */
export const wordOf = (node: Node | undefined, part: string): string => {
  const value = node?.[part];
  return typeof value === 'string' ? value : '';
};

/** What only the type checker reads is nothing to mutate; a cast is, for what it casts. */
const isType = ({ type }: Node): boolean =>
  type.startsWith('TS') && !['TSAsExpression', 'TSNonNullExpression', 'TSSatisfiesExpression'].includes(type);

/** What stands directly under a node and runs, in the order of the text. */
export function childrenOf(node: Node): readonly Node[] {
  if (node.type === 'ImportDeclaration' || node.type.startsWith('Export') === true) {
    const declared = partOf(node, 'declaration');
    return declared === undefined || isType(declared) ? [] : [declared];
  }
  // `{ name }` is one word for a key and its value.
  if (node.type === 'Property' && node.shorthand === true) return [];
  return Object.values(node)
    .flatMap((value) => (Array.isArray(value) ? value.filter(isNode) : isNode(value) ? [value] : []))
    .filter((child) => !isType(child))
    .sort((a, b) => a.start - b.start);
}
