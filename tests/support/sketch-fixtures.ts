import type { FixtureKind } from '../../src/model/identity.ts';

/** How the notation's fixture words stand in IFC. `type` is the plain type name; details refine it. */
export interface FixtureWord {
  readonly kind: FixtureKind | null;
  readonly ifcClass: string;
  readonly predefined: string | null;
  readonly type: string;
  /** Property set that the standard gives to this kind, with the name of its outlet size where it has one. */
  readonly set: string | null;
  readonly outlet: string | null;
  /** Width, depth, height of the body in metres, and how far the rim lies over the floor. */
  readonly body: readonly [number, number, number];
  readonly rim: number;
}

const sanitary = (
  kind: FixtureKind,
  predefined: string,
  type: string,
  set: string | null,
  body: FixtureWord['body'],
  rim: number,
): FixtureWord => ({
  kind,
  ifcClass: 'IfcSanitaryTerminal',
  predefined,
  type,
  set: set && `Pset_SanitaryTerminalType${set}`,
  outlet: set && !['ToiletPan', 'Urinal'].includes(set) ? 'DrainSize' : null,
  body,
  rim,
});

const waste = (
  kind: FixtureKind,
  predefined: string,
  type: string,
  set: string,
  body: FixtureWord['body'],
): FixtureWord => ({
  kind,
  ifcClass: 'IfcWasteTerminal',
  predefined,
  type,
  set: `Pset_WasteTerminalType${set}`,
  outlet: 'OutletConnectionSize',
  body,
  rim: 0,
});

/** Body sizes and rims: common practice, no source. */
export const fixtureWords: Readonly<Record<string, FixtureWord>> = {
  'water-closet': sanitary('water-closet', 'TOILETPAN', 'Water closet', 'ToiletPan', [0.37, 0.7, 0.78], 0.4),
  urinal: sanitary('urinal', 'URINAL', 'Urinal', 'Urinal', [0.36, 0.34, 0.7], 0.6),
  lavatory: sanitary('lavatory', 'WASHHANDBASIN', 'Lavatory', 'WashHandBasin', [0.5, 0.45, 0.2], 0.82),
  sink: sanitary('sink', 'SINK', 'Sink', 'Sink', [0.6, 0.5, 0.22], 0.9),
  'kitchen-sink': sanitary('kitchen-sink', 'SINK', 'Kitchen sink', 'Sink', [0.8, 0.5, 0.22], 0.91),
  'mop-sink': sanitary('mop-sink', 'SINK', 'Mop sink', 'Sink', [0.6, 0.6, 0.3], 0.3),
  'laundry-tray': sanitary('laundry-tray', 'SINK', 'Laundry tray', 'Sink', [0.6, 0.55, 0.35], 0.86),
  'clinical-sink': sanitary('clinical-sink', 'SINK', 'Clinical sink', 'Sink', [0.5, 0.55, 0.4], 0.45),
  shower: sanitary('shower', 'SHOWER', 'Shower', 'Shower', [0.9, 0.9, 0.1], 0.06),
  bathtub: sanitary('bathtub', 'BATH', 'Bathtub', 'Bath', [0.75, 1.52, 0.5], 0.5),
  bidet: sanitary('bidet', 'BIDET', 'Bidet', 'Bidet', [0.37, 0.56, 0.4], 0.4),
  'drinking-fountain': sanitary(
    'drinking-fountain',
    'SANITARYFOUNTAIN',
    'Drinking fountain',
    'SanitaryFountain',
    [0.35, 0.35, 0.25],
    0.9,
  ),
  'wash-fountain': sanitary(
    'wash-fountain',
    'SANITARYFOUNTAIN',
    'Wash fountain',
    'SanitaryFountain',
    [1.2, 0.6, 0.3],
    0.8,
  ),
  'dental-unit': sanitary('dental-unit', 'USERDEFINED', 'Dental unit', null, [0.5, 0.5, 0.9], 0.8),
  'clothes-washer': sanitary('clothes-washer', 'USERDEFINED', 'Clothes washer standpipe', null, [0.25, 0.1, 0.2], 1),
  'floor-drain': waste('floor-drain', 'FLOORTRAP', 'Floor drain', 'FloorTrap', [0.2, 0.2, 0.05]),
  'garbage-grinder': waste(
    'garbage-grinder',
    'WASTEDISPOSALUNIT',
    'Garbage grinder',
    'WasteDisposalUnit',
    [0.2, 0.2, 0.35],
  ),
  dishwasher: {
    kind: 'dishwasher',
    ifcClass: 'IfcElectricAppliance',
    predefined: 'DISHWASHER',
    type: 'Dishwasher',
    set: null,
    outlet: null,
    body: [0.6, 0.6, 0.85],
    rim: 0.2,
  },
  /** A thing that nobody named: a terminal without a kind. */
  thing: {
    ...sanitary('other-fixture', 'USERDEFINED', 'object', null, [0.5, 0.5, 0.5], 0.5),
    kind: null,
    predefined: null,
  },
};

/** What the lines about a fixture said beyond its kind; null where nothing was said. */
export interface FixtureDetails {
  readonly flush: 'tank' | 'valve' | null;
  readonly style: string | null;
  readonly heads: number | null;
  readonly emergency: boolean;
  /** No trap inside although the class would say so: a floor drain over a drawn trap. */
  readonly untrapped: boolean;
}

/** Type name a designer would give: `Stall urinal`, `Water closet, flush tank`, `Shower, 3 heads`. */
export function typeNameOf(word: FixtureWord, { flush, style, heads, emergency }: FixtureDetails): string {
  const styled: Record<string, string> = {
    stall: 'Stall urinal',
    washout: 'Wall urinal, washout',
    wall: 'Wall urinal',
    siphon: 'Wall urinal, siphon jet',
    pedestal: 'Pedestal urinal',
  };
  if (word.kind === 'urinal') return styled[style ?? ''] ?? word.type;
  if (emergency) return `Emergency ${word.type.toLowerCase()}`;
  if (heads !== null) return `${word.type}, ${heads} ${heads === 1 ? 'head' : 'heads'}`;
  const base = style === null ? word.type : `${word.type}, ${style}`;
  return flush === null ? base : `${base}, flush ${flush}`;
}
