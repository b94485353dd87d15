import { answersFormat } from '../model/read-answers.ts';
import type { Question } from './question.ts';

/** The text of an answers file to fill in. */
export const answersFormText = (questions: readonly Question[]): string =>
  `${JSON.stringify(answersForm(questions), null, 2)}\n`;

/**
 * An answers file to fill in: every question with its weight, and behind them a `null` at the place of each answer.
 * It is read as it stands: what is still null counts as not answered.
 */
export function answersForm(questions: readonly Question[]): Readonly<Record<string, unknown>> {
  const parts: Record<string, Record<string, unknown>> = { settings: {}, fixtures: {}, pipes: {}, batteries: {} };
  for (const { about, answer } of questions) {
    const { part, key, field } = answer;
    const entries = parts[part];
    if (entries === undefined || key === null) continue;
    // A room is answered for each fixture by itself.
    for (const one of field === 'space' ? about : [key])
      entries[one] = field === null ? null : withNull(entries[one], field.split('.'));
  }
  return {
    format: answersFormat,
    version: 1,
    questions: questions.map(({ about, ask, weight, choices }) => ({ about: about.slice(0, 8), ask, weight, choices })),
    settings: parts.settings,
    sewerEnds: [],
    fixtures: parts.fixtures,
    pipes: parts.pipes,
    batteries: parts.batteries,
    leaveOut: [],
    cleanouts: [],
  };
}

function withNull(entry: unknown, [field = '', ...deeper]: readonly string[]): Readonly<Record<string, unknown>> {
  const fields: Readonly<Record<string, unknown>> = typeof entry === 'object' && entry !== null ? { ...entry } : {};
  return { ...fields, [field]: deeper.length === 0 ? null : withNull(fields[field], deeper) };
}
