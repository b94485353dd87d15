import type { BatteryTrap, Broken } from '../codes/battery.ts';
import { planTurn } from '../paths/turns.ts';
import type { NominalSize } from '../units/nominal-size.ts';
import { additionalFeet } from './additional-feet.ts';
import { type Attempt, asModelled, attempt, type Obstacle, obstacleOf } from './attempt.ts';
import { type ChangedPiping, unchanged } from './changed-piping.ts';
import { nameOf } from './fixture-name.ts';
import type { Row } from './row.ts';
import { type Foot, footBehind, footOfTrap, isFreeAbove } from './vent-feet.ts';
import { ventFrom, ventsFrom } from './vent-route.ts';

/**
 * The row circuit vented. Where its main vent may stay as the circuit vent, only relief and additional circuit vents are
 * added; else a circuit vent rises from the drain of the first fixture on the level line, and what may not be circuit
 * vented gets vents of its own. What cannot be built comes back as the conditions that no added pipe mends.
 */
export function circuitAlternative(row: Row): Attempt | readonly Obstacle[] {
  const { battery, outcome } = row;
  if (battery.reading === 'circuit-vent') return asModelled(row);
  const broken = battery.others.find(({ reading }) => reading === 'circuit-vent')?.broken ?? [];
  const vents = broken.every(({ finding }) => byAnotherVent.has(finding));
  if (vents) return withReliefAndMore(row, unchanged(outcome), battery.facts.circuit.traps);
  const chosen = circuitVented(row);
  if ('unmended' in chosen) return unmended(broken, chosen.unmended);
  const piping = ventsFrom(row, unchanged(outcome), chosen.feet);
  return piping === null ? unmended(broken, {}) : withReliefAndMore(row, piping, chosen.traps);
}

/** Of the conditions broken as modelled, the one that carries the facts; all but those that another vent mends else. */
function unmended(broken: readonly Broken[], facts: Broken['facts']): Obstacle[] {
  const [key] = Object.keys(facts);
  const own = broken.filter((one) => key !== undefined && one.facts[key] !== undefined);
  const others = broken.filter(({ finding }) => !byAnotherVent.has(finding));
  return (own.length > 0 ? own : others).map((one) => obstacleOf({ ...one, facts: { ...one.facts, ...facts } }));
}

const byAnotherVent: ReadonlySet<string> = new Set(['relief-vent-missing', 'additional-circuit-vent-missing']);

/** The fixtures on the last level stretch that may share one circuit vent, and the vents that this asks for. */
function circuitVented(
  row: Row,
): { traps: BatteryTrap[]; feet: { foot: Foot; name: string }[] } | { unmended: Broken['facts'] } {
  const { battery, outcome } = row;
  const { facts } = battery;
  const drop = facts.line.findLastIndex((pipe) => outcome.paths.vertical[pipe] === true);
  const level = facts.traps.filter(({ place }) => place > drop);
  if (level.length < 2) return { unmended: { verticalPipes: verticalOf(row), levelFixtures: level.length } };
  const traps = ofOneKind(row, level);
  const first = traps[0];
  if (first === undefined) return { unmended: { smallOutlets: smallOutlets(row) } };
  const feet: { foot: Foot; name: string }[] = [];
  for (const trap of facts.traps) {
    if (traps.includes(trap) || trap.ownVent || trap.free) continue;
    const foot = footOfTrap(row, trap, true);
    if (foot === null) return { unmended: {} };
    feet.push({ foot, name: `Vent of ${nameOf(row, trap)}` });
  }
  const alone = traps.filter(({ joins }) => joins === first.joins).length === 1;
  const start: Foot | null =
    alone && isFreeAbove(row, first.joins) ? { joint: first.joins } : footOfTrap(row, first, true);
  if (start === null) return { unmended: {} };
  return { traps, feet: [...feet, { foot: start, name: 'Circuit vent' }] };
}

