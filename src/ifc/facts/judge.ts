import type { ElementClass, PropertyFact, SizeWitness } from '../../model/model.ts';
import { sizeInName } from '../../model/size-in-name.ts';
import { slopeOfAngle, slopeOfNumber, slopeOfText } from '../../model/slope-value.ts';
import { type Metres, metres } from '../../units/quantity.ts';
import type { PortReading } from './property-readings.ts';
import type { Reading } from './property-sets.ts';

/** What the properties of one element come to, occurrence before type. `sizes` is the element's own list to add to. */
export interface Witnessed {
  readonly sizes: SizeWitness[];
  readonly slopes: readonly { readonly slope: number; readonly from: string }[];
  readonly statedLength: Metres | null;
  readonly properties: readonly PropertyFact[];
}

/** Nothing under a millimetre is a pipe's size: zero and 0.000001 stand for "not known" in many models. */
const leastSize = 0.001;
/** Nor is anything of a kilometre, in metres. */
const largestSize = 1000;

/** Longest pipe that a property may state, in metres. */
const longestPipe = 1e6;

/** Millionths of a millimetre are the dust of arithmetic. */
export const roundedMm = (mm: number): number => Math.round(mm * 1e6) / 1e6;

const noSlopes: Witnessed['slopes'] = [];
const noFacts: readonly PropertyFact[] = [];

/** Merges property by property: where occurrence and type state the same one, the occurrence's holds. */
export function judged(
  own: readonly Reading[],
  ofType: readonly Reading[],
  ofPorts: readonly PortReading[],
  kind: ElementClass,
): Witnessed {
  if (own.length === 0 && ofType.length === 0 && ofPorts.length === 0) {
    return { sizes: [], slopes: noSlopes, statedLength: null, properties: noFacts };
  }
  const verdict = new Verdict(kind);
  for (let k = 0; k < own.length; k++) verdict.take(own[k]!, false);
  for (let k = 0; k < ofType.length; k++) if (!states(own, ofType[k]!)) verdict.take(ofType[k]!, true);
  return verdict.close(ofPorts);
}

function states(own: readonly Reading[], { set, name }: Reading): boolean {
  for (let k = 0; k < own.length; k++) if (own[k]!.name === name && own[k]!.set === set) return true;
  return false;
}

/** Gathers the witnesses of one element. */
class Verdict {
  private readonly kind: ElementClass;
  private readonly sizes: SizeWitness[] = [];
  private quantities: SizeWitness[] | null = null;
  private slopes: { readonly slope: number; readonly from: string }[] | null = null;
  private properties: PropertyFact[] | null = null;
  private statedLength: Metres | null = null;
  private width: SizeWitness | null = null;
  private depth: SizeWitness | null = null;

  constructor(kind: ElementClass) {
    this.kind = kind;
  }

  take(reading: Reading, isOfType: boolean): void {
    const { meaning } = reading;
    switch (meaning.bears) {
      case 'size': {
        const witness = sizeWitness(reading, meaning.means, placeOf(reading, isOfType));
        if (witness === null) return;
        if (!reading.isQuantity) this.sizes.push(witness);
        else if (this.quantities === null) this.quantities = [witness];
        else this.quantities.push(witness);
        return;
      }
      case 'side': {
        if (this.kind !== 'segment') return;
        const witness = sizeWitness(reading, 'unknown', placeOf(reading, isOfType));
        if (meaning.side === 'width') this.width ??= witness;
        else this.depth ??= witness;
        return;
      }
      case 'slope': {
        const slope = slopeOf(reading, meaning.form);
        if (slope === null) return;
        this.slopes ??= [];
        this.slopes.push({ slope, from: placeOf(reading, isOfType) });
        return;
      }
      case 'length':
        if (typeof reading.value === 'number' && reading.value > 0 && reading.value < longestPipe && reading.hasUnit) {
          this.statedLength ??= metres(reading.value);
        }
        return;
      case 'fact':
        // Of elements that carry no water only the fact that they are there counts.
        if (this.kind === 'other') return;
        this.properties ??= [];
        this.properties.push(propertyFact(reading, isOfType ? 'type' : 'own'));
    }
  }

  close(ofPorts: readonly PortReading[]): Witnessed {
    const { sizes, width, depth, slopes, statedLength, properties } = this;
    // Two sides alike are how some programs state a round section.
    if (width !== null && depth !== null && width.mm === depth.mm && width.text === depth.text) sizes.push(width);
    if (this.quantities !== null) sizes.push(...this.quantities);
    for (const { port, reading } of ofPorts) {
      const { meaning, set, name } = reading;
      if (meaning.bears !== 'size') continue;
      const witness = sizeWitness(reading, meaning.means, `${set}.${name} (port ${port})`);
      if (witness !== null) sizes.push({ ...witness, ground: 'port' });
    }
    return { sizes, slopes: slopes ?? noSlopes, statedLength, properties: properties ?? noFacts };
  }
}

/** The place named last: most elements of a model state the same property in the same set. */
let lastPlace = { set: '', name: '', isOfType: false, text: '.' };

function placeOf({ set, name }: Reading, isOfType: boolean): string {
  if (lastPlace.set !== set || lastPlace.name !== name || lastPlace.isOfType !== isOfType) {
    lastPlace = { set, name, isOfType, text: isOfType ? `${set}.${name} (type)` : `${set}.${name}` };
  }
  return lastPlace.text;
}

function sizeWitness(reading: Reading, means: SizeWitness['means'], from: string): SizeWitness | null {
  const { value, measure, hasUnit, isQuantity } = reading;
  const ground = isQuantity ? 'quantity' : 'property';
  if (typeof value === 'string') return { means, mm: null, text: value, ground, from };
  if (typeof value !== 'number' || measure === 'angle' || !(value > 0)) return null;
  if (hasUnit)
    return value > leastSize && value < largestSize
      ? { means, mm: roundedMm(value * 1000), text: null, ground, from }
      : null;
  // A bare number: DN and Nennweite are millimetres by their meaning; others are left to whoever knows the sizes.
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

const mostRemembered = 20_000;

/** Remembers which texts claim a size, and the witness that comes of it: the same few stand on every pipe. */
export class NamedSizes {
  private readonly witnesses = new Map<string, Map<string, SizeWitness | null>>();

  /** The witness in a text, see `sizeInName`; null where it claims nothing. */
  of(text: string, isType: boolean, from: string): SizeWitness | null {
    let memory = this.witnesses.get(from);
    if (memory === undefined) {
      memory = new Map();
      this.witnesses.set(from, memory);
    }
    const known = memory.get(text);
    if (known !== undefined) return known;
    const claim = sizeInName(text, isType);
    const witness: SizeWitness | null =
      claim === null ? null : { means: 'unknown', mm: null, text: claim, ground: 'name', from };
    if (memory.size < mostRemembered) memory.set(text, witness);
    return witness;
  }
}

/** Adds the witness of a text, unless another text claimed the same. */
export function addNamedSize(into: SizeWitness[], witness: SizeWitness | null): void {
  if (witness === null || into.some((one) => one.ground === 'name' && one.text === witness.text)) return;
  into.push(witness);
}
