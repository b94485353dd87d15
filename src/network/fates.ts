import type { Identity } from '../model/identity.ts';
import type { Element, Model } from '../model/model.ts';
import type { LeftOutReason } from './left-out-reason.ts';
import type { Fate } from './network.ts';
import type { Pieces } from './pieces.ts';
import { bodyNode, endNode, type Piping } from './piping.ts';
import type { Welds } from './welds.ts';

/** Why an element of the drainage could not be placed. */
export type UnresolvedReason = 'no position' | 'no shape' | 'zero length' | 'not connected';

interface Standing {
  readonly reasons: readonly (LeftOutReason | null)[];
  readonly keeper: Int32Array;
  readonly piping: Piping;
  readonly welds: Welds;
  readonly pieces: Pieces;
}

/** Where each element of the model went, by element id. */
export function fatesOf(model: Model, identities: readonly Identity[], standing: Standing): readonly Fate[] {
  return model.elements.map((element) => fateOf(element, identities[element.id]!, standing));
}

function fateOf(element: Element, { part }: Identity, { reasons, keeper, piping, welds, pieces }: Standing): Fate {
  const reason = reasons[element.id] ?? null;
  if (reason !== null) return leftOut(reason);
  if (keeper[element.id] !== element.id) return leftOut('double');
  const pipe = piping.pipeOf[element.id]!;
  if (pipe >= 0) {
    if (!pieces.isDrainage(endNode(pipe, 0))) return leftOut('no drainage');
    const placed =
      piping.pipes[pipe]!.axis !== null || [0, 1].some((side) => welds.isHeld(endNode(pipe, side as 0 | 1)));
    return placed ? { use: 'pipe', reason: null } : unresolved(whyNoAxis(element));
  }
  const node = bodyNode(piping, piping.bodyOf[element.id]!);
  if (part === 'fixture') return { use: 'fixture', reason: null };
  if (!welds.isHeld(node)) {
    if (part === 'unknown-terminal') return leftOut('unknown terminal');
    if (!pieces.isDrainage(node)) return leftOut('no drainage');
    return unresolved(whyNoBody(element));
  }
  if (!pieces.isDrainage(node)) return leftOut('no drainage');
  if (part === 'unknown-terminal') return { use: 'fixture', reason: null };
  const inLine = element.kind === 'fitting' || element.kind === 'valve';
  return { use: inLine ? 'fitting' : 'terminal', reason: null };
}

const leftOut = (reason: LeftOutReason): Fate => ({ use: 'left-out', reason });
const unresolved = (reason: UnresolvedReason): Fate => ({ use: 'unresolved', reason });

function whyNoAxis({ centreLine, origin }: Element): UnresolvedReason {
  if (centreLine !== null) return 'zero length';
  return origin === null ? 'no position' : 'no shape';
}

function whyNoBody({ box, origin, ports }: Element): UnresolvedReason {
  if (box !== null || ports.length > 0) return 'not connected';
  return origin === null ? 'no position' : 'no shape';
}
