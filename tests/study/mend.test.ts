import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import type { Vec3 } from '../../src/geometry/vector.ts';
import { noAnswers } from '../../src/model/answers.ts';
import { run } from '../../src/pipeline.ts';
import { mendResult } from '../../src/schedule/mend-result.ts';
import { mendText } from '../../src/schedule/mend-text.ts';
import { resultOf } from '../../src/schedule/result-of.ts';
import { plainText } from '../../src/schedule/text-line.ts';
import { costsOf } from '../../src/study/mend/costs.ts';
import { mend } from '../../src/study/mend/mend.ts';
import { standardWeights } from '../../src/study/mend/weights.ts';
import { nominalSize } from '../../src/units/nominal-size.ts';
import type { Outcome } from '../../src/verdicts/outcome.ts';
import { carryOut } from '../support/carry-out.ts';
import { elementIdOf, modelOf } from '../support/model-of.ts';
import { codeOf, names, runModel } from '../support/run-sketch.ts';
import { faults } from '../support/schemas.ts';
import { type Sketch, sketch } from '../support/sketch.ts';

// A plan may cost no more than undoing what was broken, by the same weights; it is the cheapest there is of the known
// changes; and the drawing on which somebody carries it out has no error.

const sample = (name: string): string =>
  readFileSync(join(import.meta.dirname, `../../sample-models/${name}.piping`), 'utf8');
const dwelling = sample('dwelling');
const group = sample('bathroom-group');
const hall = sample('hall-circuit-vented');
const core = sample('five-storey-core');
const sports = sample('sports-hall');
/** The school with the relief vent that its sample lacks. */
const school = sample('school').replace(
  'place washroom as S4 at 0 0 10.2\n',
  'place washroom as S4 at 0 0 10.2\nplace relief as S4 at 0 0 10.2\n',
);

/** What puts the model back: a size, a vent along nodes of the sound drawing, a pipe laid as it was. */
type Undo =
  | { readonly size: string; readonly from: string; readonly to: string }
  | { readonly vent: readonly string[]; readonly roof?: boolean }
  | { readonly fall: readonly string[] };

interface Breakage {
  readonly name: string;
  readonly sound: string;
  readonly edits: readonly (readonly [string, string])[];
  readonly undo: readonly Undo[];
  /** Words that the plan must hold. */
  readonly says: readonly string[];
}

const flatBranch: readonly [string, string] = ['node KE from KB east 2 rise 1:50', 'node KE from KB east 2 rise 1:200'];
const smallStack: readonly [string, string] = ['drain 3 in: S2 > S1\n', 'drain 2 in: S2 > S1\n'];

const breakages: readonly Breakage[] = [
  {
    name: 'a stack drawn one pipe too small',
    sound: dwelling,
    edits: [smallStack],
    undo: [{ size: 'S2-S1', from: '2 in', to: '3 in' }],
    says: ['S2-S1 from 2 in to 3 in'],
  },
  {
    name: 'a stack pipe drawn larger than what is below it',
    sound: dwelling,
    edits: [['drain 3 in: S2 > S1\n', 'drain 4 in: S2 > S1\n']],
    undo: [{ size: 'S2-S1', from: '4 in', to: '3 in' }],
    says: ['S2-S1 from 4 in to 3 in'],
  },
  {
    name: 'relief vents of two storeys forgotten',
    sound: school,
    edits: [
      ['place relief as S2 at 0 0 3.4\n', ''],
      ['place relief as S4 at 0 0 10.2\n', ''],
    ],
    undo: [{ vent: ['S2.RV', 'S2.VJ'] }, { vent: ['S4.RV', 'S4.VJ'] }],
    says: ['New relief vent'],
  },
  {
    name: 'the relief vent of the hall left out',
    sound: hall,
    edits: [
      [
        'vent 1 1/2 in: RV > RT (to 2.5) > VJ (over LJ rise 1:100)\nvent 1 1/2 in: LJ > VJ > VT1 (to 3.9)',
        'vent 1 1/2 in: LJ > VT1 (to 3.9)',
      ],
    ],
    undo: [{ vent: ['RV', 'RT', 'VJ'] }],
    says: ['New relief vent'],
  },
  {
    name: 'a bathroom without its vent',
    sound: group,
    edits: [['vent 1 1/2 in: LJ > LT (to 4.1) > SV (over ST rise 1:100)\n', 'node SV from ST to 4.11\n']],
    undo: [{ vent: ['LJ', 'LT', 'SV'] }],
    says: ['New continuous vent'],
  },
  {
    name: 'a branch laid too flat and a vent one size too small',
    sound: dwelling,
    edits: [flatBranch, ['vent 1 1/2 in: CJ > CT', 'vent 1 1/4 in: CJ > CT']],
    undo: [
      { fall: ['KE-KB'] },
      { size: 'CJ-CT', from: '1¼ in', to: '1½ in' },
      { size: 'CT-KV', from: '1¼ in', to: '1½ in' },
    ],
    says: ['KE-KB, now 0.5 % (1:200), laid to 2 % (1:50)'],
  },
  {
    name: 'all vents end under the roof',
    sound: dwelling,
    edits: [['SV2 > VT (to 6.1)\nterminal VT', 'SV2 > VT (to 5)']],
    undo: [{ vent: ['SV2', 'VT'], roof: true }],
    says: ['SV2-VT goes on', 'through the roof to open air'],
  },
  {
    name: 'no vent stack, and a length of the riser too small',
    sound: core,
    edits: [
      ['vent 3 in: VF > V0 > A1.VA > A2.VA', 'vent 3 in: A1.VA > A2.VA'],
      ['vent 3 in: A4.VA > B4.VB > A5.VA', 'vent 2 in: A4.VA > B4.VB > A5.VA'],
    ],
    undo: [
      { vent: ['VF', 'V0', 'A1.VA'] },
      { size: 'A4.VA-B4.VB', from: '2 in', to: '3 in' },
      { size: 'B4.VB-A5.VA', from: '2 in', to: '3 in' },
    ],
    says: ['New vent stack'],
  },
  {
    name: 'a powder room without a vent, a small stack and a flat branch',
    sound: dwelling,
    edits: [
      ['vent 1 1/2 in: PJ > PT (to 1.25) > PR (west 1.6 rise 1:100) > VP > VJ\n', ''],
      ['node VP from PR to 3.95\n', ''],
      smallStack,
      flatBranch,
    ],
    undo: [{ vent: ['PJ', 'PT', 'PR', 'VP', 'VJ'] }, { size: 'S2-S1', from: '2 in', to: '3 in' }, { fall: ['KE-KB'] }],
    says: ['New individual vent', 'S2-S1', 'KE-KB, now 0.5 % (1:200), laid to 2 % (1:50)'],
  },
  {
    name: 'the one large vent drawn small',
    sound: sports,
    edits: [['vent 3 in: VF > VT', 'vent 1 1/2 in: VF > VT']],
    undo: [{ size: 'VF-VT', from: '1½ in', to: '3 in' }],
    says: ['VF-VT from 1½ in to 3 in'],
  },
  {
    name: 'a closet’s drain that climbs',
    sound: dwelling,
    edits: [['node QB from QJ south 0.32 rise 1:50', 'node QB from QJ south 0.32 fall 1:50']],
    undo: [{ fall: ['QB-QJ'] }],
    says: ['QB-QJ, now -2 %', 'laid to 2 % (1:50)'],
  },
  {
    name: 'circuit vents that start a fixture too late, on every storey',
    sound: school,
    edits: [
      ['node CT from CV to 1.3', 'node CT from J2 to 1.3'],
      ['vent 2 in: CV > CT', 'vent 2 in: J2 > CT'],
    ],
    undo: [1, 2, 3, 4].map((storey) => ({ vent: [`S${storey}.CV`, `S${storey}.CT`] })),
    says: ['moved'],
  },
];

