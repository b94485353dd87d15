import { describe, expect, test } from 'vitest';
import { modelOf } from '../support/model-of.ts';
import { runModel, runSketch } from '../support/run-sketch.ts';
import { sketch } from '../support/sketch.ts';

// Models as they come: sizes that speak against each other, no storeys, a sink with two wastes, codes in place of names.
const piping = (more = '', storey = 'storey "Ground floor" at 0'): string => `
${storey}
node A at 0 0 -0.3
node J from A to 0.4
node T from J south 0.15 rise 1:50
lavatory L from T up 0.2, trap 1 1/4 in
trap T
drain 1 1/4 in: L > T > J > A
drain 3 in: A > B (east 2 fall 1:50) > S (east 4 fall 1:50)
sewer S
vent 1 1/4 in: J > V (to 5)
terminal V
${more}
`;

describe('what tells a size', () => {
  const model = modelOf(sketch(piping()));
  const said = (change: (sizes: (typeof model.elements)[number]['sizes']) => typeof sizes) =>
    runModel({
      ...model,
      elements: model.elements.map((element) =>
        element.name === 'A-B' ? { ...element, sizes: change(element.sizes) } : element,
      ),
    });
  const named = { means: 'unknown', mm: null, text: 'DN 100', ground: 'name', from: 'type name' } as const;

  test('a property against a name: the property counts, and the contradiction is told', () => {
    const run = said((sizes) => [...sizes, named]);
    expect(run.pipe('A-B').modelled?.label).toBe('3 in');
    const [finding, ...more] = run.findings('size-contradicted');
    expect(more).toEqual([]);
    expect(finding).toMatchObject({ severity: 'warning', about: [run.pipe('A-B').globalId] });
    expect(finding!.sentence).toBe(
      'A-B is 3 in by Pset_PipeSegmentTypeCommon.NominalDiameter but 4 in by type name; the first is used.',
    );
  });
  test('a property against what is drawn: 4 in pipe stated as 3 in', () => {
    const drawnWide = said((sizes) => sizes.map((size) => (size.means === 'outer' ? { ...size, mm: 114.3 } : size)));
    expect(drawnWide.findings('size-contradicted')[0]!.sentence).toContain('but 4 in by profile');
  });
  test('all alike: nothing is told', () => {
    expect(said((sizes) => [...sizes, { ...named, text: '3"' }]).findings('size-contradicted')).toEqual([]);
  });
});

describe('a model without storeys', () => {
  const stack = `
node UP from A to 6.5
node TU from UP west 0.3 rise 1:50
node TV from UP east 0.3 rise 1:50
sink X1 from TU up 0.3, trap 1 1/2 in
sink X2 from TV up 0.3, trap 1 1/2 in
trap TU
trap TV
drain 1 1/2 in: X1 > TU > UP
drain 1 1/2 in: X2 > TV > UP
drain 2 in: UP > A
vent 2 in: UP > W (to 12)
terminal W`;
  test('counts one for each 3 m, and says so', () => {
    const run = runSketch(piping(stack, ''));
    expect(run.findings('storeys-assumed')).toMatchObject([{ severity: 'note', facts: { heightM: 3 } }]);
    expect([run.role('UP-A'), run.size('UP-A')]).toEqual(['stack', '2 in']);
    expect(runSketch(piping(stack)).findings('storeys-assumed')).toEqual([]);
  });
});

describe('a sink with two wastes', () => {
  const sink = `
sink X at 1 0.6 0.6, trap 1 1/2 in
node W1 at 1 0.6 0.4
node W2 at 1.3 0.6 0.42
node Y from W1 over A2
node A2 from A east 1 fall 1:50
drain 1 1/2 in: X > W1 > Y > A2
drain 1 1/2 in: X > W2 > W1`;
  test('is told: one way is sized, the other named', () => {
    const run = runSketch(
      piping(sink).replace('A > B (east 2 fall 1:50)', 'A > A2\ndrain 3 in: A2 > B (from A east 2 fall 1:50)'),
    );
    const [finding, ...more] = run.findings('double-water-path');
    expect(more).toEqual([]);
    expect(finding).toMatchObject({ severity: 'warning', facts: { ways: 2 } });
    expect(finding!.about[0]).toBe(run.fixture('X').globalId);
    expect(run.fixture('X').waterPath!.length).toBeGreaterThan(2);
  });
  test('a fixture with one waste, or a floor drain that takes water from another, is not', () => {
    expect(runSketch(piping()).findings('double-water-path')).toEqual([]);
  });
});
