/** A drawing as plain data: the page makes elements of it, sheets make text. */
export interface SvgShape {
  readonly tag: 'g' | 'path' | 'line' | 'rect' | 'circle' | 'text' | 'title';
  readonly attributes: Readonly<Record<string, string | number>>;
  readonly text?: string;
  readonly children?: readonly SvgShape[];
}

export const shape = (
  tag: SvgShape['tag'],
  attributes: SvgShape['attributes'],
  ...children: readonly SvgShape[]
): SvgShape => ({ tag, attributes, ...(children.length === 0 ? {} : { children }) });

export const words = (attributes: SvgShape['attributes'], text: string): SvgShape => ({
  tag: 'text',
  attributes,
  text,
});

/** One SVG document. Every word is escaped; characters that XML forbids are left out. */
export function svgText(
  shapes: readonly SvgShape[],
  frame: { readonly x: number; readonly y: number; readonly width: number; readonly height: number },
  title: string,
): string {
  const box = `${frame.x} ${frame.y} ${frame.width} ${frame.height}`;
  const head = `<svg xmlns="http://www.w3.org/2000/svg" viewBox="${box}" width="${frame.width}" height="${frame.height}" role="img" font-family="Helvetica, Arial, sans-serif" font-size="10">`;
  return `${head}<title>${escaped(title)}</title>${shapes.map(shapeText).join('')}</svg>\n`;
}

function shapeText({ tag, attributes, text, children = [] }: SvgShape): string {
  const named = Object.entries(attributes).map(([name, value]) => ` ${name}="${escaped(String(value))}"`);
  const inner = (text === undefined ? '' : escaped(text)) + children.map(shapeText).join('');
  return `<${tag}${named.join('')}>${inner}</${tag}>`;
}

const escaped = (text: string): string =>
  text
    // biome-ignore lint/suspicious/noControlCharactersInRegex: XML 1.0 allows no other control character
    .replace(/[\u0000-\u0008\u000B\u000C\u000E-\u001F\uFFFE\uFFFF]|\p{Cs}/gu, '')
    .replace(/[&<>"']/g, (character) => `&#${character.charCodeAt(0)};`);
