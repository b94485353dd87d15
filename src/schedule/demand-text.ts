import { factsText } from './facts-text.ts';
import type { ResultPipe, TrailStep } from './result.ts';
import { plainWords } from './trade-words.ts';

/** One demand of a trail: `Wet vent load: load 14 fixture units, limit 36 fixture units: 4 in (2.5.8.1., row 4 in)`. */
export function demandText(step: TrailStep, unit: string, nameOf: (globalId: string) => string): string {
  const { rule, facts, asks } = step;
  const numbers = factsText(facts, unit, nameOf);
  const size = asks === null ? 'no size of the table' : asks.label;
  const rest = step.trust === 'memory' ? '; figure not yet checked against print' : '';
  return `${capital(plainWords(rule))}${numbers === '' ? '' : ` (${numbers})`}: ${size}, by ${placeText(step)}${rest}`;
}

/** Where the demand is printed: `2.4.10.6., Table 2.4.10.6.-B, row 3 in`; the clause is not said twice. */
export function placeText({ clause, table, row }: TrailStep): string {
  const name = table === null ? '' : /^table/i.test(table) ? table : `Table ${table}`;
  const places = [
    clause,
    ...(name === '' || clause.includes(name) ? [] : [name]),
    ...(row === null ? [] : [`row ${row}`]),
  ];
  return places.join(', ');
}

/** The demands that decided, in the order of the trail; more than one where equal sizes are asked. */
export const governing = ({ trail }: Pick<ResultPipe, 'trail'>): readonly TrailStep[] =>
  trail.filter(({ governs }) => governs);

/** Their clauses, each once. */
export const governingClauses = (pipe: Pick<ResultPipe, 'trail'>): readonly string[] => [
  ...new Set(governing(pipe).map(({ clause }) => clause)),
];

const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);
