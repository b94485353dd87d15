/** A word of a folded text: letters without accents and in lower case, a number, or `&`. */
export interface Word {
  readonly text: string;
  /** Counted from 0; a colon, comma, bracket or spaced dash begins the next. */
  readonly segment: number;
  /** Position among the letters and digits of the text: what orders and measures matches. */
  readonly at: number;
  readonly isNumber: boolean;
  /** Written without spaces between words: Japanese, Chinese, Korean. */
  readonly unspaced: boolean;
}

/** What stands behind this is prose, not a name. */
const longestName = 1000;

/**
 * A name in words that compare: double-encoded text repaired, `SlopSink` and `WC01` split, `w/` and `+` read as `with`,
 * accents off. Linear in the length of the text, which is read up to 1000 characters.
 */
export function foldText(text: string): readonly Word[] {
  const spread = repairDoubleEncoding(text.slice(0, longestName))
    .normalize('NFKC')
    .replace(/(?<![\p{L}\p{N}])(?:[wm]\/|c\/w(?![\p{L}\p{N}]))|\s\+\s?/giu, ' with ')
    .replace(/(?<=\p{Ll})(?=\p{Lu})|(?<=\p{Lu})(?=\p{Lu}\p{Ll}{2})/gu, ' ');
  const words: Word[] = [];
  let segment = 0;
  let end = 0;
  let at = 0;
  for (const match of spread.matchAll(wordSigns)) {
    const [found] = match;
    if (words.length > 0 && parts.test(spread.slice(end, match.index))) segment += 1;
    end = match.index + found.length;
    const plain = foldLetters(found);
    if (plain === '') continue;
    const isNumber = /^\p{N}/u.test(found);
    words.push({ text: plain, segment, at, isNumber, unspaced: unspacedStart.test(found) });
    at += plain.length;
  }
  return words;
}

/** Letters in lower case without accents: `Tvättställ` makes `tvattstall`. Other signs stay. */
export function foldLetters(text: string): string {
  if (/^[a-z0-9]*$/.test(text)) return text;
  return text
    .toLowerCase()
    .normalize('NFD')
    .replace(/[\u0300-\u036f]/g, '')
    .normalize('NFC')
    .replace(/[øæßłđıœþð]/g, (letter) => latin[letter] ?? letter);
}

const latin: Readonly<Record<string, string>> = {
  ø: 'o',
  æ: 'ae',
  ß: 'ss',
  ł: 'l',
  đ: 'd',
  ı: 'i',
  œ: 'oe',
  þ: 'th',
  ð: 'd',
};

const unspacedSigns = '\\u3005-\\u3007\\u3040-\\u30FF\\u3400-\\u4DBF\\u4E00-\\u9FFF\\uAC00-\\uD7AF\\uF900-\\uFAFF';
const unspacedStart = new RegExp(`^[${unspacedSigns}]`, 'u');
/** A run of unspaced script, a run of other letters, a number, or an ampersand. */
const wordSigns = new RegExp(`[${unspacedSigns}]+|(?:(?![${unspacedSigns}])[\\p{L}\\p{M}])+|\\p{N}+|&`, 'gu');
const parts = /[:;,()|[\]{}]|\s[-–—]|[-–—]\s|_[-–—]_|--|\s\/\s/u;

/** UTF-8 that was read as Windows-1252 and stored again (`Ã¤` for `ä`): only runs that decode without a fault. */
function repairDoubleEncoding(text: string): string {
  if (!/[\u00C2-\u00F4]/.test(text)) return text;
  return text.replace(doubled, (run) => {
    const bytes = [...run].map((sign) => windows1252.get(sign) ?? sign.charCodeAt(0));
    const [first = 0, ...rest] = bytes;
    const lead = rest.length === 1 ? first & 0x1f : rest.length === 2 ? first & 0x0f : first & 0x07;
    const code = rest.reduce((value, byte) => value * 64 + (byte & 0x3f), lead);
    const least = [0, 0x80, 0x800, 0x10000][rest.length] ?? 0;
    const surrogate = code >= 0xd800 && code <= 0xdfff;
    return code < least || code > 0x10ffff || surrogate ? run : String.fromCodePoint(code);
  });
}

const windows1252 = new Map(
  [...'€\u0081‚ƒ„…†‡ˆ‰Š‹Œ\u008dŽ\u008f\u0090‘’“”•–—˜™š›œ\u009džŸ'].map((sign, index) => [sign, 0x80 + index]),
);
const tail = `[\\u00A0-\\u00BF${[...windows1252.keys()].join('')}]`;
const doubled = new RegExp(`[\\u00C2-\\u00DF]${tail}|[\\u00E0-\\u00EF]${tail}{2}|[\\u00F0-\\u00F4]${tail}{3}`, 'gu');
