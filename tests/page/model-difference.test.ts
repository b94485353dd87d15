import { expect, test } from 'vitest';
import { pageData } from '../../src/deliver/page-data.ts';
import type { Vec3 } from '../../src/geometry/vector.ts';
import type { Element, Model } from '../../src/model/model.ts';
import { buildingOf } from '../../src/page/building.ts';
import { modelDifference } from '../../src/page/model-difference.ts';
import { sampleOutcome } from '../support/sample-outcomes.ts';

// What is changed here is what must be told, and nothing else.
const { outcome, result } = sampleOutcome('school');
const source = { ...outcome, paths: { ...outcome.paths, traps: outcome.shown.roles.air } };
const building = buildingOf(pageData(result, source));
const { model } = outcome;
const named = (name: string): Element => model.elements.find((element) => element.name === name)!;
const changed = (name: string, change: (element: Element) => Element): Model => ({
  ...model,
  elements: model.elements.map((element) => (element === named(name) ? change(element) : element)),
});
const shifted =
  (by: number) =>
  (element: Element): Element => ({
    ...element,
    box:
      element.box === null
        ? null
        : {
            min: element.box.min.map((x) => x + by) as unknown as Vec3,
            max: element.box.max.map((x) => x + by) as unknown as Vec3,
          },
    centreLine:
      element.centreLine === null
        ? null
        : {
            ...element.centreLine,
            points: element.centreLine.points.map(([x, y, z]): Vec3 => [x + by, y + by, z + by]),
          },
  });
const told = (other: Model) => {
  const { missing, moved, resized, elements } = modelDifference(building, other);
  const names = (rows: typeof moved): (string | null)[] =>
    rows.map(({ is, row }) => (is === 'pipe' ? result.pipes : result.fixtures)[row]!.name);
  return {
    missing: names(missing!),
    moved: names(moved),
    resized: names(resized),
    more: elements.here - elements.page,
  };
};
const nothing = { missing: [], moved: [], resized: [], more: 0 };

test.each([
  ['the same model', model, nothing],
  ['rounding by a millimetre', changed('S4.D0-S4.SU', shifted(0.001)), nothing],
  ['a pipe moved by a centimetre', changed('S4.D0-S4.SU', shifted(0.01)), { ...nothing, moved: ['S4.D0-S4.SU'] }],
  ['a fixture moved by a metre', changed('S4.U1', shifted(1)), { ...nothing, moved: ['S4.U1'] }],
  [
    'a pipe drawn wider',
    changed('S4.D0-S4.SU', (element) => ({
      ...element,
      centreLine: { ...element.centreLine!, outerDiameter: 0.1143 as never },
    })),
    { ...nothing, resized: ['S4.D0-S4.SU'] },
  ],
  [
    'a pipe taken out',
    { ...model, elements: model.elements.filter((element) => element !== named('S4.D0-S4.SU')) },
    { ...nothing, missing: ['S4.D0-S4.SU'], more: -1 },
  ],
  [
    'an element added',
    { ...model, elements: [...model.elements, { ...named('S4.U1'), globalId: '0000000000000000000001' }] },
    { ...nothing, more: 1 },
  ],
] as const)('%s', (_, other, expected) => {
  expect(told(other)).toEqual(expected);
});
