import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { PipeId } from '../../src/network/network.ts';
import { type Riser, risersOf } from '../../src/schedule/riser.ts';
import { riserDrawing } from '../../src/schedule/riser-drawing.ts';
import {
  type LabelBox,
  lineMeetsBox,
  overlap,
  type PlacedRiser,
  placeRiserLabels,
} from '../../src/schedule/riser-labels.ts';
import { symbolSize } from '../../src/schedule/riser-symbols.ts';
import { svgText } from '../../src/schedule/svg-shape.ts';
import { communityHall } from '../support/community-hall.ts';
import { examplePage } from '../support/example-page.ts';
import { sampleOutcome } from '../support/sample-outcomes.ts';
import { samples } from '../support/samples.ts';

const place = (riser: Riser): PlacedRiser =>
  placeRiserLabels(riser, {
    run: ({ role, undersized }) => [
      ...(role === null ? [] : [role]),
      undersized ? '▲ 3 in → 4 in' : '1½ in',
      '16 FU · 2 % (1:50)',
    ],
    floor: ({ name }) => name ?? 'Storey',
  });

/** Pairs that share ground: label with label, with a pipe, with a fixture's symbol. */
function collisions(riser: Riser, { labels }: PlacedRiser): readonly string[] {
  const symbols: LabelBox[] = riser.symbols
    .filter(({ is }) => is === 'fixture')
    .map(({ at }) => ({ x: at[0] - symbolSize / 2, y: at[1] - symbolSize, width: symbolSize, height: symbolSize }));
  return labels.flatMap(({ box, texts }, at) => [
    ...labels.slice(at + 1).flatMap((other) => (overlap(box, other.box) ? [`${texts[0]} over ${other.texts[0]}`] : [])),
    ...symbols.flatMap((symbol) => (overlap(box, symbol) ? [`${texts[0]} over a fixture`] : [])),
    ...riser.lines.flatMap(({ points, section }) =>
      points
        .slice(1)
        .flatMap((b, before) => (lineMeetsBox(points[before]!, b, box) ? [`${texts[0]} on pipe ${section}`] : [])),
    ),
  ]);
}

// The school's own heading: storeys 2 and 3 are drawn alike; 1 has the mop sink's line beside it, 4 no relief vent.
test('the school folded: storey 3 is named on storey 2, nothing of it but what runs through is drawn', () => {
  const { outcome, result } = sampleOutcome('school');
  const [whole, ...others] = risersOf(result, outcome);
  expect(others).toEqual([]);
  const folded = whole!.folded!;
  const names = new Map(folded.floors.map(({ name, like, also }) => [name, { like, also }]));
  expect(Object.fromEntries(names)).toEqual({
    'Storey 1': { like: undefined, also: undefined },
    'Storey 2': { like: undefined, also: [2] },
    'Storey 3': { like: 1, also: undefined },
    'Storey 4': { like: undefined, also: undefined },
  });
  const drawn = new Set(folded.lines.map(({ pipe }) => pipe));
  const gone = whole!.lines.flatMap(({ pipe }) => (pipe < 0 || drawn.has(pipe) ? [] : [result.pipes[pipe]!]));
  expect(gone.length).toBeGreaterThan(50);
  expect(new Set(gone.map(({ storey }) => storey))).toEqual(new Set(['Storey 3']));
  expect(gone.filter(({ role }) => role === 'stack' || role === 'vent-stack')).toEqual([]);
  // A storey of the school: eight urinals, four lavatories, six closets.
  const fixtures = ({ symbols }: Riser): number => symbols.filter(({ is }) => is === 'fixture').length;
  expect(fixtures(whole!) - fixtures(folded)).toBe(18);
});

test('one pipe more, one size other, and the storeys are not alike', () => {
  const { outcome, result } = sampleOutcome('school');
  const pipes = result.pipes.map((pipe) =>
    pipe.name === 'S3.J2-S3.J3' ? { ...pipe, verdict: 'oversized' as const } : pipe,
  );
  expect(pipes.filter(({ verdict }) => verdict === 'oversized').length).toBe(
    result.pipes.filter(({ verdict }) => verdict === 'oversized').length + 1,
  );
  expect(risersOf({ ...result, pipes }, outcome)[0]!.folded).toBeUndefined();
});

