import { describe, expect, test } from 'vitest';
import type { SystemId } from '../../src/model/model.ts';
import { buildNetwork } from '../../src/network/build-network.ts';
import { body, type DrawnPart, drawn, joinsOf, pipe } from '../support/drawn.ts';

describe('what the network says', () => {
  const findingsOf = (parts: readonly DrawnPart[], connected: Parameters<typeof drawn>[1] = []) => {
    const drawing = drawn(parts, connected);
    const { value, findings } = buildNetwork(drawing.model, drawing.identities);
    const told = findings.map(({ code, about, facts }) => ({
      code,
      about: about.map((id) => drawing.model.elements[id]!.name),
      facts,
    }));
    return { told, joints: joinsOf(drawing, value), value };
  };
  const port = (at: DrawnPart['origin'], direction: 'source' | 'sink') => ({ at: at ?? null, direction });

  test('a pipe whose ports stand the wrong way round is one contradiction, the pipe first', () => {
    const through = (name: string, from: number, to: number, turned = false) =>
      pipe(name, `${from} 0 0 > ${to} 0 0`, {
        ports: [port([from, 0, 0], turned ? 'source' : 'sink'), port([to, 0, 0], turned ? 'sink' : 'source')],
      });
    const { told } = findingsOf(
      [through('A', 0, 2), through('B', 2, 4, true), through('C', 4, 6)],
      [
        ['A.1', 'B.0'],
        ['B.1', 'C.0'],
      ],
    );
    expect(told).toEqual([
      { code: 'joint-contradicted', about: ['B', 'A', 'C'], facts: { what: 'direction', pairs: 2 } },
    ]);
  });

  test('connected ports 600 mm apart are a contradiction, and joined', () => {
    const { told, joints } = findingsOf(
      [
        pipe('A', '0 0 0 > 2 0 0', { ports: [{ at: [2, 0, 0] }] }),
        pipe('B', '2.6 0 0 > 4 0 0', { ports: [{ at: [2.6, 0, 0] }] }),
      ],
      [['A.0', 'B.0']],
    );
    expect(joints).toEqual(['A', 'A+B', 'B']);
    expect(told).toMatchObject([{ code: 'joint-contradicted', facts: { what: 'distance', pairs: 1 } }]);
    expect(told[0]!.facts.gapM).toBeCloseTo(0.6, 9);
  });

  test('a gap of 80 mm is told once, with what is nearest', () => {
    const { told } = findingsOf([pipe('A', '0 0 0 > 2 0 0'), pipe('B', '2.08 0 0 > 4 0 0')]);
    expect(told).toMatchObject([{ code: 'open-end', about: ['A', 'B'], facts: { nearest: 'end' } }]);
    expect(told[0]!.facts.gapM).toBeCloseTo(0.08, 9);
  });

  test('a tee that is missing between three pipes is told once', () => {
    const { told } = findingsOf([
      pipe('A', '0 0 0 > 1.92 0 0'),
      pipe('B', '2.08 0 0 > 4 0 0'),
      pipe('C', '2 2 0 > 2 0.08 0'),
    ]);
    expect(told.map(({ code, about }) => [code, [...about].sort()])).toEqual([['open-end', ['A', 'B', 'C']]]);
  });

  test('ends that turn their backs on each other are just ends', () => {
    expect(findingsOf([pipe('A', '0 0 0 > 2 0 0'), pipe('B', '0 0.2 0 > 0 2 0')]).told).toEqual([]);
  });

  test('a pipe of another system in the middle of a run is a wrong system', () => {
    const parts = (medium: 'storm' | 'sanitary') => [
      pipe('A', '0 0 0 > 2 0 0'),
      pipe('B', '2 0 0 > 4 0 0', { medium }),
      pipe('C', '4 0 0 > 6 0 0'),
    ];
    const { told, joints } = findingsOf(parts('storm'));
    expect(joints).toEqual(findingsOf(parts('sanitary')).joints);
    expect(told.find(({ code }) => code === 'wrong-system')).toMatchObject({
      about: ['B'],
      facts: { medium: 'storm' },
    });
  });

  test('rainwater that only ends in the drain stays out', () => {
    const { told, value } = findingsOf([
      pipe('A', '0 0 0 > 2 0 0'),
      pipe('rain', '2 0 0 > 2 0 8', { medium: 'storm' }),
    ]);
    expect(told).toEqual([]);
    expect(value.fates.map(({ use, reason }) => reason ?? use)).toEqual(['pipe', 'rainwater']);
  });

  test('a fixture without a pipe is an error where the model has drains', () => {
    const closet = body('closet', 'fixture', [9, 9, 0], 0.4, { kind: 'water-closet' });
    expect(findingsOf([pipe('A', '0 0 0 > 2 0 0'), closet]).told).toMatchObject([
      { code: 'fixture-unconnected', about: ['closet'] },
    ]);
    expect(findingsOf([closet]).told).toEqual([]);
  });

  test('two bodies of one fixture are one', () => {
    const { told, value } = findingsOf([
      pipe('drop', '0 0 -1 > 0 0 -0.02', { diameter: 0.05 }),
      body('tray', 'fixture', [0, 0, 0.4], 0.8, { kind: 'shower' }),
      body('cabin', 'fixture', [0, 0, 0.42], 0.84, { kind: 'shower' }),
    ]);
    expect(told.filter(({ code }) => code === 'doubled-element')).toMatchObject([{ about: ['tray', 'cabin'] }]);
    expect(value.fates.map(({ use, reason }) => reason ?? use)).toEqual(['pipe', 'double', 'fixture']);
  });

  test('a pipe drawn over part of a longer one is one with it', () => {
    const { told, value } = findingsOf([
      pipe('A', '0 0 0 > 6 0 0'),
      pipe('over', '1 0.001 0 > 3 0.001 0'),
      pipe('branch', '2 2 0 > 2 0 0'),
    ]);
    expect(told.find(({ code }) => code === 'doubled-element')).toMatchObject({ about: ['over', 'A'] });
    expect(value.joints.map(({ pipes }) => pipes.length).sort()).toEqual([1, 1, 1, 3]);
  });

  test('a system that the answers leave out is out, whatever it is', () => {
    const { model, identities } = drawn([pipe('A', '0 0 0 > 2 0 0'), pipe('B', '2 0 0 > 4 0 0')]);
    const system = { file: 0, stepId: 9, globalId: 'id-lab', name: 'Lab waste', longName: null, objectType: null };
    const grouped = {
      ...model,
      systems: [{ ...system, id: 0 as SystemId, predefinedType: 'WASTEWATER' }],
      elements: model.elements.map((element) =>
        element.name === 'B' ? { ...element, systems: [0 as SystemId] } : element,
      ),
    };
    for (const leaveOut of [['Lab waste'], ['id-lab']]) {
      const { value } = buildNetwork(grouped, identities, { leaveOut });
      expect(value.fates.map(({ use, reason }) => reason ?? use)).toEqual(['pipe', 'answer']);
    }
  });

  test('the user may bridge wider gaps', () => {
    const { model, identities } = drawn([pipe('A', '0 0 0 > 2 0 0'), pipe('B', '2.15 0 0 > 4 0 0')]);
    expect(buildNetwork(model, identities).value.joined.geometry).toBe(0);
    expect(buildNetwork(model, identities, { maxGap: 0.15 }).value.joined.geometry).toBe(1);
  });

  test('every element has one fate', () => {
    const parts = [
      pipe('A', '0 0 0 > 2 0 0'),
      pipe('nowhere', '0 0 0 > 0 0 0.0001'),
      pipe('heating', '0 5 0 > 2 5 0', { medium: 'other' }),
      pipe('who knows', '0 6 0 > 2 6 0', { medium: null }),
      body('lamp', 'not-drainage', [0, 0, 3], 0.2),
      body('lonely bend', 'fitting', [5, 5, 5], 0.2),
      { name: 'without place', part: 'fitting', medium: 'sanitary', origin: null } as const,
    ];
    expect(findingsOf(parts).value.fates.map(({ use, reason }) => reason ?? use)).toEqual([
      'pipe',
      'zero length',
      'other system',
      'no drainage',
      'equipment',
      'not connected',
      'no position',
    ]);
  });
});
