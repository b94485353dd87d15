import type { Reading } from '../codes/reading.ts';
import type { JointId, PipeId } from '../network/network.ts';
import type { BatteryContext, Draft } from './battery-context.ts';
import { batteryFacts } from './battery-facts.ts';
import { trapsByFoot } from './feet.ts';
import { brokenUnder, judgeBattery, readAs } from './judge-battery.ts';
import type { Battery } from './roles.ts';
import type { StackPlace } from './stack-joints.ts';

/**
 * Rows of traps that breathe through one foot, each judged under every reading of the code. A foot further down the
 * same level line joins its traps to the row above when the longer row holds as circuit vented and ends at a relief vent.
 */
export function formBatteries(
  context: BatteryContext,
  onStacks: ReadonlyMap<JointId, StackPlace>,
  answered: (battery: Battery) => Reading | null,
): Battery[] {
  const drafts = trapsByFoot(context.paths)
    .map(({ foot, traps }): Draft => ({ foot, traps, additional: [] }))
    .filter(({ traps }) => traps.some(({ through }) => through.length > 0));
  const batteries: Battery[] = [];
  for (const row of longestRows(context, drafts)) {
    const whole = withoutFreeTraps(context, row, batteries.length);
    if (whole === null) continue;
    const judged = onStackAlone(context, row, whole);
    const word = answered(judged);
    if (word === null && judged.facts.word === null && !isRow(judged, onStacks.has(row.foot))) continue;
    batteries.push(word === null || word === judged.reading ? judged : readAs(judged, word));
  }
  return batteries;
}

/**
 * A drawing that breaks its own conditions is still a row with faults where two traps or more share a vent. One trap
 * whose air would come past other fixtures, or traps that would breathe through a stack or its vent stack, have no vent.
 */
const isRow = ({ facts, broken }: Battery, footOnStack: boolean): boolean =>
  broken.length === 0 || (facts.traps.length > 1 && !facts.wet.stack && !footOnStack);

/** Readings under which a stack is its own vent. */
const ownVents: ReadonlySet<Reading> = new Set(['waste-stack-vent', 'single-stack']);

/** A stack that is its own vent for the traps that join it keeps them, whatever joins the drain past its foot. */
function onStackAlone(context: BatteryContext, draft: Draft, whole: Battery): Battery {
  if (whole.broken.length === 0 || !whole.facts.wet.stack) return whole;
  const traps = draft.traps.filter(({ armEnd }) => {
    const out = armEnd === null ? null : (context.stream.outflow[armEnd] ?? null);
    return out !== null && context.inStack[out] !== null;
  });
  if (traps.length === draft.traps.length || !traps.some(({ through }) => through.length > 0)) return whole;
  const alone = judge(context, { ...draft, traps }, whole.facts.id);
  return alone.broken.length === 0 && ownVents.has(alone.reading) ? alone : whole;
}

/** Every row as long as it holds; a foot that a longer row takes in makes no row of its own. In flow order. */
function longestRows(context: BatteryContext, drafts: readonly Draft[]): Draft[] {
  const byFoot = new Map(drafts.map((draft) => [draft.foot, draft]));
  const ordered = inFlowOrder(context, drafts);
  const rows = new Map(ordered.map((draft) => [draft.foot, lengthen(context, draft, byFoot)]));
  const takers = new Map<JointId, number>();
  for (const { joined } of rows.values()) for (const foot of joined) takers.set(foot, (takers.get(foot) ?? 0) + 1);
  const taken = new Set<JointId>();
  const free = ordered.map(({ foot }) => foot).filter((foot) => !takers.has(foot));
  // Rows that nobody takes in stand; what they take in falls, and what only those would have taken in stands again.
  for (let at = 0; at < free.length; at++) {
    const foot = free[at]!;
    for (const below of rows.get(foot)!.joined) {
      if (!taken.has(foot)) taken.add(below);
      const left = takers.get(below)! - 1;
      takers.set(below, left);
      if (left === 0) free.push(below);
    }
  }
  return ordered.filter(({ foot }) => !taken.has(foot)).map(({ foot }) => rows.get(foot)!.row);
}

/** By the place of their foot in the flow. */
function inFlowOrder({ paths, stream }: BatteryContext, drafts: readonly Draft[]): Draft[] {
  const place = new Map(paths.inFlowOrder.map((pipe, at) => [pipe, at]));
  const at = ({ foot }: Draft): number => place.get(stream.outflow[foot]!) ?? 0;
  return [...drafts].sort((a, b) => at(a) - at(b) || a.foot - b.foot);
}

