import { lengthText, loadText, sizeText, slopeText } from '../schedule/number-text.ts';
import type { ResultPipe } from '../schedule/result.ts';
import { plainWords } from '../schedule/trade-words.ts';
import { type Column, table } from './html-element.ts';
import type { Section } from './report-section.ts';
import type { ReportSource } from './report-source.ts';

/** Pipe by role, size, storey and material; fittings; cleanouts. null: there is no drainage. */
export function takeOffSection({ takeOff }: ReportSource): Section | null {
  if (takeOff.length === 0) return null;
  const metres = (value: number | null): string => (value === null ? '' : value.toFixed(2));
  return {
    id: 'take-off',
    title: 'Take-off',
    parts: [
      table(
        'In the sizes that the code asks for; fittings are counted from what meets at each joint',
        [
          { head: 'Item', cell: ({ item }) => item, as: 'word' },
          { head: 'What', cell: ({ what }) => what },
          { head: 'Size needed', cell: ({ size }) => size ?? '', as: 'word' },
          { head: 'Size drawn', cell: ({ modelled }) => modelled ?? '', as: 'word' },
          { head: 'Storey', cell: ({ storey }) => storey ?? '' },
          { head: 'Material', cell: ({ material }) => material ?? '' },
          { head: 'Count', cell: ({ count }) => count, as: 'number' },
          { head: 'Length, m', cell: ({ length }) => metres(length), as: 'number' },
          { head: 'Developed, m', cell: ({ developedLength }) => metres(developedLength), as: 'number' },
        ],
        takeOff,
      ),
    ],
  };
}

/** Every pipe with what it is, carries and needs; null: there is none. */
export function pipeSection({ result, names }: ReportSource): Section | null {
  if (result.pipes.length === 0) return null;
  const columns: readonly Column<ResultPipe>[] = [
    { head: 'Pipe', cell: ({ globalId }) => names.of(globalId) },
    { head: 'Role', cell: ({ role, also }) => [role, ...also].map(plainWords).join(', '), as: 'word' },
    { head: 'Storey', cell: ({ storey }) => storey ?? '' },
    { head: 'Load', cell: ({ load, ventLoad }) => loadOf(load, ventLoad, result.code.unit) },
    { head: 'Length', cell: ({ developedLength, length }) => lengthOf(developedLength ?? length), as: 'number' },
    { head: 'Slope', cell: ({ slope }) => slopeOf(slope) },
    { head: 'Drawn', cell: ({ modelled }) => modelled?.label ?? '?', as: 'word' },
    {
      head: 'Needed',
      cell: ({ required, provisional }) => `${sizeText(required)}${provisional ? ', provisional' : ''}`,
    },
    { head: 'Verdict', cell: ({ verdict, reason }) => (reason === undefined ? verdict : `${verdict}: ${reason}`) },
    { head: 'Clause', cell: ({ trail }) => trail.find(({ governs }) => governs)?.clause ?? '' },
  ];
  return {
    id: 'pipes',
    title: 'Pipe schedule',
    parts: [
      table(
        'In the order of the model; the length is the developed one where that chose the size',
        columns,
        result.pipes,
      ),
    ],
  };
}

function loadOf(load: ResultPipe['load'], ventLoad: ResultPipe['ventLoad'], unit: string): string {
  if (ventLoad === undefined) return loadText(load, unit);
  return load.most === 0
    ? `vents ${loadText(ventLoad, unit)}`
    : `${loadText(load, unit)}, vents ${loadText(ventLoad, unit)}`;
}

const lengthOf = (length: number | null): string => (length === null ? '' : lengthText(length));

function slopeOf(slope: ResultPipe['slope']): string {
  if (slope === null) return 'vertical';
  return slope.value === null ? 'not drawn' : slopeText(slope.value);
}
