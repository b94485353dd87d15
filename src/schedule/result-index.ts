import type { ElementId } from '../model/model.ts';
import type { JointId, PipeId } from '../network/network.ts';
import type { FixtureId } from '../paths/paths.ts';
import type { NominalSize } from '../units/nominal-size.ts';
import type { Outcome } from '../verdicts/outcome.ts';
import type { SizeLabel, SizeRange } from './result.ts';

/** Look-ups from dense ids to what the result prints. */
export interface ResultIndex {
  /** GlobalId of an element; with its file and STEP id where the model doubles or lacks it. */
  idOf(element: ElementId): string;
  /** GlobalIds of the elements of pipes, each once, in the order given; links have none. */
  idsOf(pipes: readonly PipeId[]): string[];
  fixtureId(fixture: FixtureId): string;
  size(size: NominalSize): SizeLabel;
  sizeRange(range: { readonly least: NominalSize | null; readonly most: NominalSize | null } | null): SizeRange | null;
  storeyOf(element: ElementId): string | null;
  /** The next pipe downstream that is an element of its own: links and sections of the same element are passed. */
  nextElement(pipe: PipeId): string | null;
  at(joint: JointId): readonly [number, number, number] | null;
  batteryName(battery: number): string;
}

export function resultIndex(outcome: Outcome): ResultIndex {
  const { model, network, paths, code } = outcome;
  const counts = new Map<string, number>();
  for (const { globalId } of model.elements) counts.set(globalId, (counts.get(globalId) ?? 0) + 1);
  const ids = model.elements.map(({ globalId, file, stepId }) =>
    globalId !== '' && counts.get(globalId) === 1 ? globalId : `${globalId}#${file}.${stepId}`,
  );
  const idOf = (element: ElementId): string => ids[element]!;
  const dn = new Map(code.series.sizes.map((size) => [size.label, size.dn]));
  const size = (label: NominalSize): SizeLabel => ({ label, dn: dn.get(label)! });
  return {
    idOf,
    idsOf: (pipes) => [...new Set(pipes.flatMap((pipe) => network.pipes[pipe]!.element ?? []))].map(idOf),
    fixtureId: (fixture) => idOf(paths.fixtures[fixture]!.element),
    size,
    sizeRange: (range) =>
      range === null
        ? null
        : {
            least: range.least === null ? null : size(range.least),
            most: range.most === null ? null : size(range.most),
          },
    storeyOf: (element) => {
      const { storey, box, centreLine, origin } = model.elements[element]!;
      if (storey !== null) return model.storeys[storey]!.name;
      const z = centreLine?.points[0]?.[2] ?? box?.min[2] ?? origin?.[2];
      return z === undefined ? null : (model.storeys.findLast(({ elevation }) => elevation <= z + 1e-6)?.name ?? null);
    },
    nextElement: (pipe) => {
      const own = network.pipes[pipe]!.element;
      for (let next = paths.next[pipe] ?? null; next !== null; next = paths.next[next] ?? null) {
        const { element } = network.pipes[next]!;
        if (element !== null && element !== own) return idOf(element);
      }
      return null;
    },
    at: (joint) => network.joints[joint]!.at,
    batteryName: (battery) => `battery-${battery + 1}`,
  };
}

/** Millimetres of coordinates: two machines print the same metres. */
export const roundMetres = (value: number): number => Math.round(value * 1e6) / 1e6 + 0;