/** The row with the feet below it on the same level line, as long as it holds. */
function lengthen(
  context: BatteryContext,
  draft: Draft,
  byFoot: ReadonlyMap<JointId, Draft>,
): { row: Draft; joined: readonly JointId[] } {
  const { stream } = context;
  const line = levelLine(context, draft.foot);
  const onLine = new Set(line.map((pipe) => stream.down(pipe)));
  let best: { row: Draft; joined: readonly JointId[] } = { row: draft, joined: [] };
  let traps = draft.traps;
  const additional: JointId[] = [];
  const joined: JointId[] = [];
  for (const pipe of line) {
    const joint = stream.down(pipe);
    const other = byFoot.get(joint) ?? guestRow(context, byFoot, joint, pipe, onLine);
    if (other === undefined) continue;
    const stands = other.foot === joint;
    if (stands) additional.push(joint);
    joined.push(other.foot);
    traps = [...traps, ...other.traps.filter(({ through }) => stands || through.length > 0)];
    const longer: Draft = { foot: draft.foot, traps, additional: [...additional] };
    if (isOneRow(context, longer, best.row, other)) best = { row: longer, joined: [...joined] };
  }
  return best;
}

/** From a foot down with the water: the vertical part of a circuit vent, then level pipes up to a drop or a stack. */
function levelLine({ stream, paths, inStack }: BatteryContext, foot: JointId): PipeId[] {
  const line: PipeId[] = [];
  let level = false;
  for (let pipe = stream.outflow[foot] ?? null; pipe !== null; pipe = paths.next[pipe] ?? null) {
    if (inStack[pipe] !== null || (level && paths.vertical[pipe] === true)) break;
    level ||= paths.vertical[pipe] !== true;
    line.push(pipe);
  }
  return line;
}

/**
 * One row where the part below the further foot does not hold alone, and the whole holds as circuit vented down to a dry
 * relief vent, or as a wet vent. The relief vent of a row that holds is no vent in the middle of a wet vent. Where the
 * foot is a guest's, its vent stands nearer to the traps below it than their own: they belong to the longer row also
 * where both break as much.
 */
function isOneRow(context: BatteryContext, longer: Draft, soFar: Draft, below: Draft): boolean {
  const alone = judge(context, below, 0).broken.length;
  if (alone === 0) return false;
  if (holdsToRelief(context, longer)) return true;
  const stands = longer.additional.includes(below.foot);
  if (stands && holdsToRelief(context, soFar)) return false;
  const together = brokenUnder(context.code, 'wet-vent', batteryFacts(context, longer, 0));
  return together !== null && together.length <= (stands ? 0 : alone);
}

/** It holds as circuit vented, and a dry relief vent ends it. */
function holdsToRelief(context: BatteryContext, row: Draft): boolean {
  const facts = batteryFacts(context, row, 0);
  const relief = facts.circuit.relief?.kind;
  return (relief === 'dry' || relief === 'shared') && brokenUnder(context.code, 'circuit-vent', facts)?.length === 0;
}

/** A row whose foot stands on a drain of its own that joins this line here, and whose other traps lie on the line. */
function guestRow(
  { stream, loads, paths }: BatteryContext,
  byFoot: ReadonlyMap<JointId, Draft>,
  joint: JointId,
  line: PipeId,
  onLine: ReadonlySet<JointId | null>,
): Draft | undefined {
  for (const inflow of stream.inflows[joint]!) {
    if (inflow === line) continue;
    const { from, to } = loads.pipes[inflow]!;
    for (const fixture of loads.order.slice(from, Math.min(to, from + mostGuests))) {
      const { foot, through } = paths.traps[fixture]!;
      const row = foot !== null && through.length === 0 ? byFoot.get(foot) : undefined;
      if (row?.traps.every(({ through: ways, armEnd }) => ways.length === 0 || onLine.has(armEnd))) return row;
    }
  }
  return undefined;
}

/** A drain that carries more fixtures than this is a branch of its own, no guest. */
const mostGuests = 12;

/** A trap that a rule frees of a vent stays in the row only where the row holds with it. */
function withoutFreeTraps(context: BatteryContext, draft: Draft, id: number): Battery | null {
  const whole = judge(context, draft, id);
  const free = draft.traps.filter(({ fixture, through }) => context.free[fixture] !== null && through.length > 0);
  if (whole.broken.length === 0 || free.length === 0) return whole;
  const traps = draft.traps.filter((trap) => !free.includes(trap));
  if (!traps.some(({ through }) => through.length > 0)) return null;
  return judge(context, { ...draft, traps }, id);
}

const judge = (context: BatteryContext, draft: Draft, id: number): Battery =>
  judgeBattery(context.code, batteryFacts(context, draft, id));
