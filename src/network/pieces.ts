import type { Identity } from '../model/identity.ts';
import { bodyNode, endNode, type Piping } from './piping.ts';
import type { Welds } from './welds.ts';

/** Connected pieces of piping: by node, true where something in its piece says that it drains or vents. */
export interface Pieces {
  isDrainage(node: number): boolean;
}

const saysDrainage = ({ medium, part }: Identity): boolean =>
  medium === 'sanitary' ||
  medium === 'vent' ||
  part === 'fixture' ||
  part === 'trap' ||
  part === 'cleanout' ||
  part === 'sewer-connection';

export function findPieces(identities: readonly Identity[], piping: Piping, welds: Welds): Pieces {
  const parent = Int32Array.from({ length: welds.nodes }, (_, node) => welds.root(node));
  const find = (node: number): number => {
    let at = node;
    while (parent[at] !== at) {
      parent[at] = parent[parent[at]!]!;
      at = parent[at]!;
    }
    return at;
  };
  const unite = (a: number, b: number): void => {
    parent[find(b)] = find(a);
  };
  piping.pipes.forEach((_, pipe) => {
    for (const node of [endNode(pipe, 1), ...welds.wallsOn(pipe)]) unite(endNode(pipe, 0), node);
  });
  for (const { bodies } of welds.links) unite(bodyNode(piping, bodies[0]), bodyNode(piping, bodies[1]));
  const drains = new Uint8Array(welds.nodes);
  piping.pipes.forEach(({ element }, pipe) => {
    if (saysDrainage(identities[element]!)) drains[find(endNode(pipe, 0))] = 1;
  });
  piping.bodies.forEach(({ element }, body) => {
    if (saysDrainage(identities[element]!)) drains[find(bodyNode(piping, body))] = 1;
  });
  return { isDrainage: (node) => drains[find(node)] === 1 };
}
