import { describe, expect, test } from 'vitest';
import { buildNetwork } from '../../src/network/build-network.ts';
import type { Pipe } from '../../src/network/network.ts';
import { body, type DrawnPart, drawn, pipe } from '../support/drawn.ts';

interface Case {
  readonly name: string;
  readonly parts: readonly DrawnPart[];
  /** By pipe and section: own length, and length from corner to corner, in metres. Worked out on paper. */
  readonly lengths: Readonly<Record<string, readonly [number, number]>>;
}

const cases: readonly Case[] = [
  {
    name: 'a bend of 90 degrees: both legs run to the corner',
    parts: [pipe('A', '0 0 0 > 1.9 0 0'), body('bend', 'fitting', [2, 0, 0], 0.2), pipe('B', '2 0.08 0 > 2 3 0')],
    lengths: { A1: [1.9, 2], B1: [2.92, 3] },
  },
  {
    name: 'a tee: the branch runs to the axis of the run',
    parts: [pipe('run', '0 0 0 > 4 0 0'), pipe('branch', '1 3 0 > 1 0.055 0')],
    lengths: { run1: [1, 1], run2: [3, 3], branch1: [2.945, 3] },
  },
  {
    // The branch comes down at 45 degrees and stops 0.055 m beside the axis: the axes meet 0.055 m further on.
    name: 'a wye: the run is cut where the axes meet, not where the branch touches',
    parts: [pipe('run', '0 0 0 > 4 0 0'), pipe('branch', '0 1 0 > 0.945 0.055 0')],
    lengths: { run1: [1, 1], run2: [3, 3], branch1: [0.945 * Math.SQRT2, Math.SQRT2] },
  },
  {
    name: 'a gap counts half to each side',
    parts: [pipe('A', '0 0 0 > 2 0 0'), pipe('B', '2.02 0 0 > 4 0 0')],
    lengths: { A1: [2, 2.01], B1: [1.98, 1.99] },
  },
  {
    name: 'a spigot in its socket counts once: 2.575 m laid at 2.5 m',
    parts: ['0', '2.5', '5'].map((x, i) => pipe(`P${i}`, `${x} 0 0 > ${Number(x) + 2.575} 0 0`, { diameter: 0.6 })),
    lengths: { P01: [2.575, 2.5375], P11: [2.575, 2.5], P21: [2.575, 2.5375] },
  },
  {
    name: 'a bent pipe is measured along its axis, section by section',
    parts: [pipe('A', '0 0 3 > 0 0 0 > 2 0 0 > 2 1 0')],
    lengths: { A1: [3, 3], A2: [3, 3] },
  },
  {
    name: 'two bends that touch: the link is the way between their corners',
    parts: [
      pipe('A', '0 0 0 > 1.9 0 0'),
      body('first', 'fitting', [2, 0, 0], 0.2),
      body('second', 'fitting', [2, 0.2, 0], 0.2),
      pipe('B', '2.1 0.2 0 > 4 0.2 0'),
    ],
    lengths: { A1: [1.9, 2], B1: [1.9, 2], link: [0.2, 0.2] },
  },
];

describe('lengths', () => {
  for (const { name, parts, lengths } of cases)
    test(name, () => {
      const drawing = drawn(parts);
      const { value: network } = buildNetwork(drawing.model, drawing.identities);
      const nameOf = ({ id, element }: Pipe): string =>
        element === null ? 'link' : `${parts[element]!.name}${network.pipesOf.get(element)!.indexOf(id) + 1}`;
      expect(network.pipes.map(nameOf).sort()).toEqual(Object.keys(lengths).sort());
      for (const it of network.pipes) {
        const [own, developed] = lengths[nameOf(it)]!;
        expect(it.length, nameOf(it)).toBeCloseTo(own, 9);
        expect(it.length + it.reach[0] + it.reach[1], nameOf(it)).toBeCloseTo(developed, 9);
      }
    });
});
