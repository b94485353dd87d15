import type { Outcome } from '../verdicts/outcome.ts';
import type { ResultCounts, ResultElement } from './result.ts';

/** Every distribution element once, by file and STEP id. */
export function elements({ model, network }: Outcome): ResultElement[] {
  return model.elements.map(({ id, globalId, stepId, file, ifcClass }) => {
    const { use, reason } = network.fates[id]!;
    return {
      globalId,
      stepId,
      file: model.files[file]!.name,
      class: ifcClass,
      use,
      ...(reason === null ? {} : { reason }),
    };
  });
}

/** The uses add up to the elements. */
export function counts({ network }: Outcome): ResultCounts {
  const of = (use: string): number => network.fates.filter((fate) => fate.use === use).length;
  const leftOut: Record<string, number> = {};
  for (const { use, reason } of network.fates) {
    if (use === 'left-out') leftOut[reason ?? 'not said'] = (leftOut[reason ?? 'not said'] ?? 0) + 1;
  }
  return {
    elements: network.fates.length,
    pipes: of('pipe'),
    fittings: of('fitting'),
    fixtures: of('fixture'),
    terminals: of('terminal'),
    leftOut: Object.fromEntries(Object.entries(leftOut).sort(([a], [b]) => (a < b ? -1 : 1))),
    unresolved: of('unresolved'),
  };
}
