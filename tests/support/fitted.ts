import { boxAround } from '../../src/geometry/box.ts';
import { add, distance, scale, subtract, unit, type Vec3 } from '../../src/geometry/vector.ts';
import { body, type DrawnPart, type DrawnPort, pipe } from './drawn.ts';

export interface Run {
  readonly name: string;
  readonly from: string;
  readonly to: string;
  readonly diameter: number;
  readonly vent?: boolean;
}

export interface Fitted {
  readonly parts: readonly DrawnPart[];
  readonly connected: readonly (readonly [string, string])[];
}

/**
 * Runs between nodes as a modeller draws them: a fitting at every node where runs meet, each run cut back to the
 * fitting's face and, besides, by `gap(end)` metres; ports at every end, connected. `ends` names what stands at lone ends.
 */
export function fitted(
  nodes: ReadonlyMap<string, Vec3>,
  runs: readonly Run[],
  ends: ReadonlyMap<string, (at: Vec3) => DrawnPart>,
  gap: (end: number) => number = () => 0,
): Fitted {
  const at = new Map<string, { run: Run; side: 0 | 1 }[]>();
  for (const run of runs)
    for (const [side, node] of [run.from, run.to].entries())
      at.set(node, [...(at.get(node) ?? []), { run, side: side as 0 | 1 }]);
  const faces = new Map<string, Vec3>();
  const connected: [string, string][] = [];
  const fittings: DrawnPart[] = [];
  for (const [node, meeting] of at) {
    const centre = nodes.get(node)!;
    const widest = Math.max(...meeting.map(({ run }) => run.diameter));
    const reach = meeting.length > 1 ? 0.75 * widest : 0;
    const points = meeting.map(({ run, side }) => {
      const other = nodes.get(side === 0 ? run.to : run.from)!;
      const face = add(centre, scale(unit(subtract(other, centre)), Math.min(reach, 0.4 * distance(centre, other))));
      faces.set(`${run.name}.${side}`, face);
      return face;
    });
    const stands = ends.get(node)?.(centre);
    const ports: DrawnPort[] = points.map((point) => ({ at: point }));
    const arms = points.flatMap((point) => armCorners(centre, point, 0.55 * widest));
    const part: DrawnPart | null =
      stands !== undefined
        ? { ...stands, ports }
        : meeting.length > 1
          ? { ...body(node, 'fitting', centre, 0), box: boxAround(arms)!, ports }
          : null;
    if (part === null) continue;
    fittings.push(part);
    meeting.forEach(({ run, side }, i) => {
      connected.push([`${run.name}.${side}`, `${part.name}.${i}`]);
    });
  }
  let end = 0;
  const pipes = runs.map(({ name, diameter, vent }) => {
    const [a, b] = [faces.get(`${name}.0`)!, faces.get(`${name}.1`)!];
    const way = unit(subtract(b, a));
    const line = [add(a, scale(way, gap(end++))), subtract(b, scale(way, gap(end++)))];
    const ports: DrawnPort[] = [
      { at: line[0]!, direction: 'sink' },
      { at: line[1]!, direction: 'source' },
    ];
    return { ...pipe(name, '0 0 0 > 1 0 0', { diameter, ports, medium: vent ? 'vent' : 'sanitary' }), line };
  });
  return { parts: [...pipes, ...fittings], connected };
}

/** Corners of the box round a bar from the centre of a fitting to one of its faces. */
function armCorners(centre: Vec3, face: Vec3, radius: number): readonly Vec3[] {
  const way = unit(subtract(face, centre));
  const wide = way.map((x) => radius * Math.sqrt(Math.max(0, 1 - x * x)));
  return [centre, face].flatMap((p): Vec3[] => [
    [p[0] - wide[0]!, p[1] - wide[1]!, p[2] - wide[2]!],
    [p[0] + wide[0]!, p[1] + wide[1]!, p[2] + wide[2]!],
  ]);
}

/** Bathrooms on stacks: `stacks` stacks of `floors` floors, each floor with a closet, a basin and a shower on one branch. */
export function tower(stacks: number, floors: number, gap?: (end: number) => number): Fitted {
  const nodes = new Map<string, Vec3>();
  const runs: Run[] = [];
  const ends = new Map<string, (at: Vec3) => DrawnPart>();
  const run = (from: string, to: string, diameter: number, vent = false): void => {
    runs.push({ name: `${from}-${to}`, from, to, diameter, vent });
  };
  for (let s = 0; s < stacks; s++) {
    const x = 6 * (s % 40);
    const y = 8 * Math.floor(s / 40);
    nodes.set(`s${s}out`, [x, y - 3, -1.06]);
    nodes.set(`s${s}foot`, [x, y, -1]);
    run(`s${s}foot`, `s${s}out`, 0.11);
    let below = `s${s}foot`;
    for (let f = 0; f < floors; f++) {
      const z = 3 * f;
      const name = (part: string): string => `s${s}f${f}${part}`;
      nodes.set(name('tee'), [x, y, z]);
      run(name('tee'), below, 0.11);
      below = name('tee');
      const fall = (d: number): number => z + 0.02 * d;
      nodes.set(name('wcT'), [x + 0.8, y, fall(0.8)]);
      nodes.set(name('shT'), [x + 1.7, y, fall(1.7)]);
      nodes.set(name('baT'), [x + 2.6, y, fall(2.6)]);
      run(name('wcT'), name('tee'), 0.11);
      run(name('shT'), name('wcT'), 0.075);
      run(name('baT'), name('shT'), 0.05);
      nodes.set(name('wc'), [x + 0.8, y + 0.4, fall(1.2) + 0.02]);
      nodes.set(name('sh'), [x + 1.7, y + 0.6, fall(2.3) + 0.02]);
      nodes.set(name('ba'), [x + 2.6, y + 0.25, fall(2.6) + 0.45]);
      nodes.set(name('baB'), [x + 2.6, y, fall(2.6) + 0.445]);
      nodes.set(name('vent'), [x + 2.6, y, z + 2.2]);
      run(name('wc'), name('wcT'), 0.11);
      run(name('sh'), name('shT'), 0.05);
      run(name('ba'), name('baB'), 0.04);
      run(name('baB'), name('baT'), 0.05);
      run(name('baB'), name('vent'), 0.05, true);
      nodes.set(name('vs'), [x, y + 0.3, z + 2.26]);
      nodes.set(name('vb'), [x + 2.6, y + 0.3, z + 2.21]);
      run(name('vent'), name('vb'), 0.05, true);
      run(name('vb'), name('vs'), 0.05, true);
      if (f > 0) run(`s${s}f${f - 1}vs`, name('vs'), 0.075, true);
      const stand = (kind: 'water-closet' | 'shower' | 'lavatory', up: number, size: number) => (at: Vec3) =>
        body(name(kind), 'fixture', [at[0], at[1] + size / 2 - 0.05, at[2] + up], size, { kind });
      ends.set(name('wc'), stand('water-closet', 0.2, 0.4));
      ends.set(name('sh'), stand('shower', 0.4, 0.8));
      ends.set(name('ba'), stand('lavatory', 0.2, 0.4));
    }
    nodes.set(`s${s}sky`, [x, y + 0.3, 3 * floors + 1]);
    run(`s${s}f${floors - 1}vs`, `s${s}sky`, 0.075, true);
    ends.set(`s${s}sky`, (at) => body(`s${s}cowl`, 'vent-terminal', at, 0.12, { medium: 'vent' }));
  }
  return fitted(nodes, runs, ends, gap);
}
