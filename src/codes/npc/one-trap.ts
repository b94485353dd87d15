import type { SharedTrapRule } from '../plumbing-code.ts';

const sinks: ReadonlySet<string | null> = new Set(['sink', 'kitchen-sink']);
const throughSink: ReadonlySet<string | null> = new Set(['dishwasher', 'garbage-grinder']);
/** Rows of Table 2.4.9.3. that read "single, or two singles on one trap". */
const pairs: ReadonlySet<string> = new Set(['lavatory-domestic', 'laundry-tray-1-2']);

/**
 * What counts of fixtures on one trap (Table 2.4.9.3., R11): two sinks, lavatories or laundry trays as one; a dishwasher
 * or grinder that empties into a sink as nothing. All of them domestic, or not known to be otherwise.
 */
export const countOnOneTrap: SharedTrapRule = (fixtures) => {
  const domestic = fixtures.map(({ domestic: known }) => known !== false);
  const isSink = fixtures.map(({ kind }, at) => domestic[at]! && sinks.has(kind));
  const hasSink = isSink.includes(true);
  const counts = fixtures.map(({ kind }, at) => !(hasSink && domestic[at]! && throughSink.has(kind)));
  const left = fixtures.flatMap((_, at) => (counts[at] ? [at] : []));
  const [first, second] = left;
  if (first === undefined || second === undefined || left.length !== 2) return counts;
  const alike = fixtures[first]!.row.id === fixtures[second]!.row.id && pairs.has(fixtures[first]!.row.id);
  const lighter = fixtures[first]!.load < fixtures[second]!.load ? first : second;
  if (alike || (isSink[first] && isSink[second])) counts[lighter] = false;
  return counts;
};
