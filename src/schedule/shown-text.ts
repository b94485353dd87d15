/**
 * Model text as it may be shown: on one line, and every character that could steer a terminal, reorder a line or hide
 * itself written out as `\u{1B}`. Lone surrogates count among them.
 */
export function shownText(text: string): string {
  return visible(text.replace(/\s+/gu, ' ').trim());
}

/** The same without touching spaces and line breaks: what a sink applies to whole pages of text. */
export function visible(text: string): string {
  return text.replace(steering, (found) => `\\u{${(found.codePointAt(0) ?? 0).toString(16).toUpperCase()}}`);
}

// Controls but the line feed, bidirectional and invisible formatting, line separators, tags, lone surrogates.
const steering =
  // biome-ignore lint/suspicious/noControlCharactersInRegex: finding control characters is what it is for
  /[\u0000-\u0009\u000B-\u001F\u007F-\u009F\u00AD\u061C\u180E\u200B-\u200F\u2028-\u202F\u2060-\u206F\uFEFF\uFFF9-\uFFFB\u{E0000}-\u{E007F}]|\p{Cs}/gu;

/** Columns of a terminal that a text takes: wide East Asian characters take two, combining marks none. */
export function columnsOf(text: string): number {
  let columns = 0;
  for (const character of text) columns += combining.test(character) ? 0 : wide.test(character) ? 2 : 1;
  return columns;
}

const combining = /\p{M}/u;
const wide =
  /[\u1100-\u115F\u2E80-\u303E\u3041-\uA4CF\uAC00-\uD7A3\uF900-\uFAFF\uFE30-\uFE6F\uFF00-\uFF60\uFFE0-\uFFE6\u{1F300}-\u{1FAFF}\u{20000}-\u{3FFFD}]/u;

/** At most `columns` wide, with `…` where something was cut off. */
export function shortened(text: string, columns: number): string {
  if (columnsOf(text) <= columns) return text;
  let kept = '';
  let used = 1;
  for (const character of text) {
    used += columnsOf(character);
    if (used > columns) break;
    kept += character;
  }
  return `${kept}…`;
}

/** `text` and spaces up to `columns`; never cut. */
export const padded = (text: string, columns: number): string =>
  text + ' '.repeat(Math.max(0, columns - columnsOf(text)));

/**
 * Breaks at spaces into lines of at most `columns`; the first begins with `lead`, the others with `indent`.
 * A word that is wider than a line is cut across lines, never lost. What `unbroken` joined stays on one line.
 */
export function wrapped(text: string, columns: number, lead = '', indent = ' '.repeat(columnsOf(lead))): string[] {
  const room = Math.max(10, columns - Math.max(indent.length, columnsOf(lead)));
  const lines: string[] = [];
  let line = '';
  for (const word of text.split(' ').flatMap((whole) => pieces(whole, room))) {
    const longer = line === '' ? word : `${line} ${word}`;
    if (columnsOf(longer) <= room) line = longer;
    else {
      lines.push(line);
      line = word;
    }
  }
  lines.push(line);
  return lines.map((text, place) => (place === 0 ? lead : indent) + text.replaceAll(noBreak, ' '));
}

/** `shownText` for a text whose parts are joined already: what `unbroken` joined stays joined. */
export const oneLine = (text: string): string => visible(text.replace(/[^\S\u00A0]+/gu, ' '));

/** Keeps the words of a text together when it is wrapped. */
export const unbroken = (text: string): string => text.replaceAll(' ', noBreak);
const noBreak = '\u00A0';

function pieces(word: string, columns: number): string[] {
  const cut: string[] = [];
  let piece = '';
  for (const character of word) {
    if (columnsOf(piece + character) > columns) {
      cut.push(piece);
      piece = '';
    }
    piece += character;
  }
  return [...cut, piece];
}
