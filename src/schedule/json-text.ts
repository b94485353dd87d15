/**
 * JSON as every result is printed: one line for each row of a list, so that two results can be compared line by line.
 * The same data gives the same bytes. Characters that steer a terminal are written as escapes, which changes no value.
 */
export function* jsonText(value: Readonly<Record<string, unknown>>): Generator<string> {
  const keys = Object.keys(value).filter((key) => value[key] !== undefined);
  yield '{';
  for (const [place, key] of keys.entries()) {
    yield `${place === 0 ? '' : ','}\n${safe(key)}: `;
    const part = value[key];
    if (!Array.isArray(part) || part.length === 0 || typeof part[0] !== 'object') yield safe(part);
    else {
      for (const [row, entry] of part.entries()) yield `${row === 0 ? '[\n' : ',\n'}  ${safe(entry)}`;
      yield '\n]';
    }
  }
  yield '\n}\n';
}

const safe = (value: unknown): string => JSON.stringify(value).replace(steering, escaped);

const steering =
  /[\u007F-\u009F\u00AD\u061C\u180E\u200B-\u200F\u2028-\u202E\u2060-\u206F\uFEFF\uFFF9-\uFFFB\u{E0000}-\u{E007F}]/gu;

const escaped = (found: string): string =>
  Array.from(
    { length: found.length },
    (_, place) => `\\u${found.charCodeAt(place).toString(16).padStart(4, '0')}`,
  ).join('');
