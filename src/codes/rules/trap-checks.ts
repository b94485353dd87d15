import { type Finding, finding } from '../../findings/finding.ts';
import { reachesSlope } from '../../tables/find-slope.ts';
import type { RuleEntry } from '../../tables/rule-list.ts';
import type { NominalSize, SizeSeries } from '../../units/nominal-size.ts';
import { coordinateMetres, turnDegrees } from '../../units/uncertainty.ts';
import type { Check, CheckedPipe, CheckedTrap } from '../check.ts';
import { widthOf } from './vent-sizes.ts';

/** Every trap whose water leaves the building is vented. */
export const everyTrapVented = ({ id, clause }: RuleEntry): Check => ({
  id,
  run: ({ traps }) =>
    traps
      .filter(({ drains, how }) => drains && how === 'unvented')
      .map(({ element, kind }) => finding('unvented-trap', [element], { kind }, clause)),
});

/** What an arm is held to, in metres, m/m and degrees; null where the code sets no such limit for the trap. */
export interface ArmLimits {
  readonly longest: (trap: NominalSize) => number | null;
  readonly shortest: (trap: NominalSize) => number | null;
  /** In bores of the trap. */
  readonly fall: number | null;
  readonly slope: (trap: NominalSize) => number | null;
  readonly turn: (trap: NominalSize) => number | null;
}

/** Faults of one trap arm: too long, too short, too steep, too flat, too much turned. */
export function armFaults(
  { element, size, arm }: CheckedTrap,
  limits: ArmLimits,
  series: SizeSeries,
  clause: string,
): Finding[] {
  if (arm === null) return [];
  const found: Finding[] = [];
  const report = (code: 'trap-arm-too-long' | 'trap-arm-too-steep', facts: Record<string, number | string>): void => {
    found.push(finding(code, [element], { ...facts, trap: size }, clause));
  };
  const longest = limits.longest(size);
  const shortest = limits.shortest(size);
  const slope = limits.slope(size);
  const turn = limits.turn(size);
  if (longest !== null && arm.length > longest + coordinateMetres)
    report('trap-arm-too-long', { lengthM: arm.length, limitM: longest, what: 'length' });
  if (shortest !== null && arm.length < shortest - coordinateMetres)
    report('trap-arm-too-long', { lengthM: arm.length, limitM: shortest, what: 'too short' });
  if (limits.fall !== null && arm.fall !== null) {
    const most = (limits.fall * widthOf(series, size)) / 1000;
    if (arm.fall > most + coordinateMetres) report('trap-arm-too-steep', { fallM: arm.fall, limitM: most });
  }
  if (
    slope !== null &&
    arm.slope !== null &&
    arm.slope > arm.slopeUncertainty &&
    !reachesSlope(arm.slope + arm.slopeUncertainty, slope)
  ) {
    found.push(finding('slope-too-small', [element], { slope: arm.slope, least: slope, size }, clause));
  }
  if (turn !== null && arm.turn !== null && arm.turn > turn + turnDegrees)
    report('trap-arm-too-long', { turnDeg: arm.turn, limitDeg: turn, what: 'turn' });
  return found;
}

/** A stub between two fittings says nothing of the slope a pipe is laid to, metres. */
const shortestPipe = 0.15;

/** Level drains fall at least as the code asks of their size, drawn or else required; null: it asks nothing. */
export const leastSlope = (
  { id, clause }: RuleEntry,
  leastOf: (pipe: CheckedPipe, size: NominalSize) => number | null,
): Check => ({
  id,
  run: ({ pipes }) =>
    pipes.flatMap((pipe) => {
      const { use, element, slopeGround, slopeUncertainty, length } = pipe;
      const size = pipe.modelled ?? pipe.required;
      if (element === null || size === null || use.drain === null || use.vertical || use.slope === null) return [];
      if (use.slope < 0) return [];
      if (use.portion === 'outlet' || (slopeGround === 'geometry' && length < shortestPipe)) return [];
      // A pipe that climbs is a backfall, told by itself.
      if (use.slope + slopeUncertainty < 0) return [];
      const least = leastOf(pipe, size);
      if (least === null || reachesSlope(use.slope + slopeUncertainty, least)) return [];
      return [finding('slope-too-small', [element], { slope: use.slope, least, size }, clause)];
    }),
});

/** The pipe between a fixture and its trap, by its whole length or by its level and vertical parts, metres. */
export const outletPipe = (
  { id, clause }: RuleEntry,
  limits: { readonly whole?: number; readonly vertical?: number; readonly level?: number },
): Check => ({
  id,
  run: ({ traps }) =>
    traps.flatMap(({ element, outletLength, outletLevel }) => {
      const over = (length: number, limit: number | undefined): Finding[] =>
        limit === undefined || length <= limit + coordinateMetres
          ? []
          : [finding('outlet-pipe-too-long', [element], { lengthM: length, limitM: limit }, clause)];
      return [
        ...over(outletLength, limits.whole),
        ...over(outletLength - outletLevel, limits.vertical),
        ...over(outletLevel, limits.level),
      ];
    }),
});
