import { rowAtSize } from '../../tables/find-row.ts';
import type { NominalSize } from '../../units/nominal-size.ts';
import type { Check } from '../check.ts';
import { cleanoutChecks } from '../rules/cleanout-checks.ts';
import { widthOf } from '../rules/vent-sizes.ts';
import type { Tools } from '../tools.ts';

/**
 * Cleanouts of the lowest drains at their upper ends, along them and where they have turned, and one at each urinal on any
 * floor (707, R28 to R32); in some editions at kitchen sinks too.
 */
export function cleanouts({ family }: Tools): Check {
  const { rule, series } = family;
  const spacing = family.number('cleanout-spacing', 'length').value;
  const sizes = family.table('cleanouts');
  const rowOf = (pipe: NominalSize) =>
    rowAtSize(sizes, 'pipe', pipe, 'smaller', series) ?? rowAtSize(sizes, 'pipe', pipe, 'larger', series);
  const sinks = family.number('cleanout-kitchen-sink', 'count').value;
  return cleanoutChecks(
    {
      spacing: { rule: rule('UPC-R28'), reach: (_, isBetween) => (isBetween ? spacing / 2 : spacing) },
      size: {
        rule: rule('UPC-R32'),
        least: (pipe) => {
          const bore = Number(rowOf(pipe)?.amount('cleanout').value ?? 0) * 1000;
          const { label } = series.sizes.find((one) => widthOf(series, one.label) >= bore - roundingMm) ?? {
            label: pipe,
          };
          return label;
        },
        printed: (pipe) => `${String(rowOf(pipe)?.printed('cleanout') ?? '?').replace('.5', '½')} in`,
      },
      upperEnd: { rule: rule('UPC-R28'), free: family.number('cleanout-free-length', 'length').value },
      turns: { rule: rule('UPC-R29'), turn: family.number('cleanout-turn', 'angle').value },
      urinal: rule('UPC-R30'),
      ...(sinks > 0 ? { kitchenSink: rule('UPC-R31') } : {}),
    },
    series,
  );
}

/** Printed inches are exact in millimetres but for this. */
const roundingMm = 0.1;
