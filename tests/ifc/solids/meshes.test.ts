import { describe, expect, test } from 'vitest';
import type { Vec3 } from '../../../src/geometry/vector.ts';
import { pipeOf } from '../read-one.ts';

interface Shell {
  readonly points: readonly Vec3[];
  readonly faces: readonly (readonly number[])[];
}

/** Rings of corners around points of a path, joined by quads, closed at both ends; corner by corner as programs do. */
function tube(path: readonly Vec3[], radii: readonly number[], sides: number, turn: (p: Vec3) => Vec3): Shell {
  const points = path.flatMap((centre, k) =>
    Array.from({ length: sides }, (_, j): Vec3 => {
      const t = (2 * Math.PI * j) / sides;
      return turn([centre[0] + radii[k]! * Math.cos(t), centre[1] + radii[k]! * Math.sin(t), centre[2]]);
    }),
  );
  const faces: number[][] = [];
  for (let k = 1; k < path.length; k++) {
    for (let j = 0; j < sides; j++) {
      const [a, b] = [(k - 1) * sides + j, (k - 1) * sides + ((j + 1) % sides)];
      faces.push([a, b, b + sides, a + sides]);
    }
  }
  faces.push(Array.from({ length: sides }, (_, j) => sides - 1 - j));
  faces.push(Array.from({ length: sides }, (_, j) => (path.length - 1) * sides + j));
  return { points, faces };
}

const real = (value: number): string => value.toFixed(6);
const list = (corners: readonly number[]): string => `(${corners.join(',')})`;

const triangulated = ({ points, faces }: Shell): string => {
  const triangles = faces.flatMap((face) =>
    face.slice(2).map((_, k) => [face[0]! + 1, face[k + 1]! + 1, face[k + 2]! + 1]),
  );
  return `#100=IFCTRIANGULATEDFACESET(#101,$,.T.,(${triangles.map(list).join(',')}),$);
#101=IFCCARTESIANPOINTLIST3D((${points.map((p) => `(${p.map(real).join(',')})`).join(',')}));`;
};
const polygonal = ({ points, faces }: Shell): string =>
  `#100=IFCPOLYGONALFACESET(#101,.T.,(${faces.map((_, k) => `#${200 + k}`).join(',')}),$);
#101=IFCCARTESIANPOINTLIST3D((${points.map((p) => `(${p.map(real).join(',')})`).join(',')}));
${faces.map((face, k) => `#${200 + k}=IFCINDEXEDPOLYGONALFACE(${list(face.map((one) => one + 1))});`).join('\n')}`;
const shell = ({ points, faces }: Shell): string =>
  `#101=IFCCLOSEDSHELL((${faces.map((_, k) => `#${1000 + 3 * k}`).join(',')}));
${faces
  .map(
    (face, k) => `#${1000 + 3 * k}=IFCFACE((#${1001 + 3 * k}));
#${1001 + 3 * k}=IFCFACEOUTERBOUND(#${1002 + 3 * k},.T.);
#${1002 + 3 * k}=IFCPOLYLOOP(${list(face).replace(/\d+/g, (one) => `#${5000 + Number(one)}`)});`,
  )
  .join('\n')}
${points.map((p, k) => `#${5000 + k}=IFCCARTESIANPOINT((${p.map(real).join(',')}));`).join('\n')}`;
const brep = (body: Shell): string => `#100=IFCFACETEDBREP(#101);\n${shell(body)}`;
const surface = (body: Shell): string => `#100=IFCSHELLBASEDSURFACEMODEL((#101));\n${shell(body)}`;