const code = codeOf('npc-2020');
const outcomeOf = (drawing: Sketch): Outcome => run(modelOf(drawing), code, noAnswers, names);
const errorsOf = ({ findings }: { findings: readonly { severity: string; code: string }[] }): string[] =>
  findings.flatMap(({ severity, code: what }) => (severity === 'error' ? [what] : []));

function broken({ sound, edits }: Breakage): Sketch {
  const text = edits.reduce((drawing, [from, to]) => {
    expect(drawing, `the drawing has ${from}`).toContain(from);
    return drawing.replaceAll(from, to);
  }, sound);
  return sketch(text);
}

/** Undoing costs what the same weights give for it. */
function undoCost({ sound, undo }: Breakage, drawing: Sketch, outcome: Outcome): number {
  const costs = costsOf(outcome, standardWeights);
  const { nodes } = sketch(sound);
  const at = (node: string): Vec3 => nodes.get(node)!.at;
  return undo.reduce((sum, one) => {
    if ('size' in one)
      return sum + costs.resize(elementIdOf(drawing, one.size), nominalSize(one.from), nominalSize(one.to));
    if ('vent' in one) return sum + costs.vent(one.vent.map(at), one.roof === true ? 1 : 2, one.roof === true);
    return (
      sum +
      costs.relay(
        outcome,
        one.fall.flatMap((name) => outcome.network.pipesOf.get(elementIdOf(drawing, name))!),
      )
    );
  }, 0);
}

describe.each(breakages)('$name', (breakage) => {
  const drawing = broken(breakage);
  const outcome = outcomeOf(drawing);
  const plan = mend(outcome, standardWeights);
  const result = resultOf(outcome, '0.0.0');
  const published = mendResult(plan, result);

  test('the sound drawing has no error, the broken one has', () => {
    expect(errorsOf(outcomeOf(sketch(breakage.sound)))).toEqual([]);
    expect(errorsOf(outcome)).not.toEqual([]);
  });
  test('the plan leaves no error, by the run of all stages on the changed building', () => {
    expect(errorsOf(plan.last)).toEqual([]);
    expect(published.after.errors).toBe(0);
    expect(published.before.errors).toBe(errorsOf(outcome).length);
  });
  test('it costs no more than undoing the breakage, and its parts add up', () => {
    expect(plan.cost).toBeLessThanOrEqual(undoCost(breakage, drawing, outcome) + 0.005);
    expect(plan.steps.reduce((sum, { cost }) => sum + cost, 0)).toBeCloseTo(plan.cost, 6);
    expect(plan.exact).toBe(true);
  });
  test('the drawing on which it is carried out passes the check', () => {
    const done = carryOut(drawing, published);
    expect(errorsOf(runModel(modelOf(done.sketch), { answers: done.answers }).result)).toEqual([]);
  });
  test('it is valid, and a person is told what to do', () => {
    expect(faults('mend', published)).toEqual([]);
    const text = plainText(mendText(published, result)).replaceAll(/\s+/g, ' ');
    for (const words of breakage.says) expect(text).toContain(words);
    expect(text).toContain('no error is left');
  });
});

test('twelve models were broken', () => expect(breakages).toHaveLength(12));
