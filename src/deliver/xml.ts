/** An element of a document that is only written, never read: its text or its children, attributes in the order given. */
export interface XmlElement {
  readonly tag: string;
  readonly attributes: Readonly<Record<string, string>>;
  readonly inside: string | readonly XmlElement[];
}

/** `null` children fall away, so that what is absent leaves no empty element. */
export const xml = (
  tag: string,
  attributes: Readonly<Record<string, string>>,
  inside: string | readonly (XmlElement | null)[] = [],
): XmlElement => ({
  tag,
  attributes,
  inside: typeof inside === 'string' ? inside : inside.filter((child) => child !== null),
});

/** The whole document, UTF-8, one element a line. */
export const xmlDocument = (root: XmlElement): string => `<?xml version="1.0" encoding="UTF-8"?>\n${written(root, '')}`;

function written({ tag, attributes, inside }: XmlElement, indent: string): string {
  const open = [tag, ...Object.entries(attributes).map(([name, value]) => `${name}="${escaped(value)}"`)].join(' ');
  if (inside.length === 0) return `${indent}<${open}/>\n`;
  if (typeof inside === 'string') return `${indent}<${open}>${escaped(inside)}</${tag}>\n`;
  const children = inside.map((child) => written(child, `${indent}  `)).join('');
  return `${indent}<${open}>\n${children}${indent}</${tag}>\n`;
}

/** Characters that no XML document may hold become the mark for what cannot be shown. */
const escaped = (text: string): string =>
  text
    // biome-ignore lint/suspicious/noControlCharactersInRegex: these are what must not go in
    .replace(/[\u0000-\u0008\u000B\u000C\u000E-\u001F\uFFFE\uFFFF]|\p{Cs}/gu, '\uFFFD')
    .replace(/[&<>"'\r]/g, (character) => `&#${character.charCodeAt(0)};`);
