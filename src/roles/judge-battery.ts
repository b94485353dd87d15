import type { BatteryFacts, Broken } from '../codes/battery.ts';
import type { PlumbingCode } from '../codes/plumbing-code.ts';
import type { Reading } from '../codes/reading.ts';
import type { Battery, ReadingGround } from './roles.ts';

/** What a row breaks under one reading; null where the code knows no such reading of it. */
export function brokenUnder(code: PlumbingCode, reading: Reading, facts: BatteryFacts): readonly Broken[] | null {
  const rule = code.readings.find((one) => one.reading === reading && applies(one, facts));
  return rule === undefined ? null : rule.broken(facts);
}

const applies = ({ applies: test }: PlumbingCode['readings'][number], facts: BatteryFacts): boolean =>
  test === undefined || test(facts);

/**
 * The reading of a row: the designer's word where it holds; else the only one that holds; of several, a dry relief vent
 * speaks for a circuit vent, else the first in the code's order; where none holds, the one that breaks least.
 * Vents of their own are a reading that only the designer's word or an answer brings.
 */
export function judgeBattery(code: PlumbingCode, facts: BatteryFacts): Battery {
  const judged = code.readings
    .filter((rule) => applies(rule, facts))
    .map(({ reading, broken }) => ({ reading, broken: broken(facts) }));
  const choose = (reading: Reading, why: ReadingGround): Battery => ({
    facts,
    reading,
    why,
    broken: judged.find((one) => one.reading === reading)?.broken ?? [],
    others: judged.filter((one) => one.reading !== reading),
  });
  if (code.readings.length === 1 && judged[0] !== undefined) return choose(judged[0].reading, 'only-known');
  const { word } = facts;
  const holding = judged.filter(({ broken }) => broken.length === 0).map(({ reading }) => reading);
  if (word !== null && holding.includes(word)) return choose(word, 'designer-says');
  const shared = holding.filter((reading) => reading !== 'individual-vent');
  const [first, second] = shared;
  if (first !== undefined && second === undefined) return choose(first, 'only-one-holds');
  if (first !== undefined) {
    const isDry = facts.circuit.relief !== null && facts.circuit.relief.kind !== 'drain';
    if (shared.includes('circuit-vent') && isDry) return choose('circuit-vent', 'dry-relief-vent');
    const isClose = first === 'wet-vent' && second === 'circuit-vent';
    return choose(first, isClose ? 'no-dry-relief-vent' : 'first-that-holds');
  }
  const faulty = judged.filter(({ reading }) => reading !== 'individual-vent');
  const least = Math.min(...faulty.map(({ broken }) => broken.length));
  const tied = faulty.filter(({ broken }) => broken.length === least).map(({ reading }) => reading);
  const [only, other] = tied;
  if (only === undefined) return choose('individual-vent', 'fewer-broken');
  if (other === undefined) return choose(only, 'fewer-broken');
  const spoken = code.whenNoneHolds(facts);
  return choose(tied.includes(spoken) ? spoken : only, 'tie');
}

/** The row read as an answer has it, whatever that breaks. */
export function readAs(battery: Battery, reading: Reading): Battery {
  const chosen = battery.others.find((one) => one.reading === reading);
  if (chosen === undefined) return battery;
  return {
    facts: battery.facts,
    reading,
    why: 'answer',
    broken: chosen.broken,
    others: [
      ...battery.others.filter((one) => one.reading !== reading),
      { reading: battery.reading, broken: battery.broken },
    ],
  };
}
