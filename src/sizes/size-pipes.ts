import type { PlumbingCode } from '../codes/plumbing-code.ts';
import type { SizesSoFar, SizingRule, Step } from '../codes/sizing-rule.ts';
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
  const steady = uses.map((use) => (isSized(use) ? demands(fixed, use, none) : []));
  const sizes: (NominalSize | null)[] = steady.map((steps) => largestAsked(steps, code));
  const moving: Step[][] = uses.map(() => []);
  const order = orderOf(uses);

  // A rule looks at nothing but its pipe and the sizes that it reads: only where one of these has grown is it asked again.
  const readers: PipeId[][] = uses.map(() => []);
  const isDue = new Uint8Array(uses.length).fill(1);
  let asking: PipeId | null = null;
  const soFar: SizesSoFar = (pipe) => {
    const known = readers[pipe];
    if (known !== undefined && asking !== null && known.at(-1) !== asking) known.push(asking);
    return sizes[pipe] ?? null;
  };
  for (let changed = true; changed; ) {
    changed = false;
    for (const pipe of order) {
      if (isDue[pipe] === 0) continue;
      isDue[pipe] = 0;
      asking = pipe;
      moving[pipe] = demands(following, uses[pipe]!, soFar);
      const asked = largestAsked(moving[pipe]!, code);
      const known = sizes[pipe] ?? null;
      if (asked !== null && (known === null || rank(asked) > rank(known))) {
        sizes[pipe] = asked;
        for (const reader of readers[pipe]!) isDue[reader] = 1;
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

/** What rules ask of a pipe, in their order. The rule's own id tells two demands of one clause apart. */
function demands(rules: readonly SizingRule[], use: PipeUse, soFar: SizesSoFar): Step[] {
  const steps: Step[] = [];
  for (const rule of rules) {
    const step = rule.ask(use, soFar);
    if (step !== undefined) steps.push({ ...step, rule: rule.id });
  }
  return steps;
}

/** A size that the user omits is not offered: the next larger one is. */
function largestAsked(steps: readonly Step[], { series, omitSizes }: PlumbingCode): NominalSize | null {
  let top = -1;
  for (const { asks } of steps) if (asks !== null) top = Math.max(top, series.rank(asks));
  if (top < 0) return null;
  const offered = series.sizes.findIndex(({ label }, at) => at >= top && !omitSizes.has(label));
  return series.sizes[Math.max(top, offered)]!.label;
}
