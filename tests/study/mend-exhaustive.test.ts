import { describe, expect, test } from 'vitest';
import { noAnswers } from '../../src/model/answers.ts';
import type { ElementId } from '../../src/model/model.ts';
import { type Piping, run, runNetwork } from '../../src/pipeline.ts';
import { withSize } from '../../src/study/edits.ts';
import { costsOf } from '../../src/study/mend/costs.ts';
import { itemsOf } from '../../src/study/mend/items.ts';
import { mend } from '../../src/study/mend/mend.ts';
import { sceneOf } from '../../src/study/mend/scene.ts';
import { standardWeights } from '../../src/study/mend/weights.ts';
import { pipingOf } from '../../src/study/piping-of.ts';
import { type NominalSize, nominalSize } from '../../src/units/nominal-size.ts';
import type { Outcome } from '../../src/verdicts/outcome.ts';
import { elementIdOf, modelOf } from '../support/model-of.ts';
import { codeOf, names } from '../support/run-sketch.ts';
import { sketch } from '../support/sketch.ts';

// Every combination of the known changes and of sizes for every pipe, each run through all stages: no tables, no bounds
// and no cleverness of the search. Nothing cheaper than what `mend` finds may come out of it.

const code = codeOf('npc-2020');

/** Three urinals in a row under a floor, a wet vent at the head, a drop to the drain. */
const row = (line: string, drop: string, vent: string): string => `
model "Three urinals"
storey "Ground floor" at 0
node J1 at 0 0 -0.4
drain ${line}: J1 > J2 (east 0.7 fall 1:50) > J3 (east 0.7 fall 1:50)
drain ${drop}: J3 > F1 (east 0.6 fall 1:50) > F2 (to -1.2)
drain 4 in: F2 > OUT (east 6 fall 1:50)
trap T1 from J1 south 0.3 rise 1:50
trap T2 from J2 south 0.3 rise 1:50
trap T3 from J3 south 0.3 rise 1:50
urinal F.1 from T1 to 0, stall, trap 2 in
urinal F.2 from T2 to 0, stall, trap 2 in
urinal F.3 from T3 to 0, stall, trap 2 in
drain 2 in: F.1 > T1 > J1
drain 2 in: F.2 > T2 > J2
drain 2 in: F.3 > T3 > J3
${vent}
sewer OUT
roof "Roof" from -2 -2 to 9 2 top 3 thick 0.2
`;

/** A lavatory and a shower on one drain with a vent each, one of them to be left out. */
const pair = (size: string, vents: string, fall = '1:50'): string => `
model "Lavatory and shower"
storey "Ground floor" at 0
node J1 at 0 0 -0.3
drain ${size}: J1 > J2 (east 0.8 fall ${fall})
drain 3 in: J2 > M (east 1 fall 1:50) > OUT (east 3 fall 1:50)
node V1 from J1 south 0.4 rise 1:50
trap T1 from V1 south 0.3 rise 1:50
node V2 from J2 south 0.4 rise 1:50
trap T2 from V2 south 0.3 rise 1:50
lavatory L from T1 to 0, trap 1 1/4 in
shower S from T2 to 0, trap 1 1/2 in
drain 1 1/2 in: L > T1 > V1 > J1
drain 1 1/2 in: S > T2 > V2 > J2
${vents}
sewer OUT
roof "Roof" from -2 -2 to 7 2 top 3 thick 0.2
`;

interface Small {
  readonly name: string;
  readonly text: string;
  /** Pipes whose sizes are tried, all others stay as they are drawn. */
  readonly pipes: readonly string[];
  /** Changes besides sizes that are combined. */
  readonly depth: number;
}

