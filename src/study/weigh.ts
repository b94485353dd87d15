import type { Reading, SharedReading } from '../codes/reading.ts';
import type { Battery } from '../roles/roles.ts';
import type { Outcome } from '../verdicts/outcome.ts';
import { type Attempt, asModelled, type Obstacle } from './attempt.ts';
import { circuitAlternative } from './circuit-alternative.ts';
import { individualAlternative } from './individual-alternative.ts';
import { type Quantities, quantities } from './quantities.ts';
import { type Row, rowOf } from './row.ts';
import { rowScope } from './row-scope.ts';
import { wetAlternative } from './wet-alternative.ts';

/** A battery under each reading, every one built as piping and sized by the same stages. */
export interface Weighing {
  readonly row: Row;
  /** Wet vent, circuit vent, individual vents, in this order; then the modelled reading where it is another. */
  readonly alternatives: readonly Alternative[];
}

export interface Alternative {
  readonly reading: Reading;
  readonly holds: boolean;
  readonly obstacles: readonly Obstacle[];
  /** As built; null where it cannot be built at all. */
  readonly attempt: Attempt | null;
  /** Of what holds, and of what is modelled; null for the rest. */
  readonly quantities: Quantities | null;
}

const readings: readonly SharedReading[] = ['wet-vent', 'circuit-vent', 'individual-vent'];

/** One battery after the other, each when it is asked for. */
export function* weighEach(outcome: Outcome, batteries: readonly Battery[]): Generator<Weighing> {
  for (const battery of batteries) yield weighBattery(outcome, battery);
}

function weighBattery(outcome: Outcome, battery: Battery): Weighing {
  const row = rowOf(outcome, battery);
  const shared = readings.map((reading) => alternative(row, reading));
  const other = readings.some((reading) => reading === battery.reading) ? [] : [modelledAlternative(row)];
  const built = [...shared, ...other];
  const counted = built.filter(({ holds, reading }) => holds || reading === battery.reading);
  const scope = rowScope(
    row,
    counted.flatMap(({ attempt }) => attempt ?? []),
  );
  return {
    row,
    alternatives: built.map((one) => ({
      ...one,
      quantities: one.attempt === null || !counted.includes(one) ? null : quantities(row, one.attempt, scope),
    })),
  };
}

/** A reading that only some codes know is told as it stands: nothing is drawn for it. */
function modelledAlternative(row: Row): Omit<Alternative, 'quantities'> {
  const attempt = asModelled(row);
  const { obstacles } = attempt;
  return { reading: row.battery.reading, holds: obstacles.length === 0, obstacles, attempt };
}

function alternative(row: Row, reading: SharedReading): Omit<Alternative, 'quantities'> {
  if (reading === row.battery.reading) return modelledAlternative(row);
  if (reading !== 'individual-vent' && !row.outcome.code.readings.some((one) => one.reading === reading))
    return { reading, holds: false, obstacles: [notInCode], attempt: null };
  const built = builders[reading](row);
  if ('piping' in built) {
    const { obstacles } = built;
    return { reading, holds: obstacles.length === 0, obstacles, attempt: built };
  }
  return { reading, holds: false, obstacles: built, attempt: null };
}

const notInCode: Obstacle = {
  rule: null,
  clause: null,
  facts: { notInCode: true },
  finding: 'wet-vent-not-allowed',
  about: [],
};

/** Piping, or what stands against it where none can be drawn. */
const builders: Readonly<Record<SharedReading, (row: Row) => Attempt | readonly Obstacle[]>> = {
  'wet-vent': wetAlternative,
  'circuit-vent': circuitAlternative,
  'individual-vent': individualAlternative,
};
