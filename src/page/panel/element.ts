type Child = Node | string | null | undefined | false;
type Attributes = Readonly<Record<string, string | number | boolean | null | undefined | ((event: never) => void)>>;

/**
 * An element with attributes, listeners (`on…`) and children. Text always becomes a text node: there is no way through
 * here from a word of the model to markup.
 */
export function make<K extends keyof HTMLElementTagNameMap>(
  tag: K,
  attributes: Attributes = {},
  ...children: readonly Child[]
): HTMLElementTagNameMap[K] {
  const made = document.createElement(tag);
  dress(made, attributes);
  made.append(...children.filter(isNode));
  return made;
}

const space = 'http://www.w3.org/2000/svg';

export function makeSvg<K extends keyof SVGElementTagNameMap>(
  tag: K,
  attributes: Attributes = {},
  ...children: readonly Child[]
): SVGElementTagNameMap[K] {
  const made = document.createElementNS(space, tag);
  dress(made, attributes);
  made.append(...children.filter(isNode));
  return made;
}

function dress(element: Element, attributes: Attributes): void {
  for (const [name, value] of Object.entries(attributes)) {
    if (typeof value === 'function') element.addEventListener(name.slice(2), value as (event: Event) => void);
    else if (value === true) element.setAttribute(name, '');
    else if (value !== null && value !== undefined && value !== false) element.setAttribute(name, String(value));
  }
}

const isNode = (child: Child): child is Node | string => child !== null && child !== undefined && child !== false;

/** A word of the model: any direction of writing, any length, and nothing in it can steer what stands beside it. */
export const modelText = (text: string): HTMLElement => make('bdi', { class: 'model-text' }, text);
