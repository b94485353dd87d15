import type { Vec3 } from '../geometry/vector.ts';
import type { TwinPlaces } from './twin-places.ts';
import type { Unit } from './twin-units.ts';

/**
 * Members of a family that are drawn alike to a tenth of a millimetre, together: between them there is no difference, and
 * one stands for all. Forms and their members in the order of the family.
 */
export function twinForms(places: TwinPlaces, family: readonly Unit[]): Unit[][] {
  const forms = new Map<string, Unit[]>();
  for (const unit of family) {
    const form = formOf(places, unit);
    const known = forms.get(form);
    if (known === undefined) forms.set(form, [unit]);
    else known.push(unit);
  }
  return [...forms.values()];
}

function formOf(places: TwinPlaces, unit: Unit): string {
  const { network, paths, shown } = places.outcome;
  const fixtures = unit.fixtures.map((fixture) => {
    const { row, trap } = shown.loads.fixtures[fixture]!;
    const { how } = shown.roles.venting[fixture]!;
    return [...rounded(places.fixtureAt(unit, fixture)), row.id, trap, how].join(' ');
  });
  const pipes = unit.pipes.map((pipe) => {
    const { size } = shown.loads.modelled[pipe]!;
    const { slope } = paths.slopes[pipe]!;
    return [
      ...rounded(places.pipeAt(unit, pipe)),
      tenths(network.pipes[pipe]!.length),
      size,
      paths.wet[pipe],
      slope === null ? null : Math.round(slope * 1e6),
      shown.roles.uses[pipe]!.role,
    ].join(' ');
  });
  return JSON.stringify([fixtures.sort(), pipes.sort()]);
}

const tenths = (metres: number): number => Math.round(metres * 1e4);
const rounded = (at: Vec3 | null): readonly (number | null)[] => (at === null ? [null] : at.map(tenths));
