import { describe, expect, test } from 'vitest';
import { buildNetwork } from '../../src/network/build-network.ts';
import { body, type DrawnPart, drawn, joinsOf, pipe } from '../support/drawn.ts';

interface Case {
  readonly name: string;
  readonly parts: readonly DrawnPart[];
  readonly connected?: readonly (readonly [string, string])[];
  /** Joints: what meets at each, dead ends included. */
  readonly joints: readonly string[];
}

/** Expectations are read off the drawing by a person: what a fitter would find joined on site. */
const cases: readonly Case[] = [
  {
    name: 'two pipes end to end',
    parts: [pipe('A', '0 0 0 > 2 0 0'), pipe('B', '2 0 0 > 4 0 0')],
    joints: ['A', 'A+B', 'B'],
  },
  {
    name: 'a gap of a quarter of the diameter (27 mm at 110 mm) is bridged',
    parts: [pipe('A', '0 0 0 > 2 0 0'), pipe('B', '2.027 0 0 > 4 0 0')],
    joints: ['A', 'A+B', 'B'],
  },
  {
    name: 'a gap of 29 mm at 110 mm is not',
    parts: [pipe('A', '0 0 0 > 2 0 0'), pipe('B', '2.029 0 0 > 4 0 0')],
    joints: ['A', 'A', 'B', 'B'],
  },
  {
    name: 'thin pipes still bridge 10 mm',
    parts: [pipe('A', '0 0 0 > 2 0 0', { diameter: 0.032 }), pipe('B', '2.0099 0 0 > 4 0 0', { diameter: 0.032 })],
    joints: ['A', 'A+B', 'B'],
  },
  {
    name: 'wide pipes bridge 50 mm at most',
    parts: [pipe('A', '0 0 0 > 2 0 0', { diameter: 0.4 }), pipe('B', '2.052 0 0 > 4 0 0', { diameter: 0.4 })],
    joints: ['A', 'A', 'B', 'B'],
  },
  {
    name: 'a spigot stands 75 mm in its socket (sewer pipes of 600 mm)',
    parts: [pipe('A', '0 0 0 > 2.575 0 0', { diameter: 0.6 }), pipe('B', '2.5 0 0 > 5.075 0 0', { diameter: 0.6 })],
    joints: ['A', 'A+B', 'B'],
  },
  {
    name: 'a branch that ends on a wall cuts the run',
    parts: [pipe('run', '0 0 0 > 4 0 0'), pipe('branch', '2 3 0 > 2 0.055 0')],
    joints: ['branch', 'branch+run1+run2', 'run1', 'run2'],
  },
  {
    name: 'a branch drawn to the axis of the run',
    parts: [pipe('run', '0 0 0 > 4 0 0'), pipe('branch', '2 3 0 > 2 0 0')],
    joints: ['branch', 'branch+run1+run2', 'run1', 'run2'],
  },
  {
    name: 'pipes that cross 5 mm apart do not meet',
    parts: [pipe('A', '0 0 0 > 4 0 0'), pipe('B', '2 -2 0.115 > 2 2 0.115')],
    joints: ['A', 'A', 'B', 'B'],
  },
  {
    name: 'of two stacks 5 mm apart at 45 degrees, each coupling takes the ends of its own',
    parts: [0, 0.0814].flatMap((d, i) => [
      pipe(`low${i}`, `${d} ${d} 0 > ${d} ${d} 2`),
      pipe(`high${i}`, `${d} ${d} 2.02 > ${d} ${d} 4`),
      body(`coupling${i}`, 'fitting', [d, d, 2.01], 0.17),
    ]),
    joints: ['high0', 'high0+low0@coupling0', 'high1', 'high1+low1@coupling1', 'low0', 'low1'],
  },
  {
    name: 'the coupling of the one is not the joint of the other',
    parts: [
      pipe('low', '0 0 0 > 0 0 2'),
      pipe('high', '0 0 2.02 > 0 0 4'),
      body('coupling', 'fitting', [0, 0, 2.01], 0.17),
      pipe('beside', '0.0814 0.0814 0 > 0.0814 0.0814 2'),
      pipe('beside it', '0.0814 0.0814 2 > 0.0814 0.0814 4'),
    ],
    joints: ['beside', 'beside it', 'beside+beside it', 'high', 'high+low@coupling', 'low'],
  },
  {
    name: 'a fitting joins the three ends in its body',
    parts: [
      pipe('A', '0 0 0 > 1.9 0 0'),
      pipe('B', '2.1 0 0 > 4 0 0'),
      pipe('C', '2 2 0 > 2 0.1 0'),
      body('tee', 'fitting', [2, 0, 0], 0.2),
    ],
    joints: ['A', 'A+B+C@tee', 'B', 'C'],
  },
  {
    name: 'a coupling over two ends that touch takes both',
    parts: [pipe('A', '0 0 0 > 2 0 0'), pipe('B', '2 0 0 > 4 0 0'), body('coupling', 'fitting', [2, 0, 0], 0.14)],
    joints: ['A', 'A+B@coupling', 'B'],
  },
  {
    name: 'a chamber takes all ends that lie in it, and they are not joined to each other besides',
    parts: [
      pipe('A', '-3 0 0 > 0 0 0'),
      pipe('B', '0 0 0 > 3 0 -0.05'),
      pipe('C', '0 3 0 > 0 0.3 0'),
      body('manhole', 'chamber', [0, 0, 0], 0.8),
    ],
    joints: ['A', 'A+B+C@manhole', 'B', 'C'],
  },
  {
    name: 'a stack drawn as one solid is cut by its four branches',
    parts: [
      pipe('stack', '0 0 0 > 0 0 12'),
      ...[1, 4, 7, 10].map((z, i) => pipe(`b${i + 1}`, `2 0 ${z} > 0.055 0 ${z}`)),
    ],
    joints: [
      'b1',
      'b1+stack1+stack2',
      'b2',
      'b2+stack2+stack3',
      'b3',
      'b3+stack3+stack4',
      'b4',
      'b4+stack4+stack5',
      'stack1',
      'stack5',
    ],
  },
  {
    name: 'two branches at one height enter at one joint',
    parts: [
      pipe('stack', '0 0 0 > 0 0 6'),
      pipe('east', '2 0 3 > 0.055 0 3'),
      pipe('west', '-2 0 3.004 > -0.055 0 3.004'),
    ],
    joints: ['east', 'east+stack1+stack2+west', 'stack1', 'stack2', 'west'],
  },
  {
    name: 'a bent pipe is cut where vertical and horizontal meet, not at its other corners',
    parts: [pipe('A', '0 0 3 > 0 0 0 > 2 0 0 > 2 2 0')],
    joints: ['A1', 'A1+A2', 'A2'],
  },
  {
    name: 'a closet stands over the end of its pipe',
    parts: [pipe('drop', '0 0 -1 > 0 0 -0.02'), body('closet', 'fixture', [0, 0, 0.2], 0.4, { kind: 'water-closet' })],
    joints: ['drop', 'drop@closet'],
  },
  {
    name: 'of two ends in a fixture the lowest drains it',
    parts: [
      pipe('waste', '0 -2 0.1 > 0 -0.1 0.1', { diameter: 0.05 }),
      pipe('other', '0.1 -2 0.3 > 0.1 -0.1 0.3', { diameter: 0.05, medium: null }),
      body('basin', 'fixture', [0, 0, 0.25], 0.5, { kind: 'lavatory' }),
    ],
    joints: ['waste', 'waste@basin'],
  },
  {
    name: 'two bowls over one waste share it',
    parts: [
      pipe('waste', '0 0 -1 > 0 0 0', { diameter: 0.05 }),
      body('left', 'fixture', [-0.2, 0, 0.2], 0.4, { kind: 'sink' }),
      body('right', 'fixture', [0.201, 0, 0.2], 0.4, { kind: 'sink' }),
    ],
    joints: ['link+waste@left', 'link@right', 'waste'],
  },
  {
    name: 'a bath has two outlets when two sanitary ends stop in it',
    parts: [
      pipe('waste', '0 0 -1 > 0 0 0.05', { diameter: 0.05 }),
      pipe('overflow', '0.3 0 -1 > 0.3 0 0.4', { diameter: 0.04 }),
      body('bath', 'fixture', [0, 0, 0.4], 0.8, { kind: 'bathtub' }),
    ],
    joints: ['overflow', 'overflow+waste@bath', 'waste'],
  },
  {
    name: 'a sink drains where two wastes meet in it without a fitting',
    parts: [
      pipe('one', '0 0 0 > 0 0 -1', { diameter: 0.05 }),
      pipe('other', '0 0 0 > 1 0 -1', { diameter: 0.05 }),
      body('sink', 'fixture', [0, 0, 0.1], 0.3, { kind: 'sink' }),
    ],
    joints: ['one', 'one+other@sink', 'other'],
  },
  {
    name: 'a sleeve round a pipe, drawn as a pipe, is nothing to it',
    parts: [pipe('A', '0 0 0 > 4 0 0'), pipe('sleeve', '1.9 0 0 > 2.1 0 0', { diameter: 0.16 })],
    joints: ['A', 'A'],
  },
  {
    name: 'nor is insulation from end to end, or short of both ends',
    parts: [
      pipe('A', '0 0 0 > 4 0 0'),
      pipe('round A', '0 0 0 > 4 0 0', { diameter: 0.15 }),
      pipe('B', '4 0 0 > 8 0 0'),
      pipe('round B', '4.05 0 0 > 7.95 0 0', { diameter: 0.15 }),
    ],
    joints: ['A', 'A+B', 'B'],
  },
  {
    name: 'a wide pipe after a thin one is no sleeve',
    parts: [pipe('A', '0 0 0 > 2 0 0', { diameter: 0.08 }), pipe('B', '2 0 0 > 3 0 0', { diameter: 0.11 })],
    joints: ['A', 'A+B', 'B'],
  },
  {
    name: 'fittings that touch are linked',
    parts: [
      pipe('A', '0 0 0 > 1.9 0 0'),
      body('bend', 'fitting', [2, 0, 0], 0.2),
      body('next', 'fitting', [2, 0.202, 0], 0.2),
      pipe('B', '2 0.302 0 > 2 2 0'),
    ],
    joints: ['A', 'A+link@bend', 'B', 'B+link@next'],
  },
  {
    name: 'fittings whose bodies overlap are not linked when their ports say that they do not meet',
    parts: [
      pipe('A', '0 0 0 > 1.9 0 0'),
      body('bend', 'fitting', [2, 0, 0], 0.2, { ports: [{ at: [1.9, 0, 0] }, { at: [2, 0, 0.1] }] }),
      body('beside', 'fitting', [2, 0.15, 0], 0.2, { ports: [{ at: [2.1, 0.15, 0] }, { at: [2, 0.25, 0] }] }),
      pipe('B', '2.1 0.15 0 > 4 0.15 0'),
    ],
    joints: ['A', 'A@bend', 'B', 'B@beside'],
  },
  {
    name: 'ports at one place meet, though no relation says so',
    parts: [
      pipe('A', '0 0 0 > 1.9 0 0'),
      body('bend', 'fitting', [2, 0, 0], 0.2, { ports: [{ at: [1.9, 0, 0] }, { at: [2, 0.1, 0] }] }),
      body('next', 'fitting', [2, 0.2, 0], 0.2, { ports: [{ at: [2, 0.1, 0] }, { at: [2.1, 0.2, 0] }] }),
      pipe('B', '2.1 0.2 0 > 4 0.2 0'),
    ],
    joints: ['A', 'A+link@bend', 'B', 'B+link@next'],
  },
  {
    name: 'ports decide, however far apart they are drawn',
    parts: [
      pipe('A', '0 0 0 > 2 0 0', { ports: [{ at: [0, 0, 0] }, { at: [2, 0, 0] }] }),
      pipe('B', '2.6 0 0 > 4 0 0', { ports: [{ at: [2.6, 0, 0] }, { at: [4, 0, 0] }] }),
    ],
    connected: [['A.1', 'B.0']],
    joints: ['A', 'A+B', 'B'],
  },
  {
    name: 'ports of some, geometry for the rest',
    parts: [
      pipe('A', '0 0 0 > 1.9 0 0', { ports: [{ at: [1.9, 0, 0] }] }),
      body('tee', 'fitting', [2, 0, 0], 0.2, { ports: [{ at: [1.9, 0, 0] }] }),
      pipe('B', '2.1 0 0 > 4 0 0'),
      pipe('C', '2 2 0 > 2 0.1 0'),
    ],
    connected: [['A.0', 'tee.0']],
    joints: ['A', 'A+B+C@tee', 'B', 'C'],
  },
  {
    name: 'a port in the middle of a pipe is a tap on its wall',
    parts: [
      pipe('run', '0 0 0 > 4 0 0', { ports: [{ at: [0, 0, 0] }, { at: [4, 0, 0] }, { at: [2, 0.055, 0] }] }),
      pipe('branch', '2 3 0 > 2 0.055 0', { ports: [{ at: [2, 0.055, 0] }] }),
    ],
    connected: [['run.2', 'branch.0']],
    joints: ['branch', 'branch+run1+run2', 'run1', 'run2'],
  },
  {
    name: 'ports without any geometry: water enters at the first end',
    parts: [
      {
        name: 'A',
        part: 'pipe',
        statedLength: 6,
        ports: [
          { at: null, direction: 'source' },
          { at: null, direction: 'sink' },
        ],
      },
      {
        name: 'B',
        part: 'pipe',
        statedLength: 5,
        ports: [
          { at: null, direction: 'source' },
          { at: null, direction: 'sink' },
        ],
      },
      { name: 'wc', part: 'fixture', kind: 'water-closet', ports: [{ at: null, direction: 'source' }] },
    ],
    connected: [
      ['wc.0', 'B.1'],
      ['B.0', 'A.1'],
    ],
    joints: ['A', 'A+B', 'B@wc'],
  },
  {
    name: 'a doubled pipe is merged',
    parts: [pipe('A', '0 0 0 > 2 0 0'), pipe('A2', '2 0.001 0 > 0 0.001 0'), pipe('B', '2 0 0 > 4 0 0')],
    joints: ['A', 'A+B', 'B'],
  },
  {
    name: 'a pipe of no length is set aside',
    parts: [pipe('A', '0 0 0 > 2 0 0'), pipe('B', '2 0 0 > 2 0 0.0001')],
    joints: ['A', 'A'],
  },
];

describe('who is joined to whom', () => {
  for (const { name, parts, connected, joints } of cases)
    test(name, () => {
      const drawing = drawn(parts, connected);
      const { value: network } = buildNetwork(drawing.model, drawing.identities);
      expect(joinsOf(drawing, network)).toEqual([...joints].sort());
    });
});
