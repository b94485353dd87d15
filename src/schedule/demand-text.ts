import { demandWords } from './demand-facts.ts';
import type { ResultPipe, TrailStep } from './result.ts';
import { listed } from './trade-words.ts';

/** One demand of a trail: `Wet vent size: 4 in, which holds 36, for 14 fixture units (Table 2.5.8.1., row 4 in)`. */
export function demandText(step: TrailStep, unit: string, nameOf: (globalId: string) => string): string {
  const { title, facts, asks } = step;
  const { basis, holds, asides } = demandWords(facts, unit, nameOf);
  const size = asks === null ? 'no size of the table' : asks.label;
  const held = holds === null ? '' : asks === null ? `, whose last size ${holds},` : `, which ${holds},`;
  const why = basis.length === 0 ? '' : ` for ${listed(basis)}`;
  const more = asides.map((aside) => `; ${aside}`).join('');
  return `${title}: ${size}${basis.length === 0 ? held.replace(/,$/, '') : held}${why}${more} (${placeText(step)}${doubts[step.trust] ?? ''})`;
}

/** Where the demand is printed: `Table 2.4.10.6.-B, row 3 in`. */
export const placeText = ({ clause, row }: TrailStep): string => (row === null ? clause : `${clause}, row ${row}`);

/** The demands that decided, in the order of the trail; more than one where equal sizes are asked. */
export const governing = ({ trail }: Pick<ResultPipe, 'trail'>): readonly TrailStep[] =>
  trail.filter(({ governs }) => governs);

/** Their clauses, each once. */
export const governingClauses = (pipe: Pick<ResultPipe, 'trail'>): readonly string[] => [
  ...new Set(governing(pipe).map(({ clause }) => clause)),
];

/** How far to trust a figure, where there is something to say. */
const doubts: Readonly<Record<string, string>> = {
  memory: '; figure not yet checked against print',
  provisional: '; provisional, since the cell before it could not be read',
};
