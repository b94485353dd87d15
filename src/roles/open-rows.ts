import type { BatteryFacts, BatteryTrap, OpenLine } from '../codes/battery.ts';
import type { JointId, PipeId } from '../network/network.ts';
import type { FixtureId } from '../paths/paths.ts';
import { noLoad } from '../units/quantity.ts';
import type { BatteryContext } from './battery-context.ts';
import { wetLine } from './battery-facts.ts';
import { judgeBattery } from './judge-battery.ts';
import type { Battery } from './roles.ts';

/**
 * Rows of traps that have no vent upstream and breathe from where their drain ends, as far as the code knows such rows
 * and one of its readings holds: others stay unvented. Numbered on from the rows that are known already.
 */
export function openRows(context: BatteryContext, known: readonly Battery[]): Battery[] {
  const { code } = context;
  // A code all of whose readings take every row knows none that breathe from downstream.
  if (code.readings.every(({ applies }) => applies === undefined)) return [];
  const rows: Battery[] = [];
  for (const draft of openDrafts(context, known)) {
    const facts = openFacts(context, draft, known.length + rows.length);
    const judged = judgeBattery(code, facts);
    if (judged.broken.length === 0 && judged.reading !== 'individual-vent') rows.push(judged);
  }
  return rows;
}

interface OpenDraft {
  readonly fixtures: readonly FixtureId[];
  /** Last pipe before the air. */
  readonly last: PipeId;
  readonly end: OpenLine['end'];
}

/** Traps without air by the pipe through which they reach it, in the order of those pipes. */
function openDrafts(context: BatteryContext, known: readonly Battery[]): OpenDraft[] {
  const { paths } = context;
  const inRow = new Set(known.flatMap(({ facts }) => facts.traps.map(({ fixture }) => fixture)));
  const drafts = new Map<PipeId, { fixtures: FixtureId[]; end: OpenLine['end'] }>();
  for (const { fixture, after, foot } of paths.traps) {
    if (foot !== null || inRow.has(fixture)) continue;
    const met = firstAir(context, fixture, after);
    if (met === null) continue;
    const draft = drafts.get(met.last);
    if (draft === undefined) drafts.set(met.last, { fixtures: [fixture], end: met.end });
    else draft.fixtures.push(fixture);
  }
  return [...drafts].sort(([a], [b]) => a - b).map(([last, draft]) => ({ ...draft, last }));
}

/** The first pipe from a trap downstream whose lower end has air from elsewhere, and what has it there. */
function firstAir(
  context: BatteryContext,
  fixture: FixtureId,
  after: number,
): { last: PipeId; end: OpenLine['end'] } | null {
  const { paths, stream, inStack, live } = context;
  for (const pipe of paths.fixtures[fixture]!.water.slice(after)) {
    const joint = stream.down(pipe);
    const out = stream.outflow[joint] ?? null;
    const stack = out === null ? null : inStack[out];
    if (stack !== null && stack !== undefined)
      return inStack[pipe] === null && live(stream.up(stack.top)) !== null ? { last: pipe, end: 'stack' } : null;
    if (live(joint) !== null) return { last: pipe, end: 'vent' };
    if (out !== null && paths.vertical[out] !== true && takesVented(context, joint, pipe, fixture))
      return { last: pipe, end: 'vented-drain' };
  }
  return null;
}

/** A level drain of vented fixtures of the same storey comes in at the joint. */
function takesVented(
  { paths, stream, loads, floors }: BatteryContext,
  joint: JointId,
  own: PipeId,
  fixture: FixtureId,
): boolean {
  const storey = floors.of(paths.fixtures[fixture]!);
  return stream.inflows[joint]!.some((pipe) => {
    if (pipe === own || paths.vertical[pipe] === true) return false;
    const { from, to } = loads.pipes[pipe]!;
    return loads.order
      .slice(from, to)
      .some((other) => paths.traps[other]!.foot !== null && floors.of(paths.fixtures[other]!) === storey);
  });
}

