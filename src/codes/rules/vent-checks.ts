import { type Finding, finding } from '../../findings/finding.ts';
import type { RuleEntry } from '../../tables/rule-list.ts';
import type { NominalSize, SizeSeries } from '../../units/nominal-size.ts';
import { coordinateMetres } from '../../units/uncertainty.ts';
import type { Check, CheckedDrain } from '../check.ts';
import { islandDescentOf } from './island.ts';

/** Some vent of every building drain reaches open air as large as the code asks; null: it asks for none of that drain. */
export const mainVentCheck = (
  { id, clause }: RuleEntry,
  { rank }: SizeSeries,
  leastOf: (drain: CheckedDrain) => NominalSize | null,
): Check => ({
  id,
  run: ({ drains }) =>
    drains.flatMap((drain): Finding[] => {
      const least = leastOf(drain);
      const { elements, widestVent } = drain;
      if (least === null || (widestVent !== null && rank(widestVent) >= rank(least))) return [];
      return [finding('main-vent-missing', elements, { least, widest: widestVent }, clause)];
    }),
});

/** Only some fixtures may be vented by a pipe that turns down again on its way. */
export const islandVents = (
  { id, clause }: RuleEntry,
  { allows, allowed }: { readonly allows: (row: string) => boolean; readonly allowed: string },
): Check => ({
  id,
  run: ({ vents, traps }) =>
    vents.flatMap((vent): Finding[] => {
      if (vent.descent < islandDescentOf(vent)) return [];
      const barred = vent.traps.find(({ row }) => !allows(row));
      if (barred === undefined) return [];
      const kind = traps.find(({ element }) => element === barred.element)?.kind ?? barred.row;
      return [finding('island-vent-not-allowed', [...vent.elements, barred.element], { allowed, kind }, clause)];
    }),
});

/** Vents through the roof where frost may close them: a drawn end narrower than the code's least is noted. */
export const frostCheck = ({ id, clause }: RuleEntry, { rank }: SizeSeries, least: NominalSize): Check => ({
  id,
  run: ({ drains }) =>
    drains.flatMap(({ mouths }) =>
      mouths.flatMap(({ elements, how, drawn }): Finding[] =>
        how === 'valve' || drawn === null || rank(drawn) >= rank(least)
          ? []
          : [finding('frost-enlargement-missing', elements, { size: drawn, least }, clause)],
      ),
    ),
});

/** A valve stands at least so far above the drain that it vents, metres. */
export const valveHeight = ({ id, clause }: RuleEntry, least: number): Check => ({
  id,
  run: ({ vents }) =>
    vents.flatMap(({ elements, mouth, rise }): Finding[] =>
      mouth !== 'valve' || rise === null || rise >= least - coordinateMetres
        ? []
        : [finding('valve-not-allowed', elements, { heightM: rise, leastM: least }, clause)],
    ),
});
