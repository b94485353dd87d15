import type { ElementId } from '../model/model.ts';
import type { Quantities } from '../study/quantities.ts';
import type { NominalSize } from '../units/nominal-size.ts';
import { unitsOf } from '../units/quantity.ts';
import type { Outcome } from '../verdicts/outcome.ts';
import type { SizeLabel } from './result.ts';
import { type ResultIndex, roundMetres } from './result-index.ts';
import type { WeighAlternative, WeighFitting, WeighPipes, WeighSection, WeighWall } from './weigh.ts';

/** The quantities of an alternative as they are published: sizes with their DN, lengths in metres, alike ones together. */

export type SizeOf = (label: NominalSize | null) => SizeLabel | null;

export function pipesOf({ pieces }: Quantities, size: SizeOf): WeighPipes[] {
  const groups = new Map<string, { role: string; size: NominalSize | null; length: number }>();
  for (const piece of pieces) {
    const key = `${piece.role} ${piece.size}`;
    const known = groups.get(key);
    if (known === undefined) groups.set(key, { role: piece.role, size: piece.size, length: piece.length });
    else known.length += piece.length;
  }
  return [...groups.values()].map((one) => ({ role: one.role, size: size(one.size), length: roundMetres(one.length) }));
}

/** Parts of one element that follow one another alike are one section. */
export function sectionsOf(
  { pieces }: Quantities,
  index: ResultIndex,
  nameOf: (element: ElementId) => string | null,
  size: SizeOf,
): WeighSection[] {
  const sections: (WeighSection & { key: string })[] = [];
  for (const { element, role, size: label, length, load, place, added } of pieces) {
    const key = `${element} ${role} ${label} ${place}`;
    const at = sections.findIndex((one) => one.key === key && element !== null);
    const known = sections[at];
    if (known !== undefined) {
      sections[at] = { ...known, length: known.length + length, load: Math.max(known.load, unitsOf(load)) };
      continue;
    }
    const globalId = element === null || added ? null : index.idOf(element);
    const name = element === null ? null : nameOf(element);
    sections.push({ key, globalId, name, role, size: size(label), length, load: unitsOf(load), place, added });
  }
  return sections.map(({ key: _, length, ...rest }) => ({ ...rest, length: roundMetres(length) }));
}

const fittingOrder = ['bend', 'junction', 'double-junction', 'reducer', 'coupling'];

export function fittingsOf({ fittings }: Quantities, size: SizeOf): WeighFitting[] {
  const groups = new Map<string, WeighFitting>();
  for (const { kind, angle, size: label, branch } of fittings) {
    const key = `${kind} ${angle} ${label} ${branch}`;
    const known = groups.get(key);
    groups.set(key, {
      kind,
      ...(angle === null ? {} : { angle }),
      size: size(label)!,
      ...(branch === null ? {} : { branch: size(branch)! }),
      count: (known?.count ?? 0) + 1,
    });
  }
  const rank = ({ kind, angle = 0, size: { dn }, branch }: WeighFitting): number[] => [
    fittingOrder.indexOf(kind),
    -dn,
    -(branch?.dn ?? 0),
    -angle,
  ];
  return [...groups.values()].sort((a, b) => {
    const [left, right] = [rank(a), rank(b)];
    return left.map((value, at) => value - right[at]!).find((difference) => difference !== 0) ?? 0;
  });
}

/** Largest first, unknown last. */
export function tallied(
  sizes: readonly (NominalSize | null)[],
  rank: (size: NominalSize) => number,
): [NominalSize | null, number][] {
  const counts = new Map<NominalSize | null, number>();
  for (const size of sizes) counts.set(size, (counts.get(size) ?? 0) + 1);
  return [...counts].sort(([a], [b]) => (b === null ? -1 : rank(b)) - (a === null ? -1 : rank(a)));
}

const millimetres = (mm: number): number => roundMetres(Math.round(mm * 10) / 10000);

export function wallOf({ code }: Outcome, index: ResultIndex, { wall }: Quantities): WeighWall | null {
  if (wall === null) return null;
  const { bored } = wall;
  const holes = code.walls.holes;
  return {
    depth: millimetres(wall.depthMm),
    stud: wall.stud,
    judgedBy: wall.by,
    lies: wall.lies,
    size: index.size(wall.size),
    ...(wall.made === wall.size ? {} : { laidAs: index.size(wall.made) }),
    outside: millimetres(wall.outerMm),
    modelled: wall.bodies.map(({ wall: { globalId, name, loadBearing }, cavity }) => ({
      globalId,
      name,
      cavity: cavity === null ? null : millimetres(cavity.depthMm),
      framing: cavity?.framing ?? null,
      loadBearing,
    })),
    fits: wall.fits,
    bored:
      bored === null || holes === null
        ? null
        : {
            size: index.size(bored.size),
            outside: millimetres(bored.outerMm),
            hole: millimetres(bored.holeMm),
            source: `${holes.document}, ${holes.stud.clause}`,
            limits: bored.limits.map(({ stud, loadbearing, other }) => ({
              stud,
              loadbearing: millimetres(loadbearing.mostMm),
              other: millimetres(other.mostMm),
            })),
            stud: { loadbearing: bored.loadbearing, other: bored.other },
          },
  };
}

/** A vent of several legs is one. */
export function addsOf(
  { pieces }: Quantities,
  nameOf: (element: ElementId) => string | null,
  size: SizeOf,
): WeighAlternative['adds'] {
  const vents = new Map<string, { role: string; size: NominalSize | null; length: number }>();
  for (const { element, added, role, size: label, length } of pieces) {
    if (!added || element === null) continue;
    const what = (nameOf(element) ?? '').replace(/\.\d+$/, '');
    const known = vents.get(what);
    if (known === undefined) vents.set(what, { role, size: label, length });
    else known.length += length;
  }
  return [...vents].map(([what, one]) => ({
    what,
    role: one.role,
    size: size(one.size),
    length: roundMetres(one.length),
  }));
}
