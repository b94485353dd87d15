import type { Finding } from '../../findings/finding.ts';
import type { ElementId } from '../../model/model.ts';
import type { FixtureId } from '../../paths/paths.ts';
import type { Stack } from '../../roles/find-stacks.ts';
import type { Battery } from '../../roles/roles.ts';
import type { NominalSize } from '../../units/nominal-size.ts';
import { batteryOptions, nearVentMoved, otherwiseOptions } from './battery-options.ts';
import type { Item, Option } from './change.ts';
import { relayArmOptions, relayPipeOptions, slopeOptions, steeperOptions, trapMoveOptions } from './drain-options.ts';
import { lineOf, placeOf } from './places.ts';
import type { Scene } from './scene.ts';
import { distinct, ownVentOptions, trapOptions } from './trap-items.ts';
import {
  extensionOptions,
  mainVentOptions,
  offsetReliefOptions,
  stackVentOptions,
  ventStackOptions,
  yokeOptions,
} from './vent-items.ts';

/** Errors that larger or smaller pipe alone settles. */
export const bySizeAlone: ReadonlySet<Finding['code']> = new Set(['undersized', 'smaller-downstream']);

/**
 * What is wrong in one state of the building, with the changes that may settle each: the errors that no larger pipe
 * settles, then the undersized pipes of each cause that something else may settle too. In a fixed order.
 */
export function itemsOf(scene: Scene): Item[] {
  const { findings } = scene.outcome;
  const items = findings
    .filter(({ severity, code }) => severity === 'error' && !bySizeAlone.has(code))
    .map((finding): Item => {
      const { options, tier, place } = settled(scene, finding);
      return { key: keyOf(scene, finding), finding, options, mayStay: false, tier, place };
    });
  return [...items.sort((a, b) => a.tier - b.tier), ...undersizedItems(scene)];
}

/** The same for the same finding in another state: what is wrong, and where. */
export const keyOf = ({ outcome }: Pick<Scene, 'outcome'>, { code, about, facts }: Finding): string =>
  `${code} ${outcome.model.elements[about[0] ?? -1]?.globalId ?? ''} ${facts.what ?? facts.rule ?? ''}`;

type Settled = Pick<Item, 'options' | 'tier' | 'place'>;

function settled(scene: Scene, finding: Finding): Settled {
  const { outcome } = scene;
  const { code, facts } = finding;
  const fixture = fixtureOf(scene, finding);
  const at = (place: string, tier: Item['tier'], options: readonly Option[]): Settled => ({ place, tier, options });
  switch (code) {
    case 'no-open-air':
      return at(keyOf(scene, finding), 1, extensionOptions(scene, finding));
    case 'stack-vent-missing':
      return at(
        keyOf(scene, finding),
        2,
        ofStack(scene, finding, (stack) => stackVentOptions(scene, stack, finding)),
      );
    case 'vent-stack-missing':
      return at(
        keyOf(scene, finding),
        3,
        ofStack(scene, finding, (stack) => ventStackOptions(scene, stack, finding)),
      );
    case 'yoke-vent-missing':
      return at(
        `${keyOf(scene, finding)} ${facts.storey}`,
        3,
        ofStack(scene, finding, (stack) => yokeOptions(scene, stack, Number(facts.storey), finding)),
      );
    case 'offset-relief-vent-missing':
      return at(
        keyOf(scene, finding),
        3,
        outcome.shown.roles.stacks.flatMap((stack) => offsetReliefOptions(scene, stack, finding)),
      );
    case 'main-vent-missing':
      return at(keyOf(scene, finding), 3, mainVentOptions(scene, facts.least as NominalSize, finding));
    case 'unvented-trap':
      if (typeof facts.battery === 'number') break;
      return fixture === null
        ? at('nowhere', 3, [])
        : at(lineOf(outcome, fixture), 3, trapOptions(scene, fixture, finding));
    case 'trap-arm-too-long':
    case 'trap-arm-too-steep':
      return fixture === null
        ? at('nowhere', 3, [])
        : at(lineOf(outcome, fixture), 3, [
            ...ownVentOptions(scene, fixture, finding),
            ...(facts.what === 'too short' ? nearVentMoved(scene, fixture, finding) : []),
            ...(code === 'trap-arm-too-steep' ? relayArmOptions(scene, fixture, finding) : []),
          ]);
    case 'slope-too-small':
      return at(
        fixture === null ? placeOf(outcome, finding.about[0]!) : lineOf(outcome, fixture),
        3,
        slopeOptions(scene, finding),
      );
    case 'backfall':
      return at(placeOf(outcome, finding.about[0]!), 3, relayPipeOptions(scene, finding));
    case 'outlet-pipe-too-long':
      return at(fixture === null ? 'nowhere' : lineOf(outcome, fixture), 3, trapMoveOptions(scene, finding));
    default:
      break;
  }
  const battery = typeof facts.battery === 'number' ? batteryWith(scene, facts.battery) : undefined;
  const first = battery?.facts.traps[0];
  return battery === undefined || first === undefined
    ? at('nowhere', 3, [])
    : at(lineOf(outcome, first.fixture), 3, batteryOptions(scene, battery, finding));
}

const batteryWith = ({ outcome }: Scene, id: number): Battery | undefined =>
  outcome.shown.roles.batteries.find(({ facts }) => facts.id === id);

function fixtureOf({ outcome }: Scene, { about }: Finding): FixtureId | null {
  return outcome.paths.fixtures.find(({ element }) => element === about[0])?.id ?? null;
}

function ofStack({ outcome }: Scene, { about }: Finding, options: (stack: Stack) => Option[]): Option[] {
  const stack = outcome.shown.roles.stacks.find(({ pipes }) =>
    pipes.some((pipe) => outcome.network.pipes[pipe]!.element === about[0]),
  );
  return stack === undefined ? [] : options(stack);
}

/** Undersized pipes of one cause, where another reading, a relief vent or a steeper fall may take the place of size. */
function undersizedItems(scene: Scene): Item[] {
  const { outcome } = scene;
  const groups = new Map<string, Finding[]>();
  for (const finding of outcome.findings) {
    if (finding.code !== 'undersized') continue;
    const cause = String(finding.facts.cause);
    groups.set(cause, [...(groups.get(cause) ?? []), finding]);
  }
  return [...groups.values()].flatMap((group): Item[] => {
    const [first] = group;
    if (first === undefined) return [];
    const elements = group.map(({ about }) => about[0] as ElementId);
    const battery = Number(/ battery (\d+)$/.exec(String(first.facts.cause))?.[1] ?? Number.NaN) - 1;
    const row = Number.isNaN(battery) ? undefined : batteryWith(scene, battery);
    const options = distinct([
      ...(row === undefined ? [] : otherwiseOptions(scene, row, first)),
      ...steeperOptions(scene, elements, first),
    ]);
    if (options.length === 0) return [];
    const key = `undersized ${elements.map((element) => outcome.model.elements[element]!.globalId).join(' ')}`;
    const head = row?.facts.traps[0];
    const place = head === undefined ? placeOf(outcome, elements[0]!) : lineOf(outcome, head.fixture);
    return [{ key, finding: first, options, mayStay: true, tier: 3, place }];
  });
}
