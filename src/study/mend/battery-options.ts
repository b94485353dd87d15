import type { BatteryTrap } from '../../codes/battery.ts';
import type { Reading } from '../../codes/use.ts';
import type { Finding } from '../../findings/finding.ts';
import type { JointId } from '../../network/network.ts';
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
  const asked = new Set([...battery.broken, ...circuitOf(battery)].map(({ finding }) => finding));
  return distinct([
    ...readingOptions(scene, battery, why),
    ...(asked.has('relief-vent-missing') ? reliefOptions(scene, battery, why) : []),
    ...(asked.has('additional-circuit-vent-missing') ? additionalOptions(scene, battery, why) : []),
    ...facts.traps
      .filter(({ ownVent, free }) => !ownVent && !free)
      .flatMap(({ fixture }) => ownVentOptions(scene, fixture, why, 2)),
    ...(asked.has('circuit-vent-not-allowed') ? movedFoot(scene, battery, why) : []),
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

/** Circuit venting as another reading that lacks nothing but vents: a relief vent or more. */
export const lacksVentsOnly = (battery: Battery): boolean => {
  const broken = circuitOf(battery);
  return broken.length > 0 && broken.every(({ finding }) => byAnotherVent.has(finding));
};

const byAnotherVent: ReadonlySet<string> = new Set(['relief-vent-missing', 'additional-circuit-vent-missing']);

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

function footOptions(scene: Scene, { facts }: Battery, feet: readonly (PlaceAt | null)[], why: Finding): Option[] {
  const flood = scene.flood([...facts.traps, ...facts.guests].map(({ fixture }) => fixture));
  return feet.flatMap((foot) => {
    if (foot === null) return [];
    return ventOptions(scene, { foot, why, about: elementsAt(scene, foot.place), flood }, 2);
  });
}
