/** Oddities met while texts of one file were decoded. Only texts that somebody asked for are counted. */
export interface TextWatch {
  /** Texts with an escape that is none of the standard's, is cut short or holds half a character: kept as written. */
  brokenEscapes: number;
  /** Texts whose bytes are no UTF-8: read as Windows-1252. */
  notUtf8: number;
  /** Offset of the first such text; -1 while there is none. */
  first: number;
  /** Arguments whose brackets go deeper than is read. */
  tooDeep: number;
  /** Offset of the first of them; -1 while there is none. */
  firstTooDeep: number;
}

export const newTextWatch = (): TextWatch => ({
  brokenEscapes: 0,
  notUtf8: 0,
  first: -1,
  tooDeep: 0,
  firstTooDeep: -1,
});

const backslash = 92;
const quote = 39;

/**
 * Text between the quotes of a STEP string, [from, to): doubled quotes, `\\`, `\S\`, `\P?\`, `\X\`, `\X2\`, `\X4\` and
 * raw bytes (UTF-8, else Windows-1252). An escape that is not right stays as it is written.
 */
export function decodeText(b: Uint8Array, from: number, to: number, watch: TextWatch): string {
  let text = '';
  let page = 'A';
  let broken = false;
  let raw = from;
  const takeRaw = (end: number): void => {
    if (end > raw) text += rawText(b, raw, end, isUtf8);
  };
  let hasHigh = false;
  for (let i = from; i < to && !hasHigh; i++) hasHigh = (b[i] as number) >= 128;
  const isUtf8 = !hasHigh || validUtf8(b, from, to);

  let i = from;
  while (i < to) {
    const c = b[i];
    if (c === quote && b[i + 1] === quote && i + 1 < to) {
      takeRaw(i + 1);
      i += 2;
      raw = i;
    } else if (c === backslash) {
      const escaped = readEscape(b, i, to, page);
      if (escaped === null) {
        broken = true;
        i++;
        continue; // stays in the raw run
      }
      takeRaw(i);
      text += escaped.text;
      page = escaped.page;
      i = escaped.end;
      raw = i;
    } else i++;
  }
  takeRaw(to);
  if (broken || !isUtf8) {
    if (broken) watch.brokenEscapes++;
    if (!isUtf8) watch.notUtf8++;
    if (watch.first < 0) watch.first = from;
  }
  return text;
}

interface Escape {
  readonly text: string;
  readonly end: number;
  /** ISO 8859 part for `\S\` from here on: A is part 1. */
  readonly page: string;
}

function readEscape(b: Uint8Array, at: number, to: number, page: string): Escape | null {
  const c = b[at + 1];
  if (at + 1 >= to) return null;
  if (c === backslash) return { text: '\\', end: at + 2, page };
  const isClosed = (offset: number): boolean => at + offset < to && b[at + offset] === backslash;
  if (c === 83 && isClosed(2) && at + 3 < to) {
    const character = b[at + 3] as number;
    if (character >= 128) return null;
    const doubled = character === quote && b[at + 4] === quote && at + 4 < to;
    const text = pageCharacter(character + 128, page);
    return text === null ? null : { text, end: at + (doubled ? 5 : 4), page };
  }
  if (c === 80 && isClosed(3)) {
    const letter = b[at + 2] as number;
    return letter >= 65 && letter <= 73 ? { text: '', end: at + 4, page: String.fromCharCode(letter) } : null;
  }
  if (c === 88 && isClosed(2)) {
    const code = hexNumber(b, at + 3, at + 5, to);
    return code < 0 ? null : { text: String.fromCharCode(code), end: at + 5, page };
  }
  // Print control directives: they shape a printout and are no part of the text.
  if ((c === 78 || c === 70) && isClosed(2)) return { text: '', end: at + 3, page };
  if (c === 88 && isClosed(3)) {
    const width = b[at + 2] === 50 ? 4 : b[at + 2] === 52 ? 8 : 0;
    return width === 0 ? null : wideText(b, at + 4, to, width, page);
  }
  return null;
}

/** The characters of `\X2\` (four digits each) or `\X4\` (eight) up to their `\X0\`; null if anything is amiss. */
function wideText(b: Uint8Array, from: number, to: number, width: number, page: string): Escape | null {
  let text = '';
  let i = from;
  while (i < to && b[i] !== backslash) {
    const code = hexNumber(b, i, i + width, to);
    if (code < 0 || code > 0x10ffff) return null;
    text += width === 4 ? String.fromCharCode(code) : String.fromCodePoint(code);
    i += width;
  }
  const isEnded = i + 4 <= to && b[i + 1] === 88 && b[i + 2] === 48 && b[i + 3] === backslash;
  return isEnded && isWellFormed(text) ? { text, end: i + 4, page } : null;
}

/** -1 where a digit is missing or the text ends first. */
function hexNumber(b: Uint8Array, from: number, end: number, to: number): number {
  if (end > to) return -1;
  let value = 0;
  for (let i = from; i < end; i++) {
    const c = b[i] as number;
    const digit = c >= 48 && c <= 57 ? c - 48 : c >= 65 && c <= 70 ? c - 55 : c >= 97 && c <= 102 ? c - 87 : -1;
    if (digit < 0) return -1;
    value = value * 16 + digit;
  }
  return value;
}

const isWellFormed = (text: string): boolean =>
  !/[\ud800-\udbff](?![\udc00-\udfff])|(?<![\ud800-\udbff])[\udc00-\udfff]/.test(text);

const pages = new Map<string, TextDecoder>();

function pageCharacter(code: number, page: string): string | null {
  if (page === 'A') return String.fromCharCode(code);
  try {
    const known = pages.get(page) ?? new TextDecoder(`iso-8859-${page.charCodeAt(0) - 64}`);
    pages.set(page, known);
    return known.decode(Uint8Array.of(code));
  } catch {
    // A host without that table: the escape stays as written, and is counted.
    return null;
  }
}

const utf8 = new TextDecoder('utf-8', { ignoreBOM: true });
const strictUtf8 = new TextDecoder('utf-8', { fatal: true, ignoreBOM: true });

function validUtf8(b: Uint8Array, from: number, to: number): boolean {
  try {
    strictUtf8.decode(b.subarray(from, to));
    return true;
  } catch {
    return false;
  }
}

function rawText(b: Uint8Array, from: number, to: number, isUtf8: boolean): string {
  const bytes = b.subarray(from, to);
  if (isUtf8) return utf8.decode(bytes);
  return Array.from(bytes, (c) => String.fromCharCode(c >= 128 && c < 160 ? (windows1252[c - 128] as number) : c)).join(
    '',
  );
}

/** Windows-1252 from 0x80 to 0x9F; the five that it leaves open stay control characters. */
const windows1252: readonly number[] = [
  0x20ac, 0x81, 0x201a, 0x192, 0x201e, 0x2026, 0x2020, 0x2021, 0x2c6, 0x2030, 0x160, 0x2039, 0x152, 0x8d, 0x17d, 0x8f,
  0x90, 0x2018, 0x2019, 0x201c, 0x201d, 0x2022, 0x2013, 0x2014, 0x2dc, 0x2122, 0x161, 0x203a, 0x153, 0x9d, 0x17e, 0x178,
];