const verticalOf = ({ battery, outcome }: Row): number =>
  battery.facts.line.filter((pipe) => outcome.paths.vertical[pipe] === true).length;

const smallOutlets = ({ battery }: Row): number =>
  battery.others
    .flatMap(({ broken }) => broken)
    .reduce((most, { facts }) => Math.max(most, Number(facts.smallOutlets ?? 0)), 0);

/** Small outlets and larger ones need circuit vents apart: the larger ones stay, unless there is only one. */
function ofOneKind({ battery, outcome }: Row, traps: readonly BatteryTrap[]): BatteryTrap[] {
  const { rank } = outcome.code.series;
  const mixed = battery.others
    .flatMap(({ broken }) => broken)
    .find(({ facts }) => typeof facts.smallBelow === 'string');
  if (mixed === undefined) return [...traps];
  const border = rank(mixed.facts.smallBelow as NominalSize);
  const large = traps.filter(({ size }) => rank(size) >= border);
  const small = traps.filter(({ size }) => rank(size) < border);
  return large.length >= 2 ? large : small.length >= 2 ? small : [];
}

/**
 * With a relief vent at once where one is plainly due, else as it is and then with one; at last with additional circuit
 * vents too. The last one tried, where none holds.
 */
function withReliefAndMore(row: Row, piping: ChangedPiping, traps: readonly BatteryTrap[]): Attempt {
  const last = traps.at(-1);
  const foot = last === undefined ? null : footBehind(row, last.joins);
  const relieve = (): ChangedPiping | null => (foot === null ? null : ventFrom(row, piping, foot, 'Relief vent'));
  const relieved = isReliefDue(row) ? relieve() : null;
  let tried = attempt(row, relieved ?? piping, 'circuit-vent');
  const asks = (finding: string): boolean => tried.obstacles.some((one) => one.finding === finding);
  if (relieved === null && (asks('relief-vent-missing') || (asks(oneMore) && turnsPastItsTraps(row, tried)))) {
    const later = relieve();
    if (later !== null) tried = attempt(row, later, 'circuit-vent');
  }
  // Between two fixtures a further vent would leave each with its own: no circuit vent at all.
  if (asks(oneMore) && traps.length > 2) {
    const feet = additionalFeet(row, tried).map((one, at) => ({
      foot: one,
      name: `Additional circuit vent ${at + 1}`,
    }));
    const more = feet.length === 0 ? null : ventsFrom(row, tried.piping, feet);
    const vented = more === null ? null : attempt(row, more, 'circuit-vent');
    if (vented?.battery?.reading === 'circuit-vent') tried = vented;
  }
  return tried;
}

const oneMore = 'additional-circuit-vent-missing';

/** As modelled no vent nor drain relieves the row, or one only behind a bend that the code does not let it relieve past. */
function isReliefDue({ battery, outcome, stream }: Row): boolean {
  const { relief, branch, toLastTrap } = battery.facts.circuit;
  const others = battery.others.find(({ reading }) => reading === 'circuit-vent')?.broken ?? [];
  if (relief === null) return others.some(({ finding }) => finding === 'relief-vent-missing');
  const last = toLastTrap.at(-1);
  if (relief.kind !== 'drain' || last === undefined) return false;
  const beyond = branch.slice(toLastTrap.length);
  const turn = planTurn(outcome.network, [last, ...beyond], stream.up(last));
  return turn > outcome.code.batteryLimits.turnDegrees + angle;
}

/** The branch turns too far only behind its last fixture: a relief vent ahead of the bend mends that. */
function turnsPastItsTraps(row: Row, { battery, outcome }: Attempt): boolean {
  if (battery === null) return false;
  const { relief, toLastTrap, start } = battery.facts.circuit;
  const turn = planTurn(outcome.network, toLastTrap, start);
  return relief?.kind === 'drain' && turn <= row.outcome.code.batteryLimits.turnDegrees + angle;
}

/** Angles carry a hundredth of a degree at each bend. */
const angle = 0.05;
