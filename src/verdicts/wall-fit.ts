import type { PlumbingCode } from '../codes/plumbing-code.ts';
import type { Stud } from '../tables/wall-rules.ts';
import type { NominalSize } from '../units/nominal-size.ts';
import type { InWall } from './in-walls.ts';
import type { Cavity } from './wall-body.ts';

/** How wide a pipe is as made of its material. Millimetres; null where no source gives it. */
export interface PipeWidth {
  /** Size that is laid: the next larger one where the material is not made in the size that is asked; null: none is. */
  readonly made: NominalSize | null;
  readonly outerMm: number | null;
  readonly fittingMm: number | null;
  /** Series of pipe it is taken from, and whether the model names its material. */
  readonly series: string;
  readonly assumed: boolean;
}

export function pipeWidth(code: PlumbingCode, size: NominalSize, material: string | null): PipeWidth {
  const { series, assumed } = code.walls.pipeOf(material);
  const asked = code.series.sizes[code.series.rank(size)]!.dn;
  const row = series.rows.find(({ dn }) => dn >= asked);
  const made = code.series.sizes.find(({ dn }) => dn === row?.dn)?.label ?? null;
  return { made, outerMm: row?.outerMm ?? null, fittingMm: row?.fittingMm ?? null, series: series.title, assumed };
}

/** What a member of a wall leaves to a level pipe: the hole it needs and the largest it may have. */
export interface HoleFit {
  readonly holeMm: number;
  readonly mostMm: number;
  readonly fits: boolean;
}

/** Whether a pipe fits a wall. Judged by the fitting; by the pipe alone where no source gives the fitting. */
export interface WallFit {
  readonly needsMm: number;
  readonly by: 'fitting' | 'pipe';
  readonly cavityMm: number;
  readonly fitsCavity: boolean;
  /** Of a pipe that runs along the wall through its studs: if they bear load, and if not; null for any other. */
  readonly holes: { readonly loadbearing: HoleFit; readonly other: HoleFit } | null;
  /** Every condition holds; where the model does not say whether the wall bears load, under both. */
  readonly fits: boolean;
}

/** A level pipe that runs farther along a wall than from stud to stud has to pass through studs. */
export function passesStuds({ walls }: PlumbingCode, { run, length }: Pick<InWall, 'run' | 'length'>): boolean {
  const [stud] = walls.studs;
  return run === 'along' && length * 1000 > walls.spacingMm - (stud?.faceMm ?? 0);
}

/** null where no source gives the width of the pipe. `bored`: it passes through the studs. */
export function wallFit(
  code: PlumbingCode,
  width: PipeWidth,
  cavity: Cavity,
  bored: boolean,
  loadbearing: boolean | null,
): WallFit | null {
  const needsMm = width.fittingMm ?? width.outerMm;
  if (needsMm === null || width.outerMm === null) return null;
  const fitsCavity = needsMm <= cavity.depthMm + measured;
  const holes = bored && cavity.framing === 'wood' ? holesIn(code, width.outerMm, cavity.depthMm) : null;
  return {
    needsMm,
    by: width.fittingMm === null ? 'pipe' : 'fitting',
    cavityMm: cavity.depthMm,
    fitsCavity,
    holes,
    fits: fitsCavity && holesHold(holes, loadbearing),
  };
}

/** Layers and diameters are given to a tenth of a millimetre. */
const measured = 0.05;

export function holesIn({ walls }: PlumbingCode, outerMm: number, depthMm: number): WallFit['holes'] {
  if (walls.holes === null) return null;
  const holeMm = outerMm + walls.clearanceMm;
  const of = (loadbearing: boolean): HoleFit => {
    const mostMm = walls.holes!.stud.mostMm(depthMm, loadbearing);
    return { holeMm, mostMm, fits: holeMm <= mostMm + measured };
  };
  return { loadbearing: of(true), other: of(false) };
}

function holesHold(holes: WallFit['holes'], loadbearing: boolean | null): boolean {
  if (holes === null) return true;
  return (loadbearing === false || holes.loadbearing.fits) && (loadbearing === true || holes.other.fits);
}

/** Shallowest stud that takes a pipe between studs, or bored through them; null: none of the list does. */
export function smallestStud(code: PlumbingCode, width: PipeWidth, bored: boolean, loadbearing: boolean): Stud | null {
  const needs = width.fittingMm ?? width.outerMm;
  if (needs === null || width.outerMm === null) return null;
  const { outerMm } = width;
  return (
    code.walls.studs.find(({ depthMm }) => {
      if (needs > depthMm + measured) return false;
      return !bored || holesHold(holesIn(code, outerMm, depthMm), loadbearing);
    }) ?? null
  );
}
