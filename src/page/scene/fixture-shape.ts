import type { Building } from '../building.ts';
import { MeshDraft } from './mesh-draft.ts';

/**
 * A ring of a fixture's body in its own unit box: across from left (0) to right (1), out from the wall (0) to the front
 * (1), up from bottom (0) to top (1). `round` 2 is an ellipse, 8 nearly a box.
 */
interface Ring {
  readonly up: number;
  readonly across: number;
  readonly out: number;
  readonly wide: number;
  readonly deep: number;
  readonly round: number;
}
type Part = readonly Ring[];

const ring = (up: number, wide: number, deep: number, round = 2.4, out = 0.5, across = 0.5): Ring => ({
  up,
  across,
  out,
  wide,
  deep,
  round,
});
const block = (from: number, to: number, out0: number, out1: number, wide = 1): Part => [
  ring(from, wide, out1 - out0, 9, (out0 + out1) / 2),
  ring(to, wide, out1 - out0, 9, (out0 + out1) / 2),
];
/** A vessel: up the outside, over the rim, down the inside. */
const bowl = (foot: number, rim: number, wide: number, deep: number, round: number, out = 0.5): Part => [
  ring(foot, wide * 0.55, deep * 0.55, round, out),
  ring(foot + (rim - foot) * 0.55, wide * 0.92, deep * 0.92, round, out),
  ring(rim, wide, deep, round, out),
  ring(rim, wide * 0.84, deep * 0.84, round, out),
  ring(foot + (rim - foot) * 0.45, wide * 0.6, deep * 0.6, round, out),
];

/** Simple bodies by kind, in the box that the model gives; a kind without one is a plain block. */
const bodies: Readonly<Record<string, readonly Part[]>> = {
  'water-closet': [
    block(0.5, 1, 0, 0.26, 0.92),
    [
      ring(0, 0.6, 0.55, 2.6, 0.42),
      ring(0.22, 0.55, 0.55, 2.6, 0.45),
      ring(0.46, 0.96, 0.78, 2.3, 0.61),
      ring(0.52, 1, 0.8, 2.3, 0.6),
      ring(0.52, 0.66, 0.52, 2.1, 0.64),
      ring(0.38, 0.4, 0.34, 2.1, 0.62),
    ],
  ],
  urinal: [
    [
      ring(0, 0.5, 0.5, 2.6, 0.3),
      ring(0.12, 0.92, 0.9, 2.6, 0.45),
      ring(0.42, 1, 0.98, 2.6, 0.49),
      ring(0.42, 0.8, 0.72, 2.4, 0.5),
      ring(0.25, 0.5, 0.45, 2.4, 0.45),
    ],
    block(0.3, 1, 0, 0.3, 0.94),
  ],
  lavatory: [bowl(0, 0.86, 1, 1, 3), block(0.86, 1, 0, 0.16, 0.94)],
  bidet: [bowl(0, 1, 0.95, 0.95, 2.3)],
  shower: [
    [ring(0, 1, 1, 12), ring(1, 1, 1, 12), ring(1, 0.9, 0.9, 12), ring(0.55, 0.86, 0.86, 12)],
    [ring(0.4, 0.14, 0.14, 2), ring(0.75, 0.14, 0.14, 2)],
  ],
  bathtub: [[ring(0, 0.96, 0.94, 9), ring(1, 1, 1, 9), ring(1, 0.9, 0.82, 4), ring(0.2, 0.78, 0.66, 4)]],
  'floor-drain': [[ring(0.5, 1, 1, 2), ring(1, 1, 1, 2), ring(1, 0.72, 0.72, 2), ring(0.7, 0.72, 0.72, 2)]],
};
for (const basin of [
  'sink',
  'kitchen-sink',
  'mop-sink',
  'laundry-tray',
  'clinical-sink',
  'drinking-fountain',
  'wash-fountain',
])
  Object.assign(bodies, {
    [basin]: [[ring(0, 0.9, 0.9, 9), ring(1, 1, 1, 9), ring(1, 0.86, 0.82, 7), ring(0.2, 0.78, 0.74, 7)]],
  });
const plain: readonly Part[] = [block(0, 1, 0, 1, 1)];

/**
 * All fixtures as one body. A fixture without a place in the model is not drawn. Where there are very many, corners
 * are saved: nobody sees a basin's curve among thousands.
 */
export function fixtureShape(building: Building, shown: (fixture: number) => boolean): MeshDraft {
  const draft = new MeshDraft();
  const count = building.result.fixtures.length;
  const corners = count <= 400 ? 16 : 8;
  const { fixtures } = building.data.scene;
  building.result.fixtures.forEach(({ kind }, fixture) => {
    const size = [
      fixtures.maxX[fixture]! - fixtures.minX[fixture]!,
      fixtures.maxY[fixture]! - fixtures.minY[fixture]!,
      fixtures.maxZ[fixture]! - fixtures.minZ[fixture]!,
    ].map((millimetres) => millimetres / 1000) as [number, number, number];
    if (size[0] <= 0 || !shown(fixture)) return;
    const low = [fixtures.minX[fixture]! / 1000, fixtures.minY[fixture]! / 1000, fixtures.minZ[fixture]! / 1000];
    const facing = fixtures.facing[fixture]!;
    const place = (across: number, out: number, up: number): number[] => {
      const [fx, fy] =
        facing === 0
          ? [out, across]
          : facing === 1
            ? [1 - across, out]
            : facing === 2
              ? [1 - out, 1 - across]
              : [across, 1 - out];
      return [low[0]! + fx * size[0], low[1]! + fy * size[1], low[2]! + up * size[2]];
    };
    for (const part of count > 4000 ? plain : (bodies[kind ?? ''] ?? plain)) loft(draft, part, place, corners);
  });
  return draft;
}

function loft(
  draft: MeshDraft,
  part: Part,
  place: (across: number, out: number, up: number) => number[],
  corners: number,
): void {
  const rings = part.map((it) =>
    Array.from({ length: corners }, (_, corner) => {
      const turn = (corner / corners) * Math.PI * 2;
      const bend = (value: number): number => Math.sign(value) * Math.abs(value) ** (2 / it.round);
      return place(
        it.across + (it.wide / 2) * bend(Math.cos(turn)),
        it.out + (it.deep / 2) * bend(Math.sin(turn)),
        it.up,
      );
    }),
  );
  for (let level = 1; level < rings.length; level++)
    for (let corner = 0; corner < corners; corner++) {
      const next = (corner + 1) % corners;
      const [below, above] = [rings[level - 1]!, rings[level]!];
      draft.quad(below[corner]!, below[next]!, above[next]!, above[corner]!);
    }
  for (const [end, it] of [
    [rings[0]!, part[0]!],
    [rings.at(-1)!, part.at(-1)!],
  ] as const) {
    const middle = place(it.across, it.out, it.up);
    for (let corner = 0; corner < corners; corner++) draft.triangle(middle, end[corner]!, end[(corner + 1) % corners]!);
  }
}
