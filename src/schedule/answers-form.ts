import { answersFormat } from '../model/read-answers.ts';
import type { Question } from './questions.ts';

/** The text of an answers file to fill in. */
export const answersFormText = (questions: readonly Question[]): string =>
  `${JSON.stringify(answersForm(questions), null, 2)}\n`;

/**
 * An answers file to fill in: every question with its weight, and behind them a `null` at the place of each answer.
 * It is read as it stands: what is still null counts as not answered.
 */
export function answersForm(questions: readonly Question[]): Readonly<Record<string, unknown>> {
  const parts: Record<string, Record<string, unknown>> = { settings: {}, fixtures: {}, pipes: {}, batteries: {} };
  for (const { answer } of questions) {
    const entries = parts[answer.part];
    if (entries === undefined || answer.key === null || doubled.test(answer.key)) continue;
    if (answer.field === null) entries[answer.key] = null;
    else entries[answer.key] = withNull(entries[answer.key], answer.field.split('.'));
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

/** The result's own id of an element whose GlobalId the model doubles or lacks: no key of an answers file meets it. */
const doubled = /#\d+\.\d+$/;

function withNull(entry: unknown, [field = '', ...deeper]: readonly string[]): Readonly<Record<string, unknown>> {
  const fields: Readonly<Record<string, unknown>> = typeof entry === 'object' && entry !== null ? { ...entry } : {};
  return { ...fields, [field]: deeper.length === 0 ? null : withNull(fields[field], deeper) };
}
