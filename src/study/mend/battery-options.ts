import type { BatteryTrap } from '../../codes/battery.ts';
import type { Reading } from '../../codes/reading.ts';
import type { Finding } from '../../findings/finding.ts';
import type { JointId } from '../../network/network.ts';
import type { FixtureId } from '../../paths/paths.ts';
import type { Battery } from '../../roles/roles.ts';
import { unchanged } from '../changed-piping.ts';
import { withReading } from '../edits.ts';
import { rowOf } from '../row.ts';
import { footBehind, isFreeAbove, type PlaceAt, placeOf } from '../vent-feet.ts';
import type { Option } from './change.ts';
import { movedVentOptions } from './moved-vent.ts';
import type { Scene } from './scene.ts';
import { distinct, ownPlaces, ownVentOptions } from './trap-items.ts';
import { elementsAt, jointPlace, ventOptions } from './vent-changes.ts';

/**
 * Ways to put a battery right: read another way that holds; a relief vent; additional circuit vents; vents of their own
 * for some of its traps; its main vent on another place of the first fixture's drain.
 */
export function batteryOptions(scene: Scene, battery: Battery, why: Finding): Option[] {
  const { facts } = battery;
  return distinct([
    ...readingOptions(scene, battery, why),
    ...missingVents(scene, battery, why),
    ...facts.traps
      .filter(({ ownVent, free }) => !ownVent && !free)
      .flatMap(({ fixture }) => ownVentOptions(scene, fixture, why, 2)),
    ...(battery.reading === 'circuit-vent' && startsWrong(battery) ? movedFoot(scene, battery, why) : []),
  ]);
}

/** Readings that hold as the piping stands. */
export function readingOptions({ outcome, costs }: Scene, { facts, reading, others }: Battery, why: Finding): Option[] {
  const about = facts.traps.map(({ fixture }) => outcome.paths.fixtures[fixture]!.element);
  return others
    .filter(({ broken }) => broken.length === 0)
    .map(
      ({ reading: to }): Option => ({
        key: `reading ${to} ${outcome.model.elements[about[0]!]!.globalId}`,
        cost: costs.weights.reading,
        change: { kind: 'reading', about, from: reading, to, apply: (piping) => withReading(piping, about, to) },
        pins: [],
        why,
      }),
    );
}

/**
 * What may take the place of larger pipe in a battery: another reading that holds, or what circuit venting still lacks,
 * where that is vents or the place of its main one.
 */
export function otherwiseOptions(scene: Scene, battery: Battery, why: Finding): Option[] {
  const readings = readingOptions(scene, battery, why);
  const broken = circuitOf(battery);
  const lacksVents = broken.every((one) => byAnotherVent.has(one.finding) || one.facts.trapsAtStart !== undefined);
  if (battery.reading === 'circuit-vent' || broken.length === 0 || !lacksVents) return readings;
  return [
    ...readings,
    ...missingVents(scene, battery, why),
    ...(startsWrong(battery) ? movedFoot(scene, battery, why) : []),
  ];
}

/** Relief and additional circuit vents that circuit venting asks for. A relief vent of its own may stand nearer than a drain. */
function missingVents(scene: Scene, battery: Battery, why: Finding): Option[] {
  const asked = new Set(circuitOf(battery).map(({ finding }) => finding));
  const additional = asked.has('additional-circuit-vent-missing');
  const nearer = additional && battery.facts.circuit.relief?.kind === 'drain';
  return [
    ...(asked.has('relief-vent-missing') || nearer ? reliefOptions(scene, battery, why) : []),
    ...(additional ? additionalOptions(scene, battery, why) : []),
  ];
}

const byAnotherVent: ReadonlySet<string> = new Set(['relief-vent-missing', 'additional-circuit-vent-missing']);

/** As circuit vented, its main vent stands where it may not. */
const startsWrong = (battery: Battery): boolean =>
  circuitOf(battery).some(({ facts }) => facts.trapsAtStart !== undefined);

