import type { PlumbingCode } from '../codes/plumbing-code.ts';
import type { SizesSoFar, Step } from '../codes/sizing-rule.ts';
import type { PipeUse } from '../codes/use.ts';
import type { PipeId } from '../network/network.ts';
import type { NominalSize } from '../units/nominal-size.ts';

export interface Sizing {
  /** null: no size holds it, or nothing asks for one. */
  readonly size: NominalSize | null;
  /** A demand went past the last row of its table. */
  readonly beyond: boolean;
  /** Every demand, in the order of the code's rules. */
  readonly trail: readonly Step[];
  /** The largest demands: those that no smaller size would meet. */
  readonly governing: readonly Step[];
  readonly provisional: boolean;
}

/**
 * The size of every pipe: the largest demand of the code's rules. Rules that read sizes are asked again until none
 * grows any more; sizes only grow, so this ends. By pipe id.
 */
export function sizePipes(uses: readonly PipeUse[], code: PlumbingCode): Sizing[] {
  const { rank } = code.series;
  const fixed = code.rules.filter(({ reads }) => reads === 'use');
  const following = code.rules.filter(({ reads }) => reads === 'sizes');
  const none: SizesSoFar = () => null;
  const steady = uses.map((use) => (isSized(use) ? fixed.flatMap((rule) => named(rule.id, rule.ask(use, none))) : []));
  const sizes: (NominalSize | null)[] = steady.map((steps) => largestAsked(steps, code));
  const soFar: SizesSoFar = (pipe) => sizes[pipe] ?? null;
  const moving: Step[][] = uses.map(() => []);
  const order = orderOf(uses);

  for (let changed = true; changed; ) {
    changed = false;
    for (const pipe of order) {
      moving[pipe] = following.flatMap((rule) => named(rule.id, rule.ask(uses[pipe]!, soFar)));
      const asked = largestAsked(moving[pipe]!, code);
      const known = sizes[pipe] ?? null;
      if (asked !== null && (known === null || rank(asked) > rank(known))) {
        sizes[pipe] = asked;
        changed = true;
      }
    }
  }
  return uses.map(({ pipe }) => {
    const trail = [...steady[pipe]!, ...moving[pipe]!];
    const beyond = trail.some(({ asks }) => asks === null);
    const size = sizes[pipe] ?? null;
    const top = trail.reduce((most, { asks }) => (asks === null ? most : Math.max(most, rank(asks))), -1);
    const governing = trail.filter(({ asks }) => (beyond ? asks === null : asks !== null && rank(asks) === top));
    return {
      size: beyond ? null : size,
      beyond,
      trail,
      governing,
      provisional: governing.some(({ provisional }) => provisional),
    };
  });
}

/** Drains before the pipes they flow into, vents before those they join: most sizes are found in the first pass. */
function orderOf(uses: readonly PipeUse[]): PipeId[] {
  const after = new Map<PipeId, PipeId[]>();
  const waiting = new Int32Array(uses.length);
  for (const { pipe, inflows, joining } of uses) {
    for (const before of [...inflows, ...joining]) {
      const list = after.get(before);
      if (list === undefined) after.set(before, [pipe]);
      else list.push(pipe);
      waiting[pipe]!++;
    }
  }
  const order = uses.filter((use) => waiting[use.pipe] === 0).map(({ pipe }) => pipe);
  const placed = new Uint8Array(uses.length);
  for (const pipe of order) placed[pipe] = 1;
  for (let at = 0; at < order.length; at++) {
    for (const pipe of after.get(order[at]!) ?? []) {
      if (--waiting[pipe]! === 0 && placed[pipe] === 0) {
        placed[pipe] = 1;
        order.push(pipe);
      }
    }
  }
  // Drains and vents that wait for each other: any order serves, the passes go on until nothing grows.
  for (const { pipe } of uses) if (placed[pipe] === 0) order.push(pipe);
  return order.filter((pipe) => isSized(uses[pipe]!));
}

const isSized = ({ role }: PipeUse): boolean => role !== 'idle' && role !== 'unknown';

/** The rule's own id tells two demands of one clause apart. */
const named = (id: string, step: Step | undefined): Step[] => (step === undefined ? [] : [{ ...step, rule: id }]);

/** A size that the user omits is not offered: the next larger one is. */
function largestAsked(steps: readonly Step[], { series, omitSizes }: PlumbingCode): NominalSize | null {
  let top = -1;
  for (const { asks } of steps) if (asks !== null) top = Math.max(top, series.rank(asks));
  if (top < 0) return null;
  return series.sizes.slice(top).find(({ label }) => !omitSizes.has(label))?.label ?? series.sizes[top]!.label;
}
