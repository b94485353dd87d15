import type { Answers } from '../../src/model/answers.ts';

/** Litres a second that a code of 2 units for a US gallon a minute counts as so many units. */
const litresFor = (units: number): number => (units / 2) * (3.785411784 / 60) * (1 - 1e-9);

/** Answers that make named fixtures bring exactly so many units, as a steady flow. */
export const bringing = (units: Readonly<Record<string, number>>): Pick<Answers, 'fixtures'> => ({
  fixtures: new Map(
    Object.entries(units).map(([name, load]) => [`name:${name}`, { detail: { flow: litresFor(load) } }]),
  ),
});
