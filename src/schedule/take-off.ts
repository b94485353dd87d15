import { readSize } from '../loads/read-size.ts';
import type { ElementId } from '../model/model.ts';
import type { PipeId } from '../network/network.ts';
import { fittingsOf } from '../study/row-fittings.ts';
import type { NominalSize } from '../units/nominal-size.ts';
import type { Outcome } from '../verdicts/outcome.ts';
import { csvText } from './csv-text.ts';
import { resultIndex } from './result-index.ts';
import { cautionFor } from './result-of.ts';
import { plainWords } from './trade-words.ts';

/** One line of the take-off: pipe of one kind, fittings or cleanouts of one kind. */
export interface TakeOffRow {
  readonly item: 'pipe' | 'fitting' | 'cleanout';
  /** Role of a pipe, kind of a fitting. */
  readonly what: string;
  /** Required; null where no size of the tables holds it. Of a junction `3 in × 2 in`: run and branch. */
  readonly size: string | null;
  /** As the model has it; null where it says nothing, and for fittings, which are counted from what meets at a joint. */
  readonly modelled: string | null;
  readonly storey: string | null;
  readonly material: string | null;
  /** Elements, or fittings. */
  readonly count: number;
  /** Metres of pipe without its fittings; null for what is counted only. */
  readonly length: number | null;
  /** With the halves of the fittings at its ends. */
  readonly developedLength: number | null;
}

/** Pipes, then fittings, then cleanouts; inside by storey as the model has them, role or kind, size, material. */
export function takeOff(outcome: Outcome): TakeOffRow[] {
  const { network, model } = outcome;
  const index = resultIndex(outcome);
  const storeyOrder = new Map(model.storeys.map(({ name }, at) => [name, at]));
  const order = (row: TakeOffRow): (string | number)[] => [
    items.indexOf(row.item),
    row.storey === null ? -1 : (storeyOrder.get(row.storey) ?? -1),
    row.what,
    -dnOf(row.size),
    row.size ?? '',
    row.modelled ?? '',
    row.material ?? '',
  ];
  const dns = new Map<string, number>(outcome.code.series.sizes.map(({ label, dn }) => [label, dn]));
  const dnOf = (size: string | null): number => (size === null ? 0 : (dns.get(size.split(' × ')[0]!) ?? 0));
  const rows = [...pipeRows(), ...fittingRows(), ...cleanoutRows()];
  return rows
    .map((row) => ({ row, key: order(row) }))
    .sort((a, b) => compareKeys(a.key, b.key))
    .map(({ row }) => row);

  function place(element: ElementId | null): { storey: string | null; material: string | null } {
    return element === null
      ? { storey: null, material: null }
      : { storey: index.storeyOf(element), material: model.elements[element]!.material };
  }

  function pipeRows(): TakeOffRow[] {
    const groups = new Map<string, TakeOffRow & { elements: Set<ElementId> }>();
    for (const { id, element, length } of network.pipes) {
      if (element === null) continue;
      const row = {
        item: 'pipe' as const,
        what: plainWords(outcome.shown.roles.uses[id]!.role),
        size: requiredOf(outcome, id),
        modelled: outcome.shown.loads.modelled[id]!.size,
        ...place(element),
      };
      const key = JSON.stringify(row);
      const known = groups.get(key);
      const elements = (known?.elements ?? new Set<ElementId>()).add(element);
      groups.set(key, {
        ...row,
        elements,
        count: elements.size,
        length: (known?.length ?? 0) + length,
        developedLength: (known?.developedLength ?? 0) + outcome.paths.stream.span(id),
      });
    }
    return [...groups.values()].map(({ elements: _, ...row }) => row);
  }

  function fittingRows(): TakeOffRow[] {
    const fittings = fittingsOf(
      outcome,
      network.pipes.map(({ id }) => id),
      () => false,
    );
    return counted(
      fittings.map(({ kind, angle, size, branch, pipe }) => ({
        item: 'fitting',
        what: angle === null ? plainWords(kind) : `${plainWords(kind)} ${angle}°`,
        size: branch === null ? size : `${size} × ${branch}`,
        modelled: null,
        ...place(network.pipes[pipe]!.element),
      })),
    );
  }

  function cleanoutRows(): TakeOffRow[] {
    const { identities, code } = outcome;
    const found = [...network.jointsOf]
      .sort(([a], [b]) => a - b)
      .flatMap(([element, joints]) => {
        if (identities[element]?.part !== 'cleanout') return [];
        const served = joints
          .flatMap((joint) => network.joints[joint]!.pipes)
          .flatMap((pipe) => requiredOf(outcome, pipe) ?? outcome.shown.loads.modelled[pipe]!.size ?? []);
        const largest = served.length === 0 ? null : served.reduce(code.series.larger);
        return [
          {
            item: 'cleanout' as const,
            what: 'cleanout',
            size: largest === null ? null : (code.cleanouts?.sizeFor(largest) ?? largest),
            modelled: readSize(model.elements[element]!, code.series, code.dimensions).size,
            ...place(element),
          },
        ];
      });
    return counted(found);
  }
}

const items: readonly TakeOffRow['item'][] = ['pipe', 'fitting', 'cleanout'];

const requiredOf = ({ pipes }: Outcome, pipe: PipeId): NominalSize | null => pipes[pipe]!.required?.most ?? null;

function counted(things: readonly Omit<TakeOffRow, 'count' | 'length' | 'developedLength'>[]): TakeOffRow[] {
  const groups = new Map<string, TakeOffRow>();
  for (const thing of things) {
    const key = JSON.stringify(thing);
    groups.set(key, { ...thing, count: (groups.get(key)?.count ?? 0) + 1, length: null, developedLength: null });
  }
  return [...groups.values()];
}

function compareKeys(a: readonly (string | number)[], b: readonly (string | number)[]): number {
  for (const [at, left] of a.entries()) {
    const right = b[at]!;
    if (left !== right) return left < right ? -1 : 1;
  }
  return 0;
}

/** The take-off as CSV for any spreadsheet, the code and the caution behind it. */
export function takeOffCsv(outcome: Outcome): string {
  const { code } = outcome;
  const head = [
    'item',
    'what',
    'size required',
    'size modelled',
    'storey',
    'material',
    'count',
    'length m',
    'developed length m',
  ];
  const metres = (value: number | null): string | number => (value === null ? '' : Math.round(value * 1000) / 1000);
  const rows = takeOff(outcome).map((row) => [
    row.item,
    row.what,
    row.size ?? '',
    row.modelled ?? '',
    row.storey ?? '',
    row.material ?? '',
    row.count,
    metres(row.length),
    metres(row.developedLength),
  ]);
  return csvText([head, ...rows, ['note', `${code.title}, ${code.edition} (${code.id})`], ['note', cautionFor(code)]]);
}
