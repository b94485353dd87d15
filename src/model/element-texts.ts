import type { Element } from './model.ts';
import type { NamesTable } from './names-table.ts';

/** A text of an element that may say what it is. */
export interface ElementText {
  /** As it stands in evidence: `type name`, `property Family`. */
  readonly from: string;
  readonly text: string;
  /** Prose and remarks say what a thing is for more than what it is. */
  readonly isProse: boolean;
}

const mostWordsOfName = 12;

/** Texts on what the element is, the most telling first. Each text once: exporters repeat type names. */
export function textsOf(element: Element, names: NamesTable): readonly ElementText[] {
  const texts: ElementText[] = [];
  const add = (from: string, text: string | null): void => {
    if (text === null || text === '' || texts.some((known) => known.text === text)) return;
    texts.push({ from, text, isProse: from.endsWith('description') && wordCount(text) > mostWordsOfName });
  };
  add('type name', element.typeName);
  add('type description', element.typeDescription);
  add('object type', element.objectType);
  add('name', element.name);
  add('description', element.description);
  add('tag', element.tag);
  for (const { name, value } of element.properties)
    if (typeof value === 'string' && names.propertyUse(name) === 'kind') add(`property ${name}`, value);
  return texts;
}

function wordCount(text: string): number {
  let words = 1;
  for (const sign of text.slice(0, 400)) if (sign === ' ') words += 1;
  return words;
}

/** `type name "WC Standuri"`: what decided, short enough for a line. */
export const quoted = (from: string, text: string): string =>
  `${from} "${text.length <= longestQuote ? text : `${text.slice(0, longestQuote).trimEnd()}…`}"`;

const longestQuote = 60;
