import type { Draft } from './draft.ts';
import type { Sketch } from './sketch.ts';
import type { IfcPart } from './write-ifc.ts';

/**
 * What of a draft stands in a file that holds these parts: fixtures, piping, or both. Ports of what is left out go with
 * it, and so do connections to them. Whole when it holds both.
 */
export function draftPart(sketch: Sketch, draft: Draft, holds: readonly IfcPart[]): Draft {
  if (holds.includes('fixtures') && holds.includes('piping')) return draft;
  const fixtures = new Set(sketch.parts.flatMap((part) => (part.is === 'fixture' ? [part.name] : [])));
  const kept = draft.elements.map(({ name, line }) =>
    holds.includes(line === null && fixtures.has(name) ? 'fixtures' : 'piping'),
  );
  const places = renumbered(kept);
  const keptPorts = draft.ports.map(({ owner }) => kept[owner]!);
  const portPlaces = renumbered(keptPorts);
  return {
    elements: draft.elements
      .filter((_, index) => kept[index])
      .map((element) => ({ ...element, ports: element.ports.map((port) => portPlaces[port]!) })),
    ports: draft.ports.filter((_, index) => keptPorts[index]).map((port) => ({ ...port, owner: places[port.owner]! })),
    connections: draft.connections
      .filter(([a, b]) => keptPorts[a] && keptPorts[b])
      .map(([a, b]) => [portPlaces[a]!, portPlaces[b]!]),
  };
}

/** Place of each among the kept ones; -1 for the others. */
function renumbered(kept: readonly boolean[]): readonly number[] {
  let next = 0;
  return kept.map((stays) => (stays ? next++ : -1));
}
