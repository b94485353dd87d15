import { shownText } from './shown-text.ts';
import { sideBySide } from './side-by-side.ts';
import { blank, heading, paragraph, type TextLine } from './text-line.ts';
import { counted, listed } from './trade-words.ts';
import type { WeighBattery, WeighResult } from './weigh.ts';
import { weighRows } from './weigh-rows.ts';
import { ventedText } from './weigh-verdict.ts';

/** Each battery side by side under every reading; batteries that come out alike are told once. */
export function weighText(result: WeighResult): TextLine[] {
  const { batteries, code, model, models } = result;
  const files = listed((models ?? [model]).map(({ file }) => shownText(file)));
  if (batteries.length === 0)
    return [
      ...paragraph(`${files}: no battery of fixtures shares a vent: there is nothing to weigh.`, ''),
      ...paragraph(shownText(result.caution), '', 'quiet'),
    ];
  const groups = alike(batteries);
  return [
    ...paragraph(
      `${files}, ${code.id}: ${counted(batteries.length, 'battery')} weighed. * as modelled; lengths are developed lengths.`,
      '',
    ),
    ...groups.flatMap((group) => batteryText(group, result.currency)),
    blank,
    ...paragraph(shownText(result.caution), '', 'quiet'),
  ];
}

function batteryText([first, ...others]: readonly WeighBattery[], currency: string | undefined): TextLine[] {
  const { id, title, storey, modelled, why, alternatives, verdict } = first!;
  const where = storey === null ? '' : `, ${shownText(storey)}`;
  const same =
    others.length === 0 ? '' : ` So ${others.length === 1 ? 'is' : 'are'} ${listed(others.map((one) => one.id))}.`;
  return [
    blank,
    ...heading(`${id}: ${shownText(title)}${where}`),
    ...paragraph(`Modelled ${ventedText(modelled)}: ${shownText(why)}.${same}`),
    ...sideBySide(weighRows(alternatives, currency)),
    ...paragraph(shownText(verdict), '  => ', 'good'),
  ];
}

/** Batteries whose alternatives differ in nothing but names, in the order of the first of each kind. */
function alike(batteries: readonly WeighBattery[]): WeighBattery[][] {
  const groups = new Map<string, WeighBattery[]>();
  for (const battery of batteries) {
    const { title, modelled, why, alternatives } = battery;
    const told = alternatives.map(({ sections: _, resizes, adds, leavesOut, ...rest }) => ({
      ...rest,
      wall:
        rest.wall === null
          ? null
          : { ...rest.wall, modelled: rest.wall.modelled.map(({ cavity, loadBearing }) => [cavity, loadBearing]) },
      broken: rest.broken.map(({ rule, facts }) => [rule, facts]),
      resizes: resizes.length,
      adds: adds.map(({ role, size, length }) => [role, size, length]),
      leavesOut: leavesOut.map(({ role, length }) => [role, length]),
    }));
    const key = JSON.stringify([title, modelled, why, roundedLengths(told)]);
    groups.set(key, [...(groups.get(key) ?? []), battery]);
  }
  return [...groups.values()];
}

/** Coordinates of two storeys differ in their last digits: what agrees to a millimetre is alike. */
const roundedLengths = (value: unknown): unknown =>
  JSON.parse(JSON.stringify(value), (_, part: unknown) =>
    typeof part === 'number' ? Math.round(part * 1000) / 1000 : part,
  ) as unknown;