const circuitOf = ({ reading, broken, others }: Battery) =>
  reading === ('circuit-vent' satisfies Reading)
    ? broken
    : (others.find((other) => other.reading === 'circuit-vent')?.broken ?? []);

/** On the level branch behind its last fixture: a little behind it, and at the joints that follow. */
export function reliefOptions(scene: Scene, battery: Battery, why: Finding): Option[] {
  const { outcome, stream } = scene;
  const row = rowOf(outcome, battery);
  const last = battery.facts.circuit.traps.at(-1);
  if (last === undefined) return [];
  const behind = footBehind(row, last.joins);
  const feet: (PlaceAt | null)[] = [behind === null ? null : placeOf(row, unchanged(outcome), behind)];
  let joint = last.joins;
  for (let steps = 0; steps < 3; steps++) {
    const pipe = stream.outflow[joint] ?? null;
    if (pipe === null || outcome.paths.vertical[pipe] === true) break;
    joint = stream.down(pipe);
    const out = stream.outflow[joint] ?? null;
    if (out === null || outcome.shown.roles.uses[out]!.stack !== null) break;
    if (isFreeAbove(scene, joint)) feet.push(jointPlace(scene, joint));
  }
  return footOptions(scene, battery, feet, why);
}

/** On the line between the fixtures of every stretch that is too long, and at its bends. */
export function additionalOptions(scene: Scene, battery: Battery, why: Finding): Option[] {
  const { outcome, stream } = scene;
  const { additionalAfter, turnDegrees } = outcome.code.batteryLimits;
  const { branch, stretches, traps } = battery.facts.circuit;
  const row = rowOf(outcome, battery);
  const joints = branch.map((pipe) => stream.down(pipe));
  const feet: (PlaceAt | null)[] = [];
  for (const { from, to, traps: count, turnDegrees: turned } of stretches) {
    const first = joints.indexOf(from) + 1;
    const end = joints.indexOf(to);
    const inside = joints.slice(first, end < 0 ? joints.length : end);
    if (count > additionalAfter) {
      const joining = distinctJoints(traps).filter((joint) => joint === from || inside.includes(joint));
      const least = Math.max(1, count - additionalAfter);
      for (const joint of joining.slice(least - 1, additionalAfter)) {
        const foot = footBehind(row, joint);
        if (foot !== null) feet.push(placeOf(row, unchanged(outcome), foot));
      }
    }
    if (turned > turnDegrees)
      for (const joint of inside) if (isFreeAbove(scene, joint)) feet.push(jointPlace(scene, joint));
  }
  return footOptions(scene, battery, feet, why);
}

const distinctJoints = (traps: readonly BatteryTrap[]): JointId[] => [...new Set(traps.map(({ joins }) => joins))];

/** The main vent rises from another place of the first fixture's drain. */
function movedFoot(scene: Scene, { facts }: Battery, why: Finding): Option[] {
  const first = facts.circuit.traps[0];
  const head = facts.traps[0];
  return [...new Set([first, head])].flatMap((trap) =>
    trap === undefined
      ? []
      : ownPlaces(scene, trap.fixture).flatMap((to) => movedVentOptions(scene, facts.foot, to, why)),
  );
}

/** A vent that stands too near to its trap, set farther down its drain. */
export function nearVentMoved(scene: Scene, fixture: FixtureId, why: Finding): Option[] {
  const { armEnd, foot } = scene.outcome.paths.traps[fixture]!;
  if (armEnd === null || foot !== armEnd) return [];
  return ownPlaces(scene, fixture).flatMap((to) => movedVentOptions(scene, armEnd, to, why));
}

function footOptions(scene: Scene, { facts }: Battery, feet: readonly (PlaceAt | null)[], why: Finding): Option[] {
  const flood = scene.flood([...facts.traps, ...facts.guests].map(({ fixture }) => fixture));
  return feet.flatMap((foot) => {
    if (foot === null) return [];
    return ventOptions(scene, { foot, why, about: elementsAt(scene, foot.place), flood }, 3);
  });
}
