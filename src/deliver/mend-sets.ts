import {
  labelToWrite,
  type PropertySetToWrite,
  type PropertyToWrite,
  propertiesToWrite,
  textToWrite,
} from '../model/property-set.ts';
import { elementRows } from '../schedule/element-rows.ts';
import type { MendChange, MendResult } from '../schedule/mend.ts';
import type { Result } from '../schedule/result.ts';
import { sentence } from '../schedule/trade-words.ts';

/**
 * What a plan writes into one file: a set on every element that a change concerns, with the change, the proposed size
 * and why, and one for the building. In the order of the changes. Nothing that is drawn moves.
 */
export function mendSets(plan: MendResult, result: Result, file: string): PropertySetToWrite[] {
  const rows = elementRows(result);
  const concerned = new Map<string, { change: MendChange; step: number }[]>();
  plan.changes.forEach((change, at) => {
    for (const globalId of change.about)
      concerned.set(globalId, [...(concerned.get(globalId) ?? []), { change, step: at + 1 }]);
  });
  const sets = [...concerned].flatMap(([globalId, changes]): PropertySetToWrite[] => {
    const row = rows.get(globalId);
    if (row === undefined || row.file !== file) return [];
    return [{ name: 'Drainwright_Mend', on: row.stepId, properties: elementProperties(changes, plan) }];
  });
  return [...sets, { name: 'Drainwright_Mend', on: 'building', properties: planProperties(plan) }];
}

function elementProperties(
  changes: readonly { readonly change: MendChange; readonly step: number }[],
  plan: MendResult,
): PropertyToWrite[] {
  const size = changes.find(({ change }) => change.size !== undefined)?.change.size;
  const slope = changes.find(({ change }) => change.slope !== undefined)?.change.slope;
  const reading = changes.find(({ change }) => change.reading !== undefined)?.change.reading;
  const vents = changes.flatMap(({ change: { vent, to } }) => (vent === undefined ? [] : [to]));
  return propertiesToWrite({
    Change: textToWrite(changes.map(({ change: { kind, from, to } }) => words(kind, from, to)).join(' ')),
    Step: labelToWrite(changes.map(({ step }) => `${step} of ${plan.changes.length}`).join(', ')),
    ModelledSize: size === undefined ? null : labelToWrite(size.from.label),
    ProposedSize: size === undefined ? null : labelToWrite(size.to.label),
    ProposedSlope: slope === undefined ? null : { as: 'real', value: slope.to },
    ProposedReading: reading === undefined ? null : labelToWrite(reading.to),
    ProposedVent: textToWrite(vents.join('; ')),
    Because: textToWrite(changes.map(({ change }) => sentence(change.why)).join(' ')),
    Code: labelToWrite(plan.code.id),
  });
}

const kinds: Readonly<Record<MendChange['kind'], string>> = {
  size: 'Size',
  vent: 'New vent',
  'moved-vent': 'Vent moved',
  'extended-vent': 'Vent goes on',
  reading: 'Read as',
  slope: 'Fall',
  trap: 'Trap',
  cleanout: 'New',
};

const words = (kind: MendChange['kind'], from: string | null, to: string): string =>
  sentence(`${kinds[kind]}: ${from === null ? '' : `from ${from} `}${from === null ? '' : 'to '}${to}`);

function planProperties({ changes, before, after, cost, search, code, caution }: MendResult): PropertyToWrite[] {
  return propertiesToWrite({
    Changes: { as: 'integer', value: changes.length },
    ErrorsBefore: { as: 'integer', value: before.errors },
    ErrorsAfter: { as: 'integer', value: after.errors },
    Cost: { as: 'real', value: cost },
    Search: textToWrite(search.sentence),
    Code: labelToWrite(code.id),
    Caution: textToWrite(caution),
  });
}
