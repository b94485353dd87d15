import type { ElementClass, PropertyFact, SizeWitness } from '../../model/model.ts';
import { sizeInName } from '../../model/size-in-name.ts';
import { slopeOfAngle, slopeOfNumber, slopeOfText } from '../../model/slope-value.ts';
import { type Metres, metres } from '../../units/quantity.ts';
import type { Reading } from './property-sets.ts';

/** What the properties of one element come to, occurrence before type. */
export interface Witnessed {
  readonly sizes: readonly SizeWitness[];
  readonly slopes: readonly { readonly slope: number; readonly from: string }[];
  readonly statedLength: Metres | null;
  readonly properties: readonly PropertyFact[];
}

export interface Sources {
  readonly own: readonly Reading[];
  readonly ofType: readonly Reading[];
  /** Readings of the element's ports, with the port's name. */
  readonly ofPorts: readonly { readonly port: string; readonly reading: Reading }[];
}

export const nothingWitnessed: Witnessed = { sizes: [], slopes: [], statedLength: null, properties: [] };

/** Nothing under a millimetre is a pipe's size: zero and 0.000001 stand for "not known" in many models. */
const leastSize = 0.001;

/** Millionths of a millimetre are the dust of arithmetic. */
export const roundedMm = (mm: number): number => Math.round(mm * 1e6) / 1e6;

/** Merges property by property: where occurrence and type state the same one, the occurrence's holds. */
export function judged({ own, ofType, ofPorts }: Sources, kind: ElementClass): Witnessed {
  if (own.length === 0 && ofType.length === 0 && ofPorts.length === 0) return nothingWitnessed;
  const sizes: SizeWitness[] = [];
  const quantities: SizeWitness[] = [];
  const slopes: { readonly slope: number; readonly from: string }[] = [];
  const properties: PropertyFact[] = [];
  const sides: Partial<Record<'width' | 'depth', { readonly reading: Reading; readonly from: string }>> = {};
  let statedLength: Metres | null = null;

  const take = (reading: Reading, from: 'own' | 'type'): void => {
    const { meaning } = reading;
    const where = `${reading.set}.${reading.name}${from === 'type' ? ' (type)' : ''}`;
    switch (meaning.bears) {
      case 'size': {
        const witness = sizeWitness(reading, meaning.means, where);
        if (witness === null) break;
        (reading.isQuantity ? quantities : sizes).push(witness);
        break;
      }
      case 'side':
        if (kind === 'segment') sides[meaning.side] ??= { reading, from: where };
        break;
      case 'slope': {
        const slope = slopeOf(reading, meaning.form);
        if (slope !== null) slopes.push({ slope, from: where });
        break;
      }
      case 'length':
        if (typeof reading.value === 'number' && reading.value > 0 && reading.hasUnit)
          statedLength ??= metres(reading.value);
        break;
      case 'fact':
        properties.push(propertyFact(reading, from));
    }
  };
  for (const reading of own) take(reading, 'own');
  for (const reading of ofType) if (!own.some((one) => isSame(one, reading))) take(reading, 'type');

  const { width, depth } = sides;
  // Two sides alike are how some programs state a round section.
  if (width !== undefined && width.reading.value === depth?.reading.value) {
    const witness = sizeWitness(width.reading, 'unknown', width.from);
    if (witness !== null) sizes.push(witness);
  }
  sizes.push(...quantities);
  for (const { port, reading } of ofPorts) {
    if (reading.meaning.bears !== 'size') continue;
    const witness = sizeWitness(reading, reading.meaning.means, `${reading.set}.${reading.name} (port ${port})`);
    if (witness !== null) sizes.push({ ...witness, ground: 'port' });
  }
  return { sizes, slopes, statedLength, properties };
}

const isSame = (a: Reading, b: Reading): boolean => a.name === b.name && a.set === b.set;

function sizeWitness(reading: Reading, means: SizeWitness['means'], from: string): SizeWitness | null {
  const { value, measure, hasUnit, isQuantity } = reading;
  const ground = isQuantity ? 'quantity' : 'property';
  if (typeof value === 'string') return { means, mm: null, text: value, ground, from };
  if (typeof value !== 'number' || measure === 'angle') return null;
  if (hasUnit) return value > leastSize ? { means, mm: roundedMm(value * 1000), text: null, ground, from } : null;
  // A bare number: DN and Nennweite are millimetres by their meaning; others are left to whoever knows the sizes.
  if (!(value > 0)) return null;
  const isMillimetres = means === 'nominal' && value >= 15 && value <= 3000;
  return { means, mm: isMillimetres ? value : null, text: isMillimetres ? null : String(value), ground, from };
}

function slopeOf({ value, measure }: Reading, form: 'ratio' | 'one-in' | 'percent' | 'per-mille'): number | null {
  if (typeof value === 'string') return slopeOfText(value, form);
  if (typeof value !== 'number' || measure === 'length') return null;
  return measure === 'angle' ? slopeOfAngle(value) : slopeOfNumber(value, form);
}

function propertyFact({ set, name, value, measure }: Reading, from: 'own' | 'type'): PropertyFact {
  return { set, name, value, measure: measure === 'angle' ? 'number' : measure, from };
}

/** Size claims in the texts of an element: type name before object type before its own name. */
export function sizesInNames(
  texts: readonly (readonly [from: string, text: string | null, isType: boolean])[],
): SizeWitness[] {
  const found: SizeWitness[] = [];
  for (const [from, text, isType] of texts) {
    const claim = text === null ? null : sizeInName(text, isType);
    if (claim === null || found.some((one) => one.text === claim)) continue;
    found.push({ means: 'unknown', mm: null, text: claim, ground: 'name', from });
  }
  return found;
}