const upright = (p: Vec3): Vec3 => p;
/** z along (2, 1, 2)/3, far from the origin. */
const turned = ([x, y, z]: Vec3): Vec3 => {
  const [a, b, c] = [
    [-1 / 3, -2 / 3, 2 / 3],
    [-2 / 3, 2 / 3, 1 / 3],
    [2 / 3, 1 / 3, 2 / 3],
  ] as const;
  return [
    100 + a[0] * x + b[0] * y + c[0] * z,
    200 + a[1] * x + b[1] * y + c[1] * z,
    50 + a[2] * x + b[2] * y + c[2] * z,
  ];
};
const straight = (length: number): Vec3[] => [
  [0, 0, 0],
  [0, 0, length],
];
const lengthOf = (points: readonly Vec3[]): number =>
  points.slice(1).reduce((sum, p, k) => sum + Math.hypot(...p.map((one, i) => one - points[k]![i]!)), 0);

describe('a straight pipe given by its faces', () => {
  const forms = { triangulated, polygonal, brep, surface };
  for (const [form, write] of Object.entries(forms)) {
    for (const [how, turn] of Object.entries({ upright, turned })) {
      for (const [length, radius, sides] of [
        [2, 0.05, 16],
        [0.03, 0.05, 24],
        [0.0707, 0.05, 12],
        [36, 0.3, 8],
      ] as const) {
        test(`${form}, ${how}, ${length} m long, ${radius * 2000} mm wide, ${sides} sides`, () => {
          const { centreLine } = pipeOf(write(tube(straight(length), [radius, radius], sides, turn)));
          expect(centreLine).not.toBeNull();
          expect(centreLine!.ground).toBe('mesh');
          expect(lengthOf(centreLine!.points)).toBeCloseTo(length, 5);
          expect(centreLine!.outerDiameter).toBeCloseTo(2 * radius, 5);
          expect(centreLine!.residual).toBeLessThan(1e-5);
        });
      }
    }
  }

  test('a socket makes it longer, not wider', () => {
    const path: Vec3[] = [
      [0, 0, 0],
      [0, 0, 2.4],
      [0, 0, 2.4],
      [0, 0, 2.575],
    ];
    const { centreLine } = pipeOf(triangulated(tube(path, [0.3, 0.3, 0.35, 0.35], 12, turned)));
    expect(lengthOf(centreLine!.points)).toBeCloseTo(2.575, 5);
    expect(centreLine!.outerDiameter).toBeCloseTo(0.6, 5);
  });

  test('flanges at both ends do not make it wider', () => {
    const path: Vec3[] = [
      [0, 0, 0],
      [0, 0, 0.02],
      [0, 0, 0.02],
      [0, 0, 1.98],
      [0, 0, 1.98],
      [0, 0, 2],
    ];
    const { centreLine } = pipeOf(brep(tube(path, [0.1, 0.1, 0.05, 0.05, 0.1, 0.1], 16, turned)));
    expect(lengthOf(centreLine!.points)).toBeCloseTo(2, 5);
    expect(centreLine!.outerDiameter).toBeCloseTo(0.1, 5);
  });

  test('ends cut askew: the sides still show the axis', () => {
    const body = tube(straight(2), [0.05, 0.05], 16, upright);
    const points = body.points.map((p): Vec3 => (p[2] > 1 ? [p[0], p[1], p[2] + p[0]] : p));
    const { centreLine } = pipeOf(brep({ ...body, points }));
    expect(centreLine!.outerDiameter).toBeCloseTo(0.1, 4);
    expect(Math.abs(centreLine!.points[1]![0])).toBeLessThan(1e-4);
    expect(Math.abs(centreLine!.points[1]![1])).toBeLessThan(1e-4);
  });

  test('coordinates rounded to centimetres: the fit is loose, and says how loose', () => {
    const body = tube(straight(36), [0.3, 0.3], 32, upright);
    const points = body.points.map((p): Vec3 => p.map((one) => Math.round(one * 100) / 100) as unknown as Vec3);
    const { centreLine } = pipeOf(polygonal({ ...body, points }));
    expect(centreLine!.outerDiameter).toBeCloseTo(0.6, 2);
    expect(centreLine!.residual).toBeGreaterThan(0.001);
    expect(centreLine!.residual).toBeLessThan(0.005);
  });

  test('a box, a ball and a cone are no pipes', () => {
    const box: Shell = {
      points: [
        [0, 0, 0],
        [1, 0, 0],
        [1, 1, 0],
        [0, 1, 0],
        [0, 0, 3],
        [1, 0, 3],
        [1, 1, 3],
        [0, 1, 3],
      ],
      faces: [
        [0, 3, 2, 1],
        [4, 5, 6, 7],
        [0, 1, 5, 4],
        [1, 2, 6, 5],
        [2, 3, 7, 6],
        [3, 0, 4, 7],
      ],
    };
    const ringPath = Array.from({ length: 9 }, (_, k): Vec3 => [0, 0, -Math.cos((Math.PI * (k + 1)) / 10)]);
    const ball = tube(
      ringPath,
      ringPath.map(([, , z]) => Math.sqrt(1 - z * z)),
      16,
      upright,
    );
    const cone = tube(straight(1), [0.5, 0.05], 16, upright);
    for (const body of [box, ball, cone]) expect(pipeOf(triangulated(body)).centreLine).toBeNull();
  });

  describe('a bent pipe given by its faces', () => {
    /** Rings across a path, each at right angles to the way there (and half-way at a bend). */
    const bentTube = (path: readonly Vec3[], radius: number, sides: number): Shell => {
      const along = path.map((_, k): Vec3 => {
        const [a, b] = [path[Math.max(0, k - 1)]!, path[Math.min(path.length - 1, k + 1)]!];
        const size = Math.hypot(b[0] - a[0], b[1] - a[1], b[2] - a[2]);
        return [(b[0] - a[0]) / size, (b[1] - a[1]) / size, (b[2] - a[2]) / size];
      });
      const body = tube(
        path,
        path.map(() => radius),
        sides,
        upright,
      );
      // All paths here lie in the plane x, z: one direction across is y, the other in the plane.
      const points = path.flatMap((centre, k) =>
        Array.from({ length: sides }, (_, j): Vec3 => {
          const t = (2 * Math.PI * j) / sides;
          const [s, c] = [radius * Math.sin(t), radius * Math.cos(t)];
          return [centre[0] + s * along[k]![2], centre[1] + c, centre[2] - s * along[k]![0]];
        }),
      );
      return { ...body, points };
    };
    const quarter = Array.from({ length: 13 }, (_, k): Vec3 => {
      const t = (Math.PI / 2) * (k / 12);
      return [0.3 - 0.3 * Math.cos(t), 0, 1 + 0.3 * Math.sin(t)];
    });
    const path: Vec3[] = [[0, 0, 0], ...quarter, [1.3, 0, 1.3]];

    for (const [form, write] of Object.entries(forms)) {
      test(`${form}: a leg up, a quarter of 300 mm radius, a leg across`, () => {
        const { centreLine } = pipeOf(write(bentTube(path, 0.05, 16)));
        expect(centreLine).not.toBeNull();
        expect(centreLine!.ground).toBe('mesh');
        expect(centreLine!.points.length).toBe(path.length);
        expect(lengthOf(centreLine!.points)).toBeCloseTo(2 + 0.3 * (Math.PI / 2), 2);
        expect(centreLine!.outerDiameter).toBeCloseTo(0.1, 4);
        expect(centreLine!.residual).toBeLessThan(0.001);
        for (const [, y] of centreLine!.points) expect(Math.abs(y)).toBeLessThan(1e-5);
      });
    }

    test('triangles that share no corners are joined by place', () => {
      const { points, faces } = bentTube(path, 0.05, 16);
      const apart: Shell = {
        points: faces.flatMap((face) => face.map((corner) => points[corner]!)),
        faces: faces.map((face, k) => {
          const first = faces.slice(0, k).reduce((sum, one) => sum + one.length, 0);
          return face.map((_, j) => first + j);
        }),
      };
      expect(pipeOf(triangulated(apart)).centreLine!.points.length).toBe(path.length);
    });
  });
});
