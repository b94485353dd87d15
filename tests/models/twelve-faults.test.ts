import { describe, expect, test } from 'vitest';
import type { FindingCode } from '../../src/findings/finding.ts';
import type { Result } from '../../src/schedule/result.ts';
import { withoutPorts } from '../support/model-twins.ts';
import { runModel } from '../support/run-sketch.ts';
import { sampleOutcome } from '../support/sample-outcomes.ts';

const { outcome, result } = sampleOutcome('twelve-faults');
const nameOf = new Map(outcome.model.elements.map(({ globalId, name }) => [globalId, name ?? '?']));
const toldBy = ({ findings }: Result) =>
  findings.map(({ code, severity, about }) => ({
    code,
    severity,
    about: about.map((id) => nameOf.get(id) ?? id).sort(),
  }));
const told = toldBy(result);

// The faults as sample-models/twelve-faults.piping plants them, with all the elements that each is about.
const planted: readonly (readonly [string, FindingCode, readonly string[]])[] = [
  ['the bend that is missing', 'open-end', ['F2-A2', 'J2-F2']],
  ['the gap', 'open-end', ['F3-GA', 'GB-A3']],
  ['the ports the wrong way', 'joint-contradicted', ['A4', 'F4', 'F4-A4']],
  ['the pipe drawn twice', 'doubled-element', ['F5-A5', 'F5-A5 double']],
  ['the pipe laid uphill', 'backfall', ['F6-P6']],
  ['the wrong system', 'wrong-system', ['P7-Q7']],
  ['the pipe without a size', 'size-unknown', ['P8-Q8']],
  ['the size in a name only', 'size-from-name', ['P9-Q9']],
  ['the fixture of unknown kind', 'fixture-unidentified', ['X10']],
  ['the dead end', 'dead-end', ['DE-A11']],
  ['the loop', 'loop', ['LA-A12', 'LA-LB', 'LB-A13']],
  ['the vent that ends in the ceiling', 'no-open-air', ['F13-V13', 'V13-C13']],
];

describe('twelve planted faults', () => {
  test.each(planted)('%s is told once, on its own elements', (_, code, about) => {
    expect(told.filter((one) => one.code === code && one.about.join() === about.join())).toHaveLength(1);
  });

  const isPlanted = ({ code, about }: (typeof told)[number]): boolean =>
    planted.some(([, fault, where]) => fault === code && where.join() === about.join());

  test('no other error and no other warning', () => {
    expect(told.filter(isPlanted)).toHaveLength(12);
    expect(told.filter((one) => !isPlanted(one) && one.severity !== 'note')).toEqual([]);
  });

  test('noted besides, pipes wider than they need be apart: where the two branches that are broken off end', () => {
    const notes = told.filter((one) => !isPlanted(one) && one.code !== 'oversized');
    expect(notes.map(({ code, about }) => `${code} ${about.join()}`)).toEqual([
      'sewer-end-assumed F3-GA',
      'sewer-end-assumed J2-F2',
    ]);
  });

  // Of the thirteen fixtures two drain no farther than where their branch is broken off.
  test('what lies round the faults is whole: all fixtures drain, and eleven of them to the sewer', () => {
    expect(result.systems.map(({ fixtures }) => fixtures)).toEqual([11, 1, 1]);
    expect(result.fixtures.filter(({ ventedBy }) => ventedBy.how === 'unvented')).toEqual([]);
  });

  test('without any port geometry finds the same, but for the ports that stood the wrong way', () => {
    const bare = toldBy(runModel(withoutPorts(outcome.model)).result);
    expect(bare.filter(isPlanted).map(({ code }) => code)).toEqual(
      told.filter((one) => isPlanted(one) && one.code !== 'joint-contradicted').map(({ code }) => code),
    );
    expect(bare.filter((one) => !isPlanted(one) && one.severity !== 'note')).toEqual([]);
  });
});
