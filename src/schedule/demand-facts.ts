import { factsText } from './facts-text.ts';
import { decimal, lengthText, limitText, slopeText, unitsText } from './number-text.ts';
import { counted } from './trade-words.ts';

type Facts = Readonly<Record<string, unknown>>;

/** The numbers behind a demand as a person says them. */
export interface DemandWords {
  /** What the size is asked for: `14 fixture units`, `a trap of 2 in`. */
  readonly basis: readonly string[];
  /** What the size that is asked holds: `holds 36`, `reaches 61 m`; null where no table says. */
  readonly holds: string | null;
  /** What else is worth knowing. */
  readonly asides: readonly string[];
}

interface Given {
  readonly facts: Facts;
  readonly unit: string;
  nameOf(globalId: string): string;
}

type Say = (value: never, given: Given) => string | null;

/** By the fact's name; null says nothing. A fact of no table below is said as it stands. */
export function demandWords(facts: Facts, unit: string, nameOf: (globalId: string) => string): DemandWords {
  const given: Given = { facts, unit, nameOf };
  const said = (table: Readonly<Record<string, Say>>): string[] =>
    Object.entries(table).flatMap(([key, say]) => {
      const value = facts[key];
      return value === null || value === undefined || value === false ? [] : (say(value as never, given) ?? []);
    });
  const amount = said(load).join(' ');
  const rest = Object.entries(facts).filter(
    ([key]) => !quiet.has(key) && ![load, basis, limits, asides].some((one) => Object.hasOwn(one, key)),
  );
  const plain = factsText(Object.fromEntries(rest), unit, nameOf);
  return {
    basis: [...(amount === '' ? [] : [amount]), ...said(basis)],
    holds: said(limits)[0] ?? null,
    asides: [...said(asides), ...(plain === '' ? [] : [plain])],
  };
}

const number = (value: number): string => decimal(value, 2);
const litres = (value: number): string => `${number(value)} l/s`;
const size =
  (thing: string) =>
  (value: string): string =>
    `${thing} of ${value}`;

/** A load, where of, and how it flows: one phrase, in this order. */
const load: Readonly<Record<string, Say>> = {
  // A code that reckons with a flow: the load is part of how it came about.
  loadUnits: (value: number, { facts, unit }: Given) => (has(facts, 'flowLps') ? null : unitsText(value, unit)),
  flowLps: (value: number, { facts, unit }: Given) => `${litres(value)}${flowGround(facts, unit)}`,
  column: (value: string, { facts }: Given) =>
    typeof facts.closets === 'number' && facts.closets > 0 ? null : (columns[value] ?? value),
  storey: (value: string) => `on ${value}`,
  intervals: (value: number) => `with ${counted(value, 'branch interval')}`,
  slope: (value: number, { facts }: Given) =>
    `at ${slopeText(value)}${facts.slopeAssumed === true ? ', assumed,' : facts.slopeAnswered === true ? ', as answered,' : ''}`,
  columnSlope: (value: number, { facts }: Given) =>
    typeof facts.slope === 'number' && slopeText(facts.slope) === slopeText(value)
      ? null
      : `in the column of ${slopeText(value)}`,
  fillingShare: (value: number) => `filled to ${decimal(value * 100, 0)} %`,
  offsetM: (value: number) => `in an offset of ${lengthText(value)}`,
  entries: (value: string) => `with ${value} entries`,
};

const basis: Readonly<Record<string, Say>> = {
  stackSize: (value: string, { facts }: Given) =>
    typeof facts.share === 'number'
      ? `${decimal(facts.share * 100, 0)} % of a stack of ${value}`
      : `${facts.demand === 'half the stack' ? 'half of ' : ''}a stack of ${value}`,
  ventStack: size('a vent stack'),
  stackVent: size('a stack vent'),
  circuitVent: size('a circuit vent'),
  wetVent: size('a wet vent'),
  requiredDrain: size('a drain'),
  drain: size('a drain'),
  branchSize: size('a branch'),
  upperWaste: size('an upper waste pipe'),
  smallerOfBoth: (value: string) => `${value}, the smaller of the two pipes that it joins`,
  joined: (value: string) => `${value}, the largest of the vents that join`,
  leastSize: (value: string) => `${value} by its load`,
  trap: size('a trap'),
  largestTrap: (value: string) => `traps up to ${value}`,
  outlet: (value: string, { facts }: Given) =>
    typeof facts.outlets === 'number' ? `the common outlet of ${facts.outlets} of ${value}` : `an outlet of ${value}`,
  lengthM: (value: number, { facts }: Given) => (has(facts, 'lengthMostM') ? null : lengthText(value)),
  heightM: (value: number) => `${lengthText(value)} of height`,
  storeys: (value: number) => counted(value, 'storey'),
  closets: (value: number, { facts }: Given) => {
    if (value === 0) return null;
    const most = facts.closetsMost;
    return `${counted(value, 'water closet')}${typeof most === 'number' ? `, ${most} at most` : ''}`;
  },
  washers: (value: number) => counted(value, 'clothes washer'),
  leftOut: (value: number) => (value === 0 ? null : `${counted(value, 'fixture')} left out`),
  turnDeg: (value: number) => (value === 0 ? null : `${decimal(value, 0)}° of turn`),
};