const networks: readonly Small[] = [
  {
    name: 'a wet vent one size too small, and the drop below it',
    text: row('1 1/2 in', '1 1/2 in', 'vent 3 in: J1 > VT (to 3.6)\nterminal VT'),
    pipes: ['J1-J2', 'J2-J3', 'J3-F1', 'F1-F2', 'F2-OUT'],
    depth: 1,
  },
  {
    name: 'a pipe larger than the one below it',
    text: row('3 in', '2 in', 'vent 3 in: J1 > VT (to 3.6)\nterminal VT'),
    pipes: ['J1-J2', 'J2-J3', 'J3-F1', 'F1-F2', 'F2-OUT'],
    depth: 1,
  },
  {
    name: 'a row that no vent serves',
    text: row('2 in', '2 in', 'vent 3 in: F1 > VT (to 3.6)\nterminal VT'),
    pipes: ['J1-J2', 'J2-J3', 'J3-F1', 'F1-F2'],
    depth: 2,
  },
  {
    name: 'both vents left out',
    text: pair('1 1/2 in', 'vent 3 in: M > VT (to 3.6)\nterminal VT'),
    pipes: ['J1-J2', 'J2-M', 'V1-J1', 'M-VT'],
    depth: 2,
  },
  {
    name: 'a flat drain and a small vent',
    text: pair(
      '1 1/4 in',
      'vent 1 1/4 in: V1 > VX (to 3.6)\nterminal VX\nvent 1 1/4 in: V2 > VT (to 3.6)\nterminal VT',
      '1:150',
    ),
    pipes: ['J1-J2', 'V1-VX', 'V2-VT'],
    depth: 2,
  },
  {
    name: 'up to eight changes: six pipes, one of them too small, a vent left out and a flat drain',
    text: pair('1 1/4 in', 'vent 1 1/4 in: V2 > VT (to 3.6)\nterminal VT', '1:150'),
    pipes: ['J1-J2', 'V1-J1', 'V2-J2', 'T2-V2', 'J2-M', 'V2-VT'],
    depth: 2,
  },
];

const sizes = ['1¼ in', '1½ in', '2 in', '2½ in', '3 in', '4 in'].map(nominalSize);
const errors = ({ findings }: Outcome): number => findings.filter(({ severity }) => severity === 'error').length;

/** The building after every combination of at most `depth` changes, each with what they cost. */
function combinations(first: Outcome, depth: number): { piping: Piping; outcome: Outcome; cost: number }[] {
  const costs = costsOf(first, standardWeights);
  const all = [{ piping: pipingOf(first), outcome: first, cost: 0, keys: '' }];
  const seen = new Set(['']);
  let last = all;
  for (let step = 0; step < depth; step++) {
    last = last.flatMap((state) =>
      itemsOf(sceneOf(state.outcome, costs)).flatMap(({ options }) =>
        options.flatMap(({ key, cost, change }) => {
          const keys = [...state.keys.split('\n'), key].sort().join('\n');
          if (change === null || seen.has(keys)) return [];
          seen.add(keys);
          const piping = change.apply(state.piping);
          return [{ piping, outcome: runNetwork(piping), cost: state.cost + cost, keys }];
        }),
      ),
    );
    all.push(...last);
  }
  return all;
}

/** The least cost over every choice of sizes, two up and one down, that leaves no error; Infinity where none does. */
function leastOver(first: Outcome, piping: Piping, cost: number, pipes: readonly ElementId[], most: number) {
  const costs = costsOf(first, standardWeights);
  const drawn = (pipe: ElementId): NominalSize =>
    first.shown.loads.modelled[first.network.pipesOf.get(pipe)![0]!]!.size!;
  let least = most;
  let tried = 0;
  const choose = (given: Piping, at: number, sum: number): void => {
    if (sum >= least - 1e-9) return;
    const pipe = pipes[at];
    if (pipe === undefined) {
      tried++;
      if (errors(runNetwork(given)) === 0) least = sum;
      return;
    }
    const place = sizes.indexOf(drawn(pipe));
    for (const size of sizes.slice(Math.max(0, place - 1), place + 4))
      choose(withSize(given, pipe, size), at + 1, sum + costs.resize(pipe, drawn(pipe), size));
  };
  choose(piping, 0, cost);
  return { least, tried };
}

describe.each(networks)('$name', ({ text, pipes, depth }) => {
  test('nothing cheaper comes out of every combination', () => {
    const drawing = sketch(text);
    const first = run(modelOf(drawing), code, noAnswers, names);
    expect(errors(first)).toBeGreaterThan(0);
    const plan = mend(first, standardWeights);
    expect({ left: plan.left.length, exact: plan.exact }).toEqual({ left: 0, exact: true });
    const elements = pipes.map((name) => elementIdOf(drawing, name));
    const states = combinations(first, depth);
    let least = Number.POSITIVE_INFINITY;
    let tried = 0;
    for (const { piping, cost } of states) {
      // Only what costs less than the plan is of interest, and the plan itself must come out again.
      const bound = Math.min(least, plan.cost + 1e-6);
      const found = leastOver(first, piping, cost, elements, bound);
      tried += found.tried;
      if (found.least < bound) least = found.least;
    }
    expect(tried).toBeGreaterThan(2);
    expect(least).toBeCloseTo(plan.cost, 6);
  });
});
