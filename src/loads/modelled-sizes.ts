import type { PlumbingCode } from '../codes/plumbing-code.ts';
import { keyMatches } from '../model/answer-keys.ts';
import type { Answers } from '../model/answers.ts';
import type { Element, ElementId, Model } from '../model/model.ts';
import type { Network } from '../network/network.ts';
import type { NominalSize } from '../units/nominal-size.ts';
import { type ModelledSize, noSize, readSize } from './read-size.ts';

/** Size the model, or the user for it, gives each pipe. By pipe id; sections of one element share theirs. */
export function modelledSizes(model: Model, network: Network, code: PlumbingCode, answers: Answers): ModelledSize[] {
  const sizes: ModelledSize[] = new Array(network.pipes.length).fill(noSize);
  const answered = [...answers.pipes].filter(([, { size }]) => size !== undefined && code.series.has(size));
  const byElement = new Map<ElementId, ModelledSize>();
  for (const { id, element } of network.pipes) {
    if (element === null) continue;
    let size = byElement.get(element);
    if (size === undefined) {
      size =
        answeredSize(model.elements[element]!, answered) ??
        readSize(model.elements[element]!, code.series, code.dimensions);
      byElement.set(element, size);
    }
    sizes[id] = size;
  }
  return sizes;
}

function answeredSize(
  element: Element,
  answered: readonly (readonly [string, { readonly size?: string }])[],
): ModelledSize | null {
  const hit = answered.find(([key]) => keyMatches(key, element));
  return hit === undefined ? null : { ...noSize, size: hit[1].size as NominalSize, from: 'answers file', reason: null };
}