const columns: Readonly<Record<string, string>> = {
  'whole stack': 'on the whole stack',
  'one storey': 'from one storey',
  'one interval': 'from one branch interval',
  'whole branch': 'over the whole branch',
  'upper fixture': 'from the upper fixture',
  'no water closet served': 'with no water closet served',
  vertical: 'in a vertical pipe',
  horizontal: 'in a level pipe',
};

const limits: Readonly<Record<string, Say>> = {
  limitUnits: (value: number | string) => `holds ${limitText(value)}`,
  limitM: (value: number | string) => (typeof value === 'number' ? `reaches ${lengthText(value)}` : reach(value)),
  limitLps: (value: number) => `carries ${litres(value)}`,
  carriesLps: (value: number) => `carries ${litres(value)}`,
};

/** No limit, or none needed, in a table of lengths. */
const reach = (printed: string): string => (printed === 'NL' ? 'has no limit of length' : `has ${printed} printed`);

/** A measured length, and the most that is allowed of it. */
const ofMost =
  (most: string, thing: string): Say =>
  (value: number, { facts }: Given) => {
    const limit = facts[most];
    return typeof limit === 'number' ? `${lengthText(value)} ${thing}, ${lengthText(limit)} at most` : null;
  };

const asides: Readonly<Record<string, Say>> = {
  upstream: (value: string, { facts, nameOf }: Given) =>
    `as large as ${facts.vent === true ? 'the vent ' : ''}${nameOf(value)}, which joins it`,
  demand: (value: string) => (value === 'after the trap arm' ? 'past the trap arm' : null),
  lengthM: ofMost('lengthMostM', 'long'),
  levelM: ofMost('levelMostM', 'level'),
  toStackM: ofMost('toStackMostM', 'from the stack'),
  most: (value: string) => `never asked above ${value}`,
  least: (value: string) => `${value} at least`,
  mayAsk: (value: string) => `${value} may be asked`,
  setting: (value: string) => `by the setting ${value}`,
  byBranchTable: (value: string, { facts }: Given) =>
    `${value} by the table of branches, ${String(facts.byDrainTable)} by that of drains, the ${String(facts.reading)} is taken`,
  smallUpToUnits: (value: number, { unit }: Given) => `the smaller of two sizes up to ${unitsText(value, unit)}`,
  stepAboveM: (value: number, { facts }: Given) =>
    `${facts.oneSizeUp === true ? 'one size up, past' : 'one size more past'} ${lengthText(value)}`,
  steeperSize: (value: string, { facts }: Given) =>
    typeof facts.steeperSlope === 'number' ? `${value} would need ${slopeText(facts.steeperSlope)}` : null,
  valveAirLps: (value: number, { facts }: Given) =>
    `a valve that lets in ${litres(value)} (${String(facts.valveClause)})`,
  beyondTable: () => 'flatter than the table',
};

/** What these say stands in the facts beside them, in the row that the place names, or in its trust. */
const quiet: ReadonlySet<string> = new Set([
  ...['row', 'vent', 'share', 'outlets', 'closetsMost', 'lengthMostM', 'levelMostM', 'toStackMostM', 'unread'],
  ...['slopeAssumed', 'slopeAnswered', 'byDrainTable', 'reading', 'oneSizeUp', 'steeperSlope', 'valveClause'],
  ...['frequencyFactor', 'wastewaterLps', 'largestLps', 'ventilated', 'entriesKnown', 'entriesCounted', 'fixtures'],
]);

const has = (facts: Facts, key: string): boolean => typeof facts[key] === 'number';

/** How a flow came about: the root of the load, the largest appliance where that is more. */
function flowGround({ loadUnits, frequencyFactor, wastewaterLps, largestLps }: Facts, unit: string): string {
  if (typeof loadUnits !== 'number' || typeof wastewaterLps !== 'number') return '';
  const factor = typeof frequencyFactor === 'number' ? `, K ${number(frequencyFactor)}` : '';
  const root = `${unitsText(loadUnits, unit)}${factor}: ${litres(wastewaterLps)}`;
  return typeof largestLps === 'number' ? ` (its largest appliance; ${root})` : ` (${root})`;
}
