import type { Element, SizeWitness } from '../model/model.ts';
import type { PipeDimensions } from '../tables/pipe-dimensions.ts';
import type { NominalSize, SizeSeries } from '../units/nominal-size.ts';
import { lengthOfText } from './size-text.ts';

export interface ModelledSize {
  /** null: the model says something that no size of the code means, or nothing. */
  readonly size: NominalSize | null;
  /** Witness that decided, or the one that could not be read; null where the model says nothing. */
  readonly from: string | null;
  readonly reason: 'no size in the model' | 'size cannot be read' | null;
  /** What could not be read, in millimetres or words. */
  readonly said: string | null;
  /** A name is all that tells it. */
  readonly isOnlyNamed: boolean;
  /** Another witness that means a different size. */
  readonly contradictedBy: { readonly size: NominalSize; readonly from: string } | null;
}

/** A nominal length means a size within this of it, an outside diameter within that (CONTRACT, sizes in the model). */
const nominalTolerance = 0.2;
const outerTolerance = 0.6;

const trustOrder: readonly SizeWitness['ground'][] = ['property', 'quantity', 'name', 'port', 'profile', 'measured'];

export const noSize: ModelledSize = {
  size: null,
  from: null,
  reason: 'no size in the model',
  said: null,
  isOnlyNamed: false,
  contradictedBy: null,
};

/** The size that the model gives a pipe, by the first witness the code's series can read. Witnesses that differ are kept. */
export function readSize(
  element: Pick<Element, 'sizes'>,
  series: SizeSeries,
  dimensions: PipeDimensions,
): ModelledSize {
  const ordered = [...element.sizes].sort((a, b) => rankOf(a) - rankOf(b));
  const read = ordered.map((witness) => ({ witness, size: sizeOf(witness, series, dimensions) }));
  const first = read.find(({ size }) => size !== null);
  if (first === undefined) {
    const said = ordered[0];
    if (said === undefined) return noSize;
    const words = said.text ?? (said.mm === null ? null : `${Number(said.mm.toFixed(1))} mm`);
    return { ...noSize, from: said.from, reason: 'size cannot be read', said: words };
  }
  const other = read.find(({ size, witness }) => size !== null && size !== first.size && witness.ground !== 'measured');
  return {
    size: first.size,
    from: first.witness.from,
    reason: null,
    said: null,
    isOnlyNamed: read.every(({ size, witness }) => size === null || witness.ground === 'name'),
    contradictedBy: other === undefined ? null : { size: other.size!, from: other.witness.from },
  };
}

/** Nominal before outer before unsaid, within one ground; an inner diameter is no witness of a nominal size. */
const rankOf = ({ ground, means }: SizeWitness): number =>
  trustOrder.indexOf(ground) * 4 + ['nominal', 'unknown', 'outer', 'inner'].indexOf(means);

/** The same few lengths and texts come back thousands of times in one model. */
const known = new WeakMap<SizeSeries, Map<string, NominalSize | null>>();

function sizeOf(witness: SizeWitness, series: SizeSeries, dimensions: PipeDimensions): NominalSize | null {
  const sizes = known.get(series) ?? new Map<string, NominalSize | null>();
  known.set(series, sizes);
  const key = `${witness.means} ${witness.mm} ${witness.text}`;
  let size = sizes.get(key);
  if (size === undefined) {
    size = witnessedSize(witness, series, dimensions);
    sizes.set(key, size);
  }
  return size;
}

function witnessedSize(witness: SizeWitness, series: SizeSeries, dimensions: PipeDimensions): NominalSize | null {
  if (witness.means === 'inner') return null;
  const said =
    witness.mm !== null
      ? { mm: witness.mm, nominal: false }
      : witness.text === null
        ? null
        : lengthOfText(witness.text);
  if (said === null) return null;
  const nominal = nominalHits(said.mm, series);
  if (said.nominal) return only(nominal);
  const outer = outerHits(said.mm, series, dimensions);
  const [before, after] = witness.means === 'outer' ? [outer, nominal] : [nominal, outer];
  return before.length > 0 ? only(before) : only(after);
}

/** Sizes that a bare length in millimetres may mean, for traps and outlets that a property states. */
export function sizeOfLength(mm: number, series: SizeSeries, dimensions: PipeDimensions): NominalSize | null {
  const nominal = nominalHits(mm, series);
  return nominal.length > 0 ? only(nominal) : only(outerHits(mm, series, dimensions));
}

const nominalHits = (mm: number, series: SizeSeries): NominalSize[] =>
  series.sizes
    .filter(({ lengthsMm }) => lengthsMm.some((one) => Math.abs(one - mm) <= nominalTolerance))
    .map(({ label }) => label);

function outerHits(mm: number, series: SizeSeries, dimensions: PipeDimensions): NominalSize[] {
  const hits = new Set<NominalSize>();
  for (const { rows } of dimensions) {
    for (const { dn, outerMm } of rows) {
      if (Math.abs(outerMm - mm) > outerTolerance) continue;
      const size = series.sizes.find((one) => one.dn === dn);
      if (size !== undefined) hits.add(size.label);
    }
  }
  return [...hits];
}

/** Two hits that differ are no answer. */
const only = (hits: readonly NominalSize[]): NominalSize | null => (hits.length === 1 ? hits[0]! : null);
