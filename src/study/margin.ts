import type { SizingRule, Step } from '../codes/sizing-rule.ts';
import type { PipeUse } from '../codes/use.ts';
import type { PipeId } from '../network/network.ts';
import type { NominalSize } from '../units/nominal-size.ts';
import type { Load } from '../units/quantity.ts';
import type { Outcome } from '../verdicts/outcome.ts';
import { type Extra, loadedUse, onlyLoad } from './loaded-use.ts';

/** How much more a pipe can take before it needs another size. Loads in sixtieths of the code's unit, lengths in metres. */
export interface Margin {
  /** More load at the size that it needs; null: no load changes it. */
  readonly load: Load | null;
  /** At the size that is drawn; negative: so much too much. null: no size is drawn, or load is not what decides. */
  readonly drawn: Load | null;
  /** More length of a vent at the size that it needs; null: no length changes it. */
  readonly length: number | null;
  /** Size that it needs then, and the demand that asks for it. null size: none holds it. */
  readonly next: { readonly size: NominalSize | null; readonly by: Step } | null;
}

/** Loads beyond this are no margin but none at all: 20 000 units. */
const endless = 1_200_000;
/** A vent is followed so far, metres. */
const longest = 300;

/** By pipe id; null for pipes that need no size. */
export function margins(outcome: Outcome): (Margin | null)[] {
  return outcome.network.pipes.map(({ id }) => marginOf(outcome, id));
}

/** Exact for the pipe by itself: every rule is asked again with more on it, the sizes of the other pipes as they are. */
export function marginOf(outcome: Outcome, pipe: PipeId): Margin | null {
  const { shown, code } = outcome;
  const { size, beyond } = shown.sizes[pipe]!;
  if (size === null || beyond) return null;
  const { rank } = code.series;
  const use = shown.roles.uses[pipe]!;
  const rules = askingRules(outcome, use, onlyLoad(endless));
  const fits = (most: NominalSize) => (load: number) =>
    rules.every((rule) => {
      const step = ask(outcome, rule, loadedUse(use, onlyLoad(load)));
      return step === undefined || (step.asks !== null && rank(step.asks) <= rank(most));
    });
  const load = rules.length === 0 || fits(size)(endless) ? null : last(fits(size), endless);
  const modelled = shown.loads.modelled[pipe]!.size;
  return {
    load: load as Load | null,
    drawn: modelled === null || load === null ? null : (drawnMargin(fits(modelled), use) as Load | null),
    length: lengthMargin(outcome, use, size),
    next: load === null ? null : firstAbove(outcome, rules, loadedUse(use, onlyLoad(load + 1)), size),
  };
}

/** A rule that a load cannot move is not asked again and again. */
function askingRules(outcome: Outcome, use: PipeUse, extra: Extra): SizingRule[] {
  const loaded = loadedUse(use, extra);
  return outcome.code.rules.filter((rule) => ask(outcome, rule, use)?.asks !== ask(outcome, rule, loaded)?.asks);
}

const ask = ({ shown }: Outcome, rule: SizingRule, use: PipeUse): Step | undefined =>
  rule.ask(use, (pipe) => shown.sizes[pipe]?.size ?? null);

/** The largest whole number up to `most` that still fits; 0 does. */
function last(fits: (value: number) => boolean, most: number): number {
  let [low, high] = [0, 1];
  while (high < most && fits(high)) [low, high] = [high, high * 2];
  high = Math.min(high, most);
  while (high - low > 1) {
    const middle = Math.floor((low + high) / 2);
    if (fits(middle)) low = middle;
    else high = middle;
  }
  return low;
}

/** Up from nothing, or down to what would fit; null where even no load does. */
function drawnMargin(fits: (value: number) => boolean, use: PipeUse): number | null {
  if (fits(0)) return fits(endless) ? null : last(fits, endless);
  const most = Math.max(use.load, use.vent?.load ?? 0, use.battery?.facts.wet.load ?? 0);
  if (!fits(-most)) return null;
  return -(most - last((load) => fits(load - most), most));
}

function lengthMargin(outcome: Outcome, use: PipeUse, size: NominalSize): number | null {
  const { vent } = use;
  const { rank } = outcome.code.series;
  if (vent === null || vent.length === null) return null;
  const longer = (millimetres: number): PipeUse => ({
    ...use,
    vent: { ...vent, length: vent.length! + millimetres / 1000 },
  });
  const fits = (millimetres: number): boolean =>
    outcome.code.rules.every((rule) => {
      const step = ask(outcome, rule, longer(millimetres));
      return step === undefined || (step.asks !== null && rank(step.asks) <= rank(size));
    });
  return fits(longest * 1000) ? null : last(fits, longest * 1000) / 1000;
}

function firstAbove(
  outcome: Outcome,
  rules: readonly SizingRule[],
  use: PipeUse,
  size: NominalSize,
): { size: NominalSize | null; by: Step } | null {
  const { rank } = outcome.code.series;
  const asked = rules
    .flatMap((rule) => ask(outcome, rule, use) ?? [])
    .filter(({ asks }) => asks === null || rank(asks) > rank(size));
  const most = asked.sort((a, b) => (b.asks === null ? 99 : rank(b.asks)) - (a.asks === null ? 99 : rank(a.asks)))[0];
  return most === undefined ? null : { size: most.asks, by: most };
}

/** The pipe, on the way of the water from here, that takes the least more at its own size, and how much. */
export function wayMargin(
  { paths }: Outcome,
  own: readonly (Margin | null)[],
  start: PipeId,
): { pipe: PipeId; load: Load } | null {
  let least: { pipe: PipeId; load: Load } | null = null;
  for (let pipe: PipeId | null = start; pipe !== null; pipe = paths.next[pipe] ?? null) {
    const load = own[pipe]?.load ?? null;
    if (load !== null && (least === null || load < least.load)) least = { pipe, load };
  }
  return least;
}

/** A fixture as the model has some: what one of them puts on a pipe. */
export interface FixtureLike {
  readonly kind: string;
  readonly load: Load;
  readonly closet: boolean;
}

/** How many more of a fixture a pipe takes at the size it needs, and its battery under its reading; up to 99. */
export function moreFixtures(outcome: Outcome, pipe: PipeId, { load, closet }: FixtureLike): number {
  const { shown, code } = outcome;
  const { size, beyond } = shown.sizes[pipe]!;
  if (size === null || beyond) return 0;
  const { rank } = code.series;
  const use = shown.roles.uses[pipe]!;
  const reading = code.readings.find((rule) => rule.reading === use.battery?.reading);
  const before = use.battery === null || reading === undefined ? 0 : reading.broken(use.battery.facts).length;
  const fits = (count: number): boolean => {
    const loaded = loadedUse(use, { load: load * count, fixtures: count, closets: closet ? count : 0 });
    if (loaded.battery !== null && reading !== undefined && reading.broken(loaded.battery.facts).length > before)
      return false;
    return code.rules.every((rule) => {
      const step = ask(outcome, rule, loaded);
      return step === undefined || (step.asks !== null && rank(step.asks) <= rank(size));
    });
  };
  let count = 0;
  while (count < 99 && fits(count + 1)) count++;
  return count;
}
