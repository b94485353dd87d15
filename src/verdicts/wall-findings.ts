import type { PlumbingCode } from '../codes/plumbing-code.ts';
import { type Finding, finding } from '../findings/finding.ts';
import type { ElementId, Model } from '../model/model.ts';
import type { Network, PipeId } from '../network/network.ts';
import type { NominalSize } from '../units/nominal-size.ts';
import { type InWall, inWallsOf } from './in-walls.ts';
import type { PipeVerdict } from './outcome.ts';
import { passesStuds, pipeWidth, smallestStud, type WallFit, wallFit } from './wall-fit.ts';

/** One finding for each pipe element that its wall, as modelled, does not take at the size it needs. */
export function wallFindings(
  model: Model,
  network: Network,
  code: PlumbingCode,
  verdicts: readonly PipeVerdict[],
): Finding[] {
  if (model.walls.length === 0) return [];
  const find = inWallsOf(model, code.walls);
  return [...network.pipesOf]
    .sort(([a], [b]) => a - b)
    .flatMap(([element, sections]) => worstOf(sections.flatMap((section) => misfits(element, section))));

  function misfits(element: ElementId, section: PipeId): Misfit[] {
    const size = verdicts[section]!.required?.most ?? null;
    if (size === null) return [];
    const width = pipeWidth(code, size, model.elements[element]!.material);
    return find(network.pipes[section]!).flatMap((inWall): Misfit[] => {
      const { body, run } = inWall;
      if (run === 'across' || body.cavity === null) return [];
      const { loadBearing, name } = body.wall;
      const bored = body.cavity.framing === 'wood' && passesStuds(code, inWall);
      const fit = wallFit(code, width, body.cavity, bored, loadBearing);
      if (fit === null || fit.fits) return [];
      const stud = smallestStud(code, width, bored, loadBearing ?? true)?.name ?? null;
      const light = loadBearing === null ? (smallestStud(code, width, bored, false)?.name ?? null) : null;
      return [{ element, made: width.made, size, run, fit, wall: name, loadBearing, stud, light }];
    });
  }

  function worstOf(found: readonly Misfit[]): Finding[] {
    const [worst] = [...found].sort(
      (a, b) =>
        Number(a.fit.fitsCavity) - Number(b.fit.fitsCavity) ||
        b.fit.needsMm - a.fit.needsMm ||
        a.fit.cavityMm - b.fit.cavityMm,
    );
    return worst === undefined ? [] : [misfitFinding(worst, code)];
  }
}

interface Misfit {
  readonly element: ElementId;
  readonly size: NominalSize;
  readonly made: NominalSize | null;
  readonly run: InWall['run'];
  readonly fit: WallFit;
  readonly wall: string | null;
  readonly loadBearing: boolean | null;
  readonly stud: string | null;
  /** Where the model does not say whether the wall bears load: the stud that takes it if it does not. */
  readonly light: string | null;
}

function misfitFinding(
  { element, size, made, run, fit, wall, loadBearing, stud, light }: Misfit,
  code: PlumbingCode,
): Finding {
  const hole = fit.holes === null ? null : loadBearing === false ? fit.holes.other : fit.holes.loadbearing;
  const bored = fit.fitsCavity && hole !== null;
  const rules = code.walls.holes;
  return finding('fit-in-wall', [element], {
    what: bored ? 'hole' : fit.by,
    required: size,
    ...(made === null || made === size ? {} : { made }),
    wall,
    run,
    needsMm: round(fit.needsMm),
    cavityMm: round(fit.cavityMm),
    ...(hole === null ? {} : { holeMm: round(hole.holeMm), holeMostMm: round(hole.mostMm) }),
    ...(hole === null || rules === null ? {} : { holeClause: `${rules.document}, ${rules.stud.clause}` }),
    loadBearing,
    stud,
    ...(loadBearing === null && light !== stud ? { studIfNotLoadbearing: light } : {}),
  });
}

/** Tenths of a millimetre. */
const round = (mm: number): number => Math.round(mm * 10) / 10;