function openFacts(context: BatteryContext, { fixtures, last, end }: OpenDraft, id: number): BatteryFacts {
  const { stream, inStack, paths, loads, floors, kindOf } = context;
  const joint = stream.down(last);
  const ways = fixtures.map((fixture) => wayOf(context, fixture, last));
  const line = sharedPipes(ways);
  const place = new Map<JointId, number>(line.map((pipe, at) => [stream.up(pipe), at]));
  const traps = fixtures
    .map((fixture, at): BatteryTrap => {
      const way = ways[at]!;
      const own = way.filter((pipe) => !line.includes(pipe));
      const drops = own.filter((pipe) => paths.vertical[pipe] === true);
      const joins = way[own.length] === undefined ? joint : stream.up(way[own.length]!);
      const { row, load, trap } = loads.fixtures[fixture]!;
      return {
        fixture,
        kind: kindOf(fixture),
        row,
        size: trap,
        load,
        closet: row.closet,
        emergency: row.emergency,
        free: context.free[fixture] !== null,
        ownVent: false,
        drops: { pipes: drops.length, height: span(context, drops) },
        joinsLevel: paths.vertical[own.at(-1) ?? -1] !== true,
        reach: span(context, own) - span(context, drops),
        joins,
        place: place.get(joins) ?? line.length,
        storey: floors.of(paths.fixtures[fixture]!),
      };
    })
    .sort((a, b) => a.place - b.place || a.fixture - b.fixture);
  const { from, to } = loads.pipes[last]!;
  const own = new Set(fixtures);
  const guests = loads.order
    .slice(from, to)
    .filter((fixture) => !own.has(fixture))
    .sort((a, b) => a - b)
    .map((fixture) => {
      const { row, load } = loads.fixtures[fixture]!;
      const storey = floors.of(paths.fixtures[fixture]!);
      return { fixture, kind: kindOf(fixture), row, load, storey, joins: joint };
    });
  const out = stream.outflow[joint] ?? null;
  const stack = out === null ? null : inStack[out]!;
  return {
    id,
    foot: joint,
    feet: [],
    line,
    traps,
    guests,
    wet: wetLine(context, line, traps, guests),
    circuit: noCircuit(joint, traps),
    open: {
      end,
      joint,
      reaches: traps.map(({ fixture }) => {
        const way = ways[fixtures.indexOf(fixture)]!;
        return span(
          context,
          way.filter((pipe) => paths.vertical[pipe] !== true),
        );
      }),
      endsAt: comesToStack(context, joint) ? 'stack' : 'building-drain',
    },
    stack: stack === null || out === null ? null : context.stackUses[stack.foot]!,
    word: context.wordOf(fixtures, line),
  };
}

/** From the trap to the pipe after which there is air. */
function wayOf({ paths }: BatteryContext, fixture: FixtureId, last: PipeId): PipeId[] {
  const { water } = paths.fixtures[fixture]!;
  return water.slice(paths.traps[fixture]!.after, water.indexOf(last) + 1);
}

/** Pipes of two ways or more in flow order; of one way alone all of it. */
function sharedPipes(ways: readonly (readonly PipeId[])[]): PipeId[] {
  const [only, second] = ways;
  if (only === undefined) return [];
  if (second === undefined) return [...only];
  const count = new Map<PipeId, number>();
  for (const way of ways) for (const pipe of way) count.set(pipe, (count.get(pipe) ?? 0) + 1);
  const shared = new Set<PipeId>();
  // Longest way first: what a shorter one adds stands before the pipe where they meet.
  for (const way of [...ways].sort((a, b) => b.length - a.length)) {
    const own = way.filter((pipe) => count.get(pipe)! > 1 && !shared.has(pipe));
    const rest = [...shared];
    shared.clear();
    for (const pipe of [...own, ...rest]) shared.add(pipe);
  }
  return [...shared];
}

const span = ({ stream }: BatteryContext, pipes: readonly PipeId[]): number =>
  pipes.reduce((sum, pipe) => sum + stream.span(pipe), 0);

function comesToStack({ stream, inStack, paths }: BatteryContext, joint: JointId): boolean {
  for (let pipe = stream.outflow[joint] ?? null; pipe !== null; pipe = paths.next[pipe] ?? null) {
    if (inStack[pipe] !== null) return true;
  }
  return false;
}

/** A row without a vent upstream is never circuit vented. */
const noCircuit = (start: JointId, traps: readonly BatteryTrap[]): BatteryFacts['circuit'] => ({
  start,
  wetPortion: [],
  onVent: [],
  traps,
  branch: [],
  toLastTrap: [],
  vertical: 0,
  stackUpstream: false,
  load: noLoad,
  closets: 0,
  counts: {},
  soilAbove: false,
  steepest: null,
  trapsAtStart: 0,
  relief: null,
  additional: [],
  stretches: [],
});
