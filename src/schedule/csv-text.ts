import { visible } from './shown-text.ts';

/**
 * Rows as CSV (RFC 4180: commas, CRLF, quotes doubled), with a byte order mark so that spreadsheets read it as UTF-8.
 * Every row is filled up to the first. Text that a spreadsheet would take for a formula has an apostrophe before it;
 * numbers stand with a point, whatever the reader's language.
 */
export function csvText(rows: readonly (readonly (string | number)[])[]): string {
  const width = rows[0]?.length ?? 0;
  const lines = rows.map((row) =>
    Array.from({ length: Math.max(width, row.length) }, (_, at) => field(row[at] ?? '')).join(','),
  );
  return `\uFEFF${lines.map((line) => `${line}\r\n`).join('')}`;
}

function field(value: string | number): string {
  if (typeof value === 'number') return String(value);
  const text = visible(harmless(value));
  return /[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}

/** What spreadsheets begin a formula with, wide forms too, and the white space that they skip before it. */
const formula = /^[\s\u00A0\uFEFF]*[=+\-@\uFF1D\uFF0B\uFF0D\uFF20\t\r]/u;

const harmless = (text: string): string => (formula.test(text) ? `'${text}` : text);
