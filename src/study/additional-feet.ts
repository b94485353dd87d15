import { planTurn } from '../paths/turns.ts';
import type { Attempt } from './attempt.ts';
import type { Row } from './row.ts';
import { type Foot, footBehind, isFreeAbove } from './vent-feet.ts';

/** Behind every so many fixtures, evenly; and at the bends beyond which the branch would turn too far. */
export function additionalFeet(row: Row, { battery, outcome }: Attempt): Foot[] {
  if (battery === null) return [];
  const { additionalAfter, turnDegrees } = row.outcome.code.batteryLimits;
  const { branch, start, stretches, traps } = battery.facts.circuit;
  const { stream } = row;
  const places = new Map([[start, 0]]);
  const downOf = (pipe: (typeof branch)[number]) => outcome.paths.toward[pipe]!;
  branch.forEach((pipe, at) => {
    places.set(downOf(pipe), at + 1);
  });
  const placeAt = (joint: typeof start): number => places.get(joint) ?? branch.length;
  const feet: Foot[] = [];
  for (const [index, stretch] of stretches.entries()) {
    const [from, to] = [placeAt(stretch.from), placeAt(stretch.to)];
    const inside = traps.filter(({ joins }) => {
      const place = placeAt(joins);
      return place <= to && (index === 0 ? place >= from : place > from);
    });
    if (inside.length > additionalAfter) {
      const parts = Math.ceil(inside.length / additionalAfter);
      for (let part = 1; part < parts; part++) {
        const behind = inside[Math.ceil((part * inside.length) / parts) - 1]!;
        const foot = footBehind(row, behind.joins);
        if (foot !== null) feet.push(foot);
      }
    }
    let turned = 0;
    for (let at = from; at + 1 < to; at++) {
      const joint = downOf(branch[at]!);
      turned += planTurn(
        outcome.network,
        [branch[at]!, branch[at + 1]!],
        at === from ? stretch.from : downOf(branch[at - 1]!),
      );
      if (turned <= turnDegrees + angle) continue;
      turned = 0;
      if (joint < stream.outflow.length && isFreeAbove(row, joint)) feet.push({ joint });
    }
  }
  return feet;
}

/** Angles carry a hundredth of a degree at each bend. */
const angle = 0.05;
