import type { Check } from '../check.ts';
import { cleanoutSize } from '../cleanouts.ts';
import { cleanoutChecks } from '../rules/cleanout-checks.ts';
import type { Tools } from '../tools.ts';

/** Where drains open and how wide; the foot of a stack where the place still asks for one (708, R32, R34 to R37). */
export function cleanouts({ family, settings }: Tools): Check {
  const { rule, series } = family;
  const spacing = family.number('cleanout-spacing', 'length').value;
  return cleanoutChecks(
    {
      // Between two cleanouts the farthest place lies in the middle.
      spacing: { rule: rule('IPC-R32'), reach: (_, isBetween) => (isBetween ? spacing / 2 : spacing) },
      size: { rule: rule('IPC-R36'), least: cleanoutSize(family.table('cleanouts'), series) },
      buildingDrain: rule('IPC-R34'),
      footServes: family.number('junction-stack-distance', 'length').value,
      ...(settings.stackFootCleanout === true
        ? { stackFoot: { rule: rule('IPC-R37'), within: family.number('stack-cleanout-within', 'length').value } }
        : {}),
      bend: {
        rule: rule('IPC-R35'),
        turn: family.number('turn-cleanout-angle', 'angle').value,
        within: family.number('turn-cleanout-length', 'length').value,
      },
    },
    series,
  );
}
