import type { Facts } from '../findings/finding.ts';
import type { PipeId } from '../network/network.ts';
import type { Cell } from '../tables/table.ts';
import type { NominalSize } from '../units/nominal-size.ts';
import type { PipeUse } from './use.ts';

/** One demand on one pipe. Every demand stays in the trail; the largest governs. */
export interface Step {
  readonly rule: string;
  readonly clause: string;
  /** The cell that answers, with its trust and place; null for a demand that no table makes. */
  readonly cell: Cell | null;
  /** Trust of a demand that no table makes. */
  readonly trust: Cell['trust'];
  readonly facts: Facts;
  /** null: no size of the table holds it. */
  readonly asks: NominalSize | null;
  /** An unread cell was passed on the way: a smaller size may be enough. */
  readonly provisional: boolean;
  /** The next smaller size and why this rule refuses it, where the rule can tell. */
  readonly smaller?: { readonly size: NominalSize; readonly limit: number | string | null } | null;
}

/** What a rule may read of sizes found so far. null: none yet. Sizes only grow. */
export type SizesSoFar = (pipe: PipeId) => NominalSize | null;

export interface SizingRule {
  readonly id: string;
  /** Asked again whenever sizes changed; a rule that reads no sizes is asked once. */
  readonly reads: 'use' | 'sizes';
  ask(pipe: PipeUse, soFar: SizesSoFar): Step | undefined;
}
