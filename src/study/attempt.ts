import type { Broken } from '../codes/battery.ts';
import type { Reading } from '../codes/reading.ts';
import type { Finding, FindingCode } from '../findings/finding.ts';
import type { ElementId } from '../model/model.ts';
import { runNetwork } from '../pipeline.ts';
import type { Battery } from '../roles/roles.ts';
import type { Outcome } from '../verdicts/outcome.ts';
import { type ChangedPiping, unchanged } from './changed-piping.ts';
import { withReading } from './edits.ts';
import { pipingOf } from './piping-of.ts';
import type { Row } from './row.ts';

/** A row's piping carried through every stage with its reading forced, and what stands against it. */
export interface Attempt {
  readonly piping: ChangedPiping;
  readonly outcome: Outcome;
  /** The battery that most of the row's fixtures form; null where each is vented by itself. */
  readonly battery: Battery | null;
  readonly obstacles: readonly Obstacle[];
}

/** A condition of the code that is broken, or an error that the modelled piping does not have. */
export interface Obstacle {
  readonly rule: string | null;
  readonly clause: string | null;
  readonly facts: Finding['facts'];
  readonly finding: FindingCode;
  readonly about: readonly ElementId[];
}

/** The row as it is modelled: nothing is run again. */
export function asModelled(row: Row): Attempt {
  const { outcome, battery } = row;
  return { piping: unchanged(outcome), outcome, battery, obstacles: battery.broken.map(obstacleOf) };
}

export function attempt(row: Row, piping: ChangedPiping, reading: Reading): Attempt {
  const { outcome: first } = row;
  const { model, identities, network } = piping;
  const changed = { ...pipingOf(first), model, identities, network, findings: [] };
  const outcome = runNetwork(withReading(changed, [...elementsOf(row)], reading));
  const battery = batteryOf(row, outcome);
  const obstacles = [...readingObstacles(row, outcome, battery, reading), ...newErrors(first, outcome)];
  return { piping, outcome, battery, obstacles };
}

const elementsOf = ({ outcome, fixtures }: Row): Set<ElementId> =>
  new Set(fixtures.map((fixture) => outcome.paths.fixtures[fixture]!.element));

function batteryOf(row: Row, { shown, paths }: Outcome): Battery | null {
  const own = elementsOf(row);
  const share = ({ facts }: Battery): number =>
    facts.traps.filter(({ fixture }) => own.has(paths.fixtures[fixture]!.element)).length;
  const [most] = [...shown.roles.batteries].sort((a, b) => share(b) - share(a) || a.facts.id - b.facts.id);
  return most === undefined || share(most) === 0 ? null : most;
}

function readingObstacles(row: Row, outcome: Outcome, battery: Battery | null, reading: Reading): Obstacle[] {
  const own = elementsOf(row);
  const { paths, shown } = outcome;
  const wrong = paths.fixtures.filter(({ id, element }) => {
    if (!own.has(element)) return false;
    const { how } = shown.roles.venting[id]!;
    return how === 'unvented' || ((how === 'wet-vent' || how === 'circuit-vent') && how !== reading);
  });
  const broken = battery === null || battery.reading !== reading ? [] : battery.broken.map(obstacleOf);
  const shared = battery !== null && battery.reading === reading;
  if (broken.length > 0 || (wrong.length === 0 && (shared || reading === 'individual-vent'))) return broken;
  const about = wrong.length > 0 ? wrong.map(({ element }) => element) : [...own];
  return [{ rule: null, clause: null, facts: { traps: about.length }, finding: 'unvented-trap', about }];
}

export const obstacleOf = ({ rule, clause, facts, finding }: Broken): Obstacle => ({
  rule,
  clause,
  facts,
  finding,
  about: [],
});

/** What sizes and readings say is told apart; everything else that was no error before stands against the change. */
const toldApart: ReadonlySet<FindingCode> = new Set([
  'undersized',
  'smaller-downstream',
  'wet-vent-not-allowed',
  'wet-vent-overloaded',
  'circuit-vent-not-allowed',
  'relief-vent-missing',
  'additional-circuit-vent-missing',
]);

function newErrors(before: Outcome, after: Outcome): Obstacle[] {
  const key = ({ code, about }: Finding): string => `${code} ${about[0] ?? ''}`;
  const known = new Set(before.findings.map(key));
  return after.findings
    .filter((found) => found.severity === 'error' && !toldApart.has(found.code) && !known.has(key(found)))
    .map(({ code, about, facts, clause }) => ({
      rule: null,
      clause: clause ?? null,
      facts,
      finding: code,
      about: about as readonly ElementId[],
    }));
}
