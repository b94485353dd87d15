import { groupedChanges } from './grouped-changes.ts';
import type { MendChange } from './mend.ts';
import { counted } from './trade-words.ts';

/** One step of a plan for a person. */
export interface PlanStepText {
  readonly title: string;
  readonly why: string;
  /** Points. */
  readonly cost: number;
  /** Names of pipes that change alike; empty where the title names the one. */
  readonly pipes: readonly string[];
}

/** The changes in their order, pipes that change alike for one reason as one step. */
export function planSteps(changes: readonly MendChange[], nameOf: (globalId: string) => string): PlanStepText[] {
  return groupedChanges(changes).map((group) => {
    const first = group[0]!;
    const alike = group.length > 1;
    return {
      title: alike ? `${counted(group.length, 'pipe')} from ${first.from} to ${first.to}` : titleOf(first, nameOf),
      why: first.why,
      cost: group.reduce((sum, one) => sum + one.cost, 0),
      pipes: alike ? group.flatMap(({ about }) => about).map(nameOf) : [],
    };
  });
}

const mostNamed = 8;

function titleOf({ kind, about, from, to }: MendChange, nameOf: (globalId: string) => string): string {
  const at = about[0] === undefined ? '' : nameOf(about[0]);
  switch (kind) {
    case 'vent':
      return `New ${to}, from ${at}`;
    case 'moved-vent':
      return `${at} moved: ${to}, from ${about[1] === undefined ? 'its new place' : nameOf(about[1])}`;
    case 'extended-vent':
      return `${at} goes on: ${to}`;
    case 'reading':
      return `The row of ${counted(about.length, 'fixture')} from ${at} on is read as ${to} instead of ${from}`;
    case 'slope':
      return `${about.map(nameOf).slice(0, mostNamed).join(', ')}${from === null ? '' : `, now ${from},`} laid to ${to}`;
    case 'trap':
      return `${at} set ${to}, now ${from}`;
    case 'cleanout':
      return `New ${to} at ${at}`;
    case 'size':
      return `${at} from ${from} to ${to}`;
  }
}
