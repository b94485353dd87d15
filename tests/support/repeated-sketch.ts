import type { Vec3 } from '../../src/geometry/vector.ts';
import type { Sketch } from './sketch.ts';

/** So many of one building side by side, 60 m apart in rows of 40, each with names of its own and its own way out. */
export function repeatedSketch(one: Sketch, count: number): Sketch {
  const copies = Array.from({ length: count }, (_, copy) => shifted(one, copy));
  return {
    ...one,
    spaces: copies.flatMap(({ spaces }) => spaces),
    walls: copies.flatMap(({ walls }) => walls),
    slabs: copies.flatMap(({ slabs }) => slabs),
    roofs: copies.flatMap(({ roofs }) => roofs),
    nodes: new Map(copies.flatMap(({ nodes }) => [...nodes])),
    pipes: copies.flatMap(({ pipes }) => pipes),
    parts: copies.flatMap(({ parts }) => parts),
  };
}

function shifted(one: Sketch, copy: number): Sketch {
  const [east, north] = [(copy % 40) * 60, Math.floor(copy / 40) * 60];
  const at = ([x, y, z]: Vec3): Vec3 => [x + east, y + north, z];
  const named = (name: string): string => `${name} ${copy + 1}`;
  const boxed = <T extends { readonly name: string; readonly min: Vec3; readonly max: Vec3 }>(
    list: readonly T[],
  ): T[] => list.map((it) => ({ ...it, name: named(it.name), min: at(it.min), max: at(it.max) }));
  return {
    ...one,
    spaces: boxed(one.spaces),
    slabs: boxed(one.slabs),
    roofs: boxed(one.roofs),
    walls: one.walls.map((wall) => ({ ...wall, name: named(wall.name), from: at(wall.from), to: at(wall.to) })),
    nodes: new Map(
      [...one.nodes.values()].map((node) => [named(node.name), { ...node, name: named(node.name), at: at(node.at) }]),
    ),
    pipes: one.pipes.map((pipe) => ({ ...pipe, name: named(pipe.name), nodes: pipe.nodes.map(named) })),
    parts: one.parts.map((part) => ({ ...part, name: named(part.name) })),
  };
}
