import type { Identity } from '../model/identity.ts';
import type { Element, Model } from '../model/model.ts';

/** Why an element has no part in sanitary drainage. */
export type LeftOutReason =
  | 'rainwater'
  | 'supply'
  | 'heating'
  | 'gas'
  | 'duct'
  | 'cable'
  | 'electrical'
  | 'fire protection'
  | 'accessory'
  | 'equipment'
  | 'other system'
  | 'answer'
  | 'file apart'
  | 'double'
  | 'sleeve or insulation'
  | 'no drainage'
  | 'unknown terminal';

/**
 * Reason by what the identity says, or null when the element takes part. A fixture belongs to drainage whatever system
 * feeds it, except one that takes rain.
 */
export function leftOutReason(element: Element, identity: Identity, model: Model): LeftOutReason | null {
  const { part, medium } = identity;
  if (medium === 'storm') return 'rainwater';
  if (part === 'not-drainage') return reasonByClass(element) ?? reasonBySystem(element, model) ?? reasonByKind(element);
  if (part === 'fixture') return null;
  if (medium === 'supply') return reasonBySystem(element, model) ?? 'supply';
  if (medium === 'other') return reasonBySystem(element, model) ?? reasonByClass(element) ?? 'other system';
  return null;
}

const byClass: readonly (readonly [RegExp, LeftOutReason])[] = [
  [/DUCT|AIRTERMINAL|DAMPER|\bIFCFAN|AIRTOAIR|FILTER|CHIMNEY/, 'duct'],
  [/CABLE/, 'cable'],
  [/SPACEHEATER|BOILER|COIL|RADIATOR|HEATEXCHANGER|CHILLER|COOLINGTOWER|UNITARYEQUIPMENT|BURNER/, 'heating'],
  [/FIRESUPPRESSION/, 'fire protection'],
  [
    /ELECTRIC|LIGHT|LAMP|OUTLET|SWITCH|JUNCTIONBOX|ALARM|SENSOR|ACTUATOR|CONTROLLER|PROTECTIVE|TRANSFORMER|MOTOR|COMMUNICATION|AUDIOVISUAL|SOLARDEVICE|DISTRIBUTIONCONTROL/,
    'electrical',
  ],
];

function reasonByClass({ ifcClass, typeClass }: Element): LeftOutReason | null {
  const text = `${typeClass ?? ''} ${ifcClass}`.toUpperCase();
  return byClass.find(([pattern]) => pattern.test(text))?.[1] ?? null;
}

const bySystem: readonly (readonly [RegExp, LeftOutReason])[] = [
  [/HEAT|CHILLED|CONDENSER|COOLING|HEIZ|CHAUFFAGE|VERWARMING|BAUTEILAKTIVIERUNG/, 'heating'],
  [/FIRE|SPRINKLER/, 'fire protection'],
  [/\bGAS|FUEL|OIL\b/, 'gas'],
  [/AIRCONDITIONING|VENTILATION|EXHAUST|\bHVAC\b|\bAIR\b|DUCT/, 'duct'],
  [/ELECTRIC|LIGHTING|POWER|DATA\b|TELEPHONE|SIGNAL|EARTHING|LIGHTNING/, 'electrical'],
  [/STORM|RAIN|ROOF DRAIN|REGEN|PLUVIAL|HEMELWATER/, 'rainwater'],
  [/COLDWATER|HOTWATER|WATERSUPPLY|DOMESTIC|POTABLE|SUPPLY/, 'supply'],
];

function reasonBySystem({ systems }: Element, model: Model): LeftOutReason | null {
  for (const id of systems) {
    const system = model.systems[id];
    if (system === undefined) continue;
    const said = [system.predefinedType, system.name, system.longName, system.objectType];
    const text = said
      .filter((word) => word !== null)
      .join(' ')
      .toUpperCase();
    const hit = bySystem.find(([pattern]) => pattern.test(text));
    if (hit !== undefined) return hit[1];
  }
  return null;
}

const reasonByKind = ({ kind }: Element): LeftOutReason => (kind === 'terminal' ? 'accessory' : 'equipment');

/** True when the user's answers leave out one of the element's systems, by name or GlobalId. */
export function isAnsweredOut({ systems }: Element, model: Model, leaveOut: readonly string[]): boolean {
  return (
    leaveOut.length > 0 &&
    systems.some((id) => {
      const system = model.systems[id];
      return (
        system !== undefined &&
        [system.globalId, system.name, system.longName].some((name) => name !== null && leaveOut.includes(name))
      );
    })
  );
}