describe('risers of the sample models', () => {
  test.each(samples)('$name: every pipe and fixture drawn, no label on anything', ({ name }) => {
    const { outcome, result } = sampleOutcome(name);
    const risers = risersOf(result, outcome);
    expect(risers.length).toBeGreaterThan(0);
    const drawn = new Set(risers.flatMap(({ lines }) => lines.map(({ section }) => section)));
    const drains = outcome.network.pipes.filter(({ id, points }) => outcome.paths.wet[id] === true && points !== null);
    expect(drains.length).toBeGreaterThan(5);
    expect(drains.filter(({ id }) => !drawn.has(id))).toEqual([]);
    const fixtures = risers.flatMap(({ symbols }) => symbols.filter(({ is }) => is === 'fixture'));
    expect(fixtures).toHaveLength(result.fixtures.length);
    for (const riser of risers.flatMap((whole) => [whole, ...(whole.folded === undefined ? [] : [whole.folded])])) {
      const placed = place(riser);
      expect(placed.labels.length).toBeGreaterThanOrEqual(riser.runs.length);
      expect(collisions(riser, placed)).toEqual([]);
    }
  });
});

test('pipes that meet in the model meet on the drawing', () => {
  const { outcome, result } = sampleOutcome('five-storey-core');
  const ends = new Map<number, Set<string>>();
  for (const { lines } of risersOf(result, outcome))
    for (const { section, points } of lines) {
      const pipe = outcome.network.pipes[section]!;
      for (const [end, point] of [
        [pipe.ends[0], points[0]!],
        [pipe.ends[1], points.at(-1)!],
      ] as const)
        ends.set(end, (ends.get(end) ?? new Set()).add(point.join()));
    }
  expect(ends.size).toBeGreaterThan(100);
  expect([...ends.values()].filter((places) => places.size > 1)).toEqual([]);
});

test('an undersized wet vent is said first, vents are dashed, drains are not', () => {
  const example = examplePage(communityHall);
  const [riser] = risersOf(example.result, example);
  const order = riser!.runs.map(({ undersized }) => undersized);
  expect(order.lastIndexOf(true)).toBe(8); // eight pieces of the wet vent and the end of the branch
  expect(order.indexOf(false)).toBe(9);
  expect(riser!.runs.filter(({ role }) => role === 'wet-vent').length).toBeGreaterThan(0);
  const look = (name: string): string | undefined =>
    riser!.lines.find(({ pipe }) => example.result.pipes[pipe]?.name === name)?.look;
  expect([look('Line 3'), look('Riser vent'), look('Stack low')]).toEqual(['both', 'vent', 'drain']);
  const { shapes } = riserDrawing(riser!, place(riser!), {
    looks: { drain: 'drain', vent: 'vent', both: 'both', undersized: 'too small' },
    marks: { cleanout: 'c', 'open-air': 'o', 'admittance-valve': 'a', sewer: 's', 'no-air': 'n' },
    kind: (kind) => kind ?? '?',
  });
  const dashed = shapes.filter(({ attributes }) => String(attributes.class).startsWith('riser-line'));
  expect(dashed.filter(({ attributes }) => attributes['stroke-dasharray'] !== undefined).length).toBe(
    riser!.lines.filter(({ look: how }) => how === 'vent').length,
  );
});

test('the trap that nothing vents is crossed out', () => {
  const example = examplePage(communityHall);
  const [riser] = risersOf(example.result, example);
  const marked = riser!.symbols
    .filter(({ is }) => is === 'no-air')
    .map(({ fixture }) => example.result.fixtures[fixture]!.name);
  expect(marked).toEqual(['Floor drain']);
});

test('hostile names stay words in the file', () => {
  const hostile = '"><script>alert(1)</script>\u0000&';
  const text = svgText(
    [{ tag: 'text', attributes: { class: hostile }, text: hostile }],
    { x: 0, y: 0, width: 10, height: 10 },
    hostile,
  );
  expect(text).not.toContain('<script');
  expect(text).not.toContain('\u0000');
  expect(text.match(/&#60;script&#62;/g)).toHaveLength(3);
});

test('labels find a free place in any crowd of pipes', () => {
  const spot = fc.tuple(fc.integer({ min: 0, max: 300 }), fc.integer({ min: 0, max: 200 }));
  fc.assert(
    fc.property(fc.array(fc.tuple(spot, spot), { minLength: 1, maxLength: 60 }), (stretches) => {
      const lines = stretches.map(([a, b], at) => ({
        section: at as PipeId,
        pipe: at,
        look: 'drain' as const,
        verdict: null,
        width: 2,
        points: [a, b] as const,
      }));
      const riser: Riser = {
        system: 0,
        stack: null,
        lines,
        symbols: [],
        floors: [],
        runs: lines.map(({ section, points }) => ({
          sections: [section],
          section,
          pipe: section,
          role: null,
          undersized: false,
          anchors: [points[0]],
        })),
      };
      const placed = place(riser);
      expect(placed.labels).toHaveLength(lines.length);
      expect(collisions(riser, placed)).toEqual([]);
    }),
    { numRuns: 60 },
  );
});
