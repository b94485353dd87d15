import { proofSentence, weightsSentence } from '../schedule/mend-text.ts';
import { decimal, sizeText } from '../schedule/number-text.ts';
import { planSteps } from '../schedule/plan-steps.ts';
import type { ResultFinding, ResultPipe } from '../schedule/result.ts';
import { counted, countedKinds, listed, plainWords } from '../schedule/trade-words.ts';
import { batteriesText, reasonText, undersizedCauses } from '../schedule/undersized-text.ts';
import { type Html, html, table, tag } from './html-element.ts';
import type { Section } from './report-section.ts';
import type { ReportSource } from './report-source.ts';

/** null: no pipe is too small. */
export function undersizedSection({ result, names }: ReportSource): Section | null {
  const groups = undersizedCauses(result);
  if (groups.length === 0) return null;
  const sizes = (pipes: readonly ResultPipe[], of: (pipe: ResultPipe) => string): string =>
    [...new Set(pipes.map(of))].join(', ');
  return {
    id: 'undersized',
    title: 'Undersized pipes, by cause',
    parts: [
      table(
        'Each line is one cause: what is drawn, what is needed, and the demand that governs',
        [
          { head: 'Pipes', cell: ({ pipes }) => countedKinds(pipes.map(({ role }) => plainWords(role))), as: 'word' },
          { head: 'Drawn', cell: ({ pipes }) => sizes(pipes, ({ modelled }) => modelled?.label ?? '?'), as: 'word' },
          { head: 'Needed', cell: ({ pipes }) => sizes(pipes, ({ required }) => sizeText(required)), as: 'word' },
          { head: 'Why', cell: (group) => reasonText(group, result.code.unit, names) },
          { head: 'Battery', cell: batteriesText, as: 'word' },
          { head: 'Which', cell: ({ pipes }) => pipes.map(({ globalId }) => names.of(globalId)).join(', ') },
        ],
        groups,
      ),
    ],
  };
}

/** All errors but pipes that are too small; null where there are none. */
export function errorsSection(source: ReportSource): Section | null {
  const errors = source.result.findings.filter(({ severity, code }) => severity === 'error' && code !== 'undersized');
  if (errors.length === 0) return null;
  return {
    id: 'errors',
    title: 'Other errors',
    parts: [findingTable(source, counted(errors.length, 'error'), errors)],
  };
}

/** Warnings and notes, and storeys, rooms and batteries that should be alike and are not. */
export function otherFindingsSection(source: ReportSource): Section | null {
  const { findings } = source.result;
  const some = (severity: string): ResultFinding[] => findings.filter((finding) => finding.severity === severity);
  const [warnings, notes] = [some('warning'), some('note')];
  const odd = source.twins.flatMap((twins) => twins.odd);
  if (warnings.length + notes.length + odd.length === 0) return null;
  return {
    id: 'warnings',
    title: 'Warnings and notes',
    parts: [
      warnings.length === 0 ? null : findingTable(source, counted(warnings.length, 'warning'), warnings),
      notes.length === 0 ? null : findingTable(source, counted(notes.length, 'note'), notes),
      odd.length === 0 ? null : tag('h3', 'Parts that should be alike and are not'),
      odd.length === 0 ? null : tag('ul', ...odd.map(({ sentence }) => tag('li', sentence))),
    ],
  };
}

const mostNamed = 12;

function findingTable({ names }: ReportSource, caption: string, findings: readonly ResultFinding[]): Html {
  return table(
    caption,
    [
      { head: 'Finding', cell: ({ code }) => plainWords(code), as: 'word' },
      { head: 'What', cell: ({ sentence }) => sentence },
      { head: 'Clause', cell: ({ clause }) => clause ?? '' },
      {
        head: 'Elements',
        cell: ({ about }) =>
          about.slice(0, mostNamed).map(names.of).join(', ') +
          (about.length > mostNamed ? ` and ${about.length - mostNamed} more` : ''),
      },
    ],
    findings,
  );
}

/** The least change that mends the model; null where nobody looked for one, or none is known. */
export function planSection({ plan, names }: ReportSource): Section | null {
  if (plan === null) return null;
  const steps = planSteps(plan.changes, names.short);
  return {
    id: 'plan',
    title: 'The least change that puts it right',
    parts: [
      tag(
        'p',
        `${counted(plan.before.errors, 'error')}; ${counted(plan.changes.length, 'change')}, ${decimal(plan.cost, 1)} points.`,
      ),
      steps.length === 0
        ? null
        : html(
            'ol',
            { class: 'steps' },
            ...steps.map(({ title, why, cost, pipes }) =>
              tag(
                'li',
                tag('b', `${title} (${decimal(cost, 1)} points)`),
                html('div', { class: 'quiet' }, why),
                pipes.length > 0 && html('div', { class: 'quiet' }, listed(pipes)),
              ),
            ),
          ),
      tag('p', proofSentence(plan)),
      plan.after.findings.length === 0
        ? null
        : tag('ul', ...plan.after.findings.map(({ sentence }) => tag('li', sentence))),
      ...plan.after.advice.map(({ sentence }) => tag('p', `For you: ${sentence}`)),
      tag('p', plan.search.sentence),
      plan.changes.length === 0 ? null : html('p', { class: 'quiet' }, weightsSentence(plan)),
      plan.changes.length === 0
        ? null
        : tag('p', 'A proposal for the designer: nothing that is drawn in the model is moved.'),
    ],
  };
}
