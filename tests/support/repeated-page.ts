import type { PageData } from '../../src/deliver/page-data.ts';

/** Many copies of one building side by side, for measuring: every row with an id of its own, positions a little apart. */
export function repeatedPage(data: PageData, times: number): PageData {
  const { scene, result } = data;
  const { pipes, paths, fixtures, fabric } = scene;
  const counts = { pipe: result.pipes.length, section: pipes.pipe.length, joint: pipes.jointX.length };
  const side = Math.ceil(Math.sqrt(times));
  const shift = (copy: number): readonly [number, number] => [(copy % side) * 16_000, Math.floor(copy / side) * 16_000];
  const repeat = (
    column: Int32Array,
    change: (value: number, copy: number) => number = (value) => value,
  ): Int32Array => {
    const long = new Int32Array(column.length * times);
    for (let copy = 0; copy < times; copy++)
      column.forEach((value, at) => {
        long[copy * column.length + at] = change(value, copy);
      });
    return long;
  };
  const pointing = (by: number) => (value: number, copy: number) => (value < 0 ? value : value + copy * by);
  const x = (value: number, copy: number): number => value + shift(copy)[0] + ((copy * 7) % 13);
  const y = (value: number, copy: number): number => value + shift(copy)[1] + ((copy * 5) % 11);
  const id = (globalId: string, copy: number): string => `${copy.toString(36).padStart(4, '0')}${globalId.slice(4)}`;
  const copies = Array.from({ length: times }, (_, copy) => copy);
  return {
    ...data,
    risers: [],
    result: {
      ...result,
      counts: { ...result.counts, pipes: counts.pipe * times, fixtures: result.fixtures.length * times },
      pipes: copies.flatMap((copy) =>
        result.pipes.map((pipe) => ({
          ...pipe,
          globalId: id(pipe.globalId, copy),
          stepId: pipe.stepId + copy * 10_000,
          next: pipe.next === null ? null : id(pipe.next, copy),
        })),
      ),
      fixtures: copies.flatMap((copy) =>
        result.fixtures.map((fixture) => ({
          ...fixture,
          globalId: id(fixture.globalId, copy),
          stepId: fixture.stepId + copy * 10_000,
          ventedBy: { ...fixture.ventedBy, vents: fixture.ventedBy.vents.map((vent) => id(vent, copy)) },
        })),
      ),
      findings: copies.flatMap((copy) =>
        result.findings.map((finding) => ({
          ...finding,
          about: finding.about.map((about) => id(about, copy)),
          facts: { ...finding.facts, cause: `${finding.facts.cause} ${copy}` },
        })),
      ),
    },
    scene: {
      ...scene,
      pipes: {
        pipe: repeat(pipes.pipe, pointing(counts.pipe)),
        section: repeat(pipes.section),
        points: repeat(pipes.points),
        outer: repeat(pipes.outer),
        jointA: repeat(pipes.jointA, pointing(counts.joint)),
        jointB: repeat(pipes.jointB, pointing(counts.joint)),
        x: repeat(pipes.x, x),
        y: repeat(pipes.y, y),
        z: repeat(pipes.z),
        jointX: repeat(pipes.jointX, x),
        jointY: repeat(pipes.jointY, y),
        jointZ: repeat(pipes.jointZ),
        jointKnown: repeat(pipes.jointKnown),
        jointFitting: repeat(pipes.jointFitting),
        jointInferred: repeat(pipes.jointInferred),
      },
      paths: {
        next: repeat(paths.next, pointing(counts.section)),
        flow: repeat(paths.flow),
        wet: repeat(paths.wet),
        first: repeat(paths.first, pointing(counts.section)),
        trapAfter: repeat(paths.trapAfter),
        trapJoint: repeat(paths.trapJoint, pointing(counts.joint)),
        armCount: repeat(paths.armCount),
        throughCount: repeat(paths.throughCount),
        dryCount: repeat(paths.dryCount),
        air: repeat(paths.air, pointing(counts.section)),
      },
      fixtures: {
        minX: repeat(fixtures.minX, x),
        minY: repeat(fixtures.minY, y),
        minZ: repeat(fixtures.minZ),
        maxX: repeat(fixtures.maxX, x),
        maxY: repeat(fixtures.maxY, y),
        maxZ: repeat(fixtures.maxZ),
        facing: repeat(fixtures.facing),
      },
      fabric: {
        kind: repeat(fabric.kind),
        storey: repeat(fabric.storey),
        base: repeat(fabric.base),
        top: repeat(fabric.top),
        points: repeat(fabric.points),
        x: repeat(fabric.x, x),
        y: repeat(fabric.y, y),
      },
      fabricNames: copies.flatMap(() => scene.fabricNames),
    },
  };
}
