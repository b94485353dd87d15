import type { ResultFinding } from '../../schedule/result.ts';
import type { Desk } from './desk.ts';
import { batteryName, capital, pipeName, shown } from './names.ts';

/** Where a finding belongs, for a list by battery and stack or by storey. Keys of one name sort together. */
export function placeOf(desk: Desk, finding: ResultFinding, by: 'place' | 'storey'): string {
  const { building, words } = desk;
  const { result } = building;
  const pipe = finding.about.map((id) => building.pipeAt.get(id)).find((row) => row !== undefined);
  const fixture = finding.about.map((id) => building.fixtureAt.get(id)).find((row) => row !== undefined);
  if (by === 'storey') {
    const storey = pipe === undefined ? result.fixtures[fixture ?? -1]?.storey : result.pipes[pipe]?.storey;
    return storey == null ? capital(words.legend.noStorey) : shown(storey);
  }
  const battery = result.batteries.find(
    ({ id, fixtures }) =>
      id === result.pipes[pipe ?? -1]?.battery ||
      (fixture !== undefined && fixtures.includes(result.fixtures[fixture]!.globalId)),
  );
  if (battery !== undefined) return words.battery.one(batteryName(battery.id));
  const stack = stackBelow(
    desk,
    pipe ?? building.data.scene.pipes.pipe[building.data.scene.paths.first[fixture ?? -1] ?? -1] ?? -1,
  );
  return stack === null ? words.findings.elsewhere : words.findings.stack(pipeName(building, words, stack));
}

/** The foot of the stack that a pipe's water runs into; of a vent the stack that it stands on is not looked for. */
function stackBelow({ building }: Desk, from: number): number | null {
  const { pipes } = building.result;
  let stack: number | null = null;
  let at: number | undefined = from < 0 ? undefined : from;
  for (let steps = 0; at !== undefined && steps <= pipes.length; steps++) {
    const pipe = pipes[at];
    if (pipe?.role === 'stack') stack = at;
    else if (stack !== null) break;
    at = pipe?.next == null ? undefined : building.pipeAt.get(pipe.next);
  }
  return stack;
}
