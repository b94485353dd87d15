import type { BatteryTrap } from '../codes/battery.ts';
import type { Row } from './row.ts';

/** What people call a fixture: its name, else what it is and its STEP id. */
export function nameOf(
  { outcome: { model, paths, identities } }: Row,
  { fixture }: Pick<BatteryTrap, 'fixture'>,
): string {
  const { element } = paths.fixtures[fixture]!;
  const { name, stepId } = model.elements[element]!;
  return name ?? `${(identities[element]!.kind ?? 'fixture').replaceAll('-', ' ')} #${stepId}`;
}
