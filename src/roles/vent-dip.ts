import type { Network } from '../network/network.ts';
import { otherEnd } from '../network/other-end.ts';
import type { VentFoot } from './roles.ts';

/** How far a vent comes down again on its way from the foot to the sky, metres: its deepest descent from a height reached. */
export function descentOf(network: Network, { joint, path }: Pick<VentFoot, 'joint' | 'path'>): number {
  let at = joint;
  let top = network.joints[joint]!.at?.[2] ?? null;
  let descent = 0;
  for (const pipe of path) {
    at = otherEnd(network, pipe, at);
    const height = network.joints[at]!.at?.[2] ?? null;
    if (height === null) continue;
    if (top === null || height > top) top = height;
    else descent = Math.max(descent, top - height);
  }
  return descent;
}
