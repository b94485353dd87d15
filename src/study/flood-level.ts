import type { FixtureId } from '../paths/paths.ts';
import type { Outcome } from '../verdicts/outcome.ts';

/** A fixture without a shape floods this high over its floor at most: common practice, no source. */
const usualRim = 0.9;

/** Height in metres above which a fixture cannot fill: the top of its body, else the usual rim over its floor. */
export function floodLevel({ model, network, paths, shown }: Outcome, fixture: FixtureId): number {
  const { element, outlet } = paths.fixtures[fixture]!;
  const top = model.elements[element]!.box?.max[2];
  if (top !== undefined) return top;
  const { floors } = shown.roles;
  const floor = floors.elevations[floors.of(paths.fixtures[fixture]!)] ?? floors.elevations[0] ?? 0;
  return Math.max(floor + usualRim, network.joints[outlet]!.at?.[2] ?? 0);
}
