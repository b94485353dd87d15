import type { Desk } from './desk.ts';

/** The pipe that brings it most; of equal ones the one of the same role, then the last in the result's order. */
export function upstreamOf({ building }: Desk, row: number): number | undefined {
  const own = building.result.pipes[row];
  const id = own?.globalId;
  let best: number | undefined;
  building.result.pipes.forEach(({ next, load, role }, index) => {
    if (next !== id || index === row) return;
    if (best === undefined || load.most > building.result.pipes[best]!.load.most) best = index;
    else if (load.most === building.result.pipes[best]!.load.most && role === own?.role) best = index;
  });
  return best;
}

/** A pipe alone says little: its battery comes with it, or the pipes of its whole water and air. */
export function connectedRows({ building }: Desk, row: number): readonly number[] {
  const pipe = building.result.pipes[row]!;
  const battery = building.result.batteries.find(({ id }) => id === pipe.battery);
  const rows = new Set([row]);
  const { pipe: rowOf } = building.data.scene.pipes;
  const addSection = (section: number): void => {
    const of = rowOf[section] ?? -1;
    if (of >= 0) rows.add(of);
  };
  const fixtures =
    battery === undefined
      ? [...building.servesWater(row), ...building.servesAir(row)]
      : battery.fixtures.flatMap((id) => building.fixtureAt.get(id) ?? []);
  for (const fixture of fixtures) {
    for (const section of building.water(fixture)) {
      addSection(section);
      if (rowOf[section] === row) break;
    }
    const { arm, through, dry } = building.air(fixture);
    for (const section of [...arm, ...through, ...dry]) addSection(section);
  }
  return [...rows].sort((a, b) => a - b);
}
