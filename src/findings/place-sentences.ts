import type { FindingCode } from './finding.ts';
import { has, num, type SentenceFacts } from './sentence-facts.ts';

/** Findings about where vents, cleanouts and connections stand. */
export type PlaceCode = Extract<
  FindingCode,
  | 'vent-joins-too-low'
  | 'dry-vent-too-flat'
  | 'terminal-too-low'
  | 'frost-enlargement-missing'
  | 'fresh-air-inlet-missing'
  | 'standpipe-too-short'
  | 'yoke-vent-misplaced'
  | 'branch-near-foot'
  | 'suds-zone'
  | 'cleanout-missing'
  | 'cleanout-too-small'
>;

const text = ({ facts }: SentenceFacts, key: string): string => String(facts[key] ?? '?');
const first = ({ about }: SentenceFacts): string => about[0] ?? 'The model';
const metres = (given: SentenceFacts, key: string): string => given.length(num(given, key));
const several = (count: number, one: string, many: string): string => (count === 1 ? `1 ${one}` : `${count} ${many}`);

/** The thing, the number, the limit, and what would satisfy it. */
export const placeSentences: Readonly<Record<PlaceCode, (given: SentenceFacts) => string>> = {
  'vent-joins-too-low': (f) =>
    `The vent ${first(f)} meets another vent ${metres(f, 'meetsM')} above the floor, and ${f.about[1] ?? 'a fixture it serves'} floods at ${metres(f, 'floodsM')}: let them meet ${num(f, 'aboveM') > 0 ? `${metres(f, 'aboveM')} ` : ''}above that, else a blocked drain runs off through the vent${f.clause}.`,
  'dry-vent-too-flat': (f) =>
    has(f, 'angleDeg')
      ? `The vent ${first(f)} leaves the side of a level drain: let it leave above the drain’s centre line${f.clause}.`
      : `The vent ${first(f)} runs level ${metres(f, 'levelM')} above the floor, and ${f.about[1] ?? 'a fixture it serves'} floods at ${metres(f, 'floodsM')}: let it rise ${metres(f, 'aboveM')} above that first, else what backs up stands in it${f.clause}.`,
  'terminal-too-low': (f) =>
    `The vent ${first(f)} ends ${num(f, 'overRoofM') < 0 ? 'under the roof' : `${metres(f, 'overRoofM')} above the roof`}, at least ${metres(f, 'leastM')} above it${f.clause}.`,
  'frost-enlargement-missing': (f) =>
    `${first(f)} goes through the roof at ${text(f, 'size')}; frost may close it below ${text(f, 'least')}${f.clause}.`,
  'fresh-air-inlet-missing': (f) =>
    `The trap ${first(f)} on the building drain ${
      has(f, 'size')
        ? `has a fresh air inlet of ${text(f, 'size')}, at least ${text(f, 'least')}`
        : `has no fresh air inlet within ${metres(f, 'withinM')} upstream${has(f, 'distanceM') ? `; the nearest vent stands ${metres(f, 'distanceM')} away` : ''}: give it one of ${text(f, 'least')}`
    }${f.clause}.`,
  'standpipe-too-short': (f) =>
    `The standpipe of ${first(f)} rises ${metres(f, 'heightM')} above its trap, at least ${metres(f, 'leastM')}${f.clause}.`,
  'yoke-vent-misplaced': (f) =>
    has(f, 'heightM')
      ? `The yoke vent ${first(f)} joins its vent stack ${metres(f, 'heightM')} above the floor, at least ${metres(f, 'leastM')}${f.clause}.`
      : `The yoke vent ${first(f)} does not join where the code asks${f.clause}.`,
  'branch-near-foot': (f) =>
    `${first(f)} joins ${metres(f, 'distanceM')} downstream of ${f.facts.offset === true ? 'the head of an offset' : 'the foot'} of a stack, at least ${metres(f, 'leastM')}${f.clause}.`,
  'suds-zone': (f) =>
    `The stack ${first(f)} carries suds, and a drain joins ${metres(f, 'distanceM')} ${f.facts.above === true ? 'above' : 'past'} its foot: within ${metres(f, 'leastM')} of the turn suds may push back${f.clause}.`,
  'cleanout-missing': (f) => `${missingCleanout(f)}${f.clause}.`,
  'cleanout-too-small': (f) =>
    `The cleanout ${first(f)} is ${text(f, 'modelled')}, at least ${text(f, 'least')}${has(f, 'pipe') ? ` on a pipe of ${text(f, 'pipe')}` : ''}${f.clause}.`,
};

function missingCleanout(f: SentenceFacts): string {
  switch (f.facts.what) {
    case 'none drawn':
      return `The model draws no cleanout: not checked one by one; the code wants one ${wanted(f)} and wherever the spacing ends`;
    case 'building drain':
      return `The building drain ${first(f)} has no cleanout: it needs one as near as practical to where it leaves the building`;
    case 'stack foot':
      return has(f, 'distanceM')
        ? `The nearest cleanout of the stack ${first(f)} is ${metres(f, 'distanceM')} above its foot, at most ${metres(f, 'withinM')}`
        : `The stack ${first(f)} has no cleanout: it needs one at its foot or within ${metres(f, 'withinM')} above`;
    case 'sink':
      return `The drain of ${first(f)} turns ${f.number(num(f, 'turnDeg'))}° in all and has no cleanout; beyond ${f.number(num(f, 'limitDeg'))}° it needs one`;
    case 'interceptor':
      return `No cleanout follows the interceptor ${first(f)}`;
    case 'manhole':
      return `The sewer ${first(f)} ends ${metres(f, 'distanceM')} from the building or the last manhole; it needs one within ${metres(f, 'limitM')}`;
    case 'running trap':
      return `No cleanout stands before the trap ${first(f)} on the building drain`;
    case 'spacing':
      return `${several(num(f, 'pipes'), 'drain lies', 'drains lie')} beyond the reach of any cleanout, the farthest ${first(f)}: ${metres(f, 'distanceM')}, at most ${metres(f, 'limitM')}`;
    case 'bend':
      return `${several(num(f, 'pipes'), 'level drain turns', 'level drains turn')} more than ${f.number(num(f, 'limitDeg'))}° in one fitting (${first(f)}: up to ${f.number(num(f, 'turnDeg'))}°) with no cleanout within ${metres(f, 'withinM')}`;
    case 'upper end':
      return `${several(num(f, 'pipes'), 'level drain has', 'level drains have')} no cleanout at the upper end (${first(f)}): longer than ${metres(f, 'limitM')} one needs it`;
    case 'turns':
      return `${several(num(f, 'pipes'), 'level drain turns', 'level drains turn')} up to ${f.number(num(f, 'turnDeg'))}° in all since the last cleanout (${first(f)}): each ${f.number(num(f, 'limitDeg'))}° needs one more`;
    case 'urinal':
      return `${several(num(f, 'pipes'), 'urinal has', 'urinals have')} no cleanout (${first(f)}): each needs one above the fitting that takes it`;
    case 'kitchen sink':
      return `${several(num(f, 'pipes'), 'kitchen sink has', 'kitchen sinks have')} no cleanout on the drain (${first(f)}): each needs one, on the upper floors too`;
    case 'trap arm':
      return `The trap arm of ${first(f)} turns ${f.number(num(f, 'turnDeg'))}°; beyond ${f.number(num(f, 'limitDeg'))}° it needs a cleanout`;
    default:
      return `${first(f)} has no cleanout`;
  }
}

/** `on the building drain, at the foot of 2 stacks`. */
function wanted(f: SentenceFacts): string {
  const at: string[] = [];
  const add = (key: string, one: string, many: (count: number) => string): void => {
    const count = num(f, key);
    if (count > 0) at.push(count === 1 ? one : many(count));
  };
  add('buildingDrains', 'on the building drain', (count) => `on each of ${count} building drains`);
  add('stacks', 'at the foot of the stack', (count) => `at the foot of ${count} stacks`);
  add('sinks', 'on the drain of a kitchen sink', (count) => `on the drains of ${count} kitchen sinks`);
  add('upperEnds', 'at the upper end of the level drain', (count) => `at the upper ends of ${count} level drains`);
  add('urinals', 'at the urinal', (count) => `at each of ${count} urinals`);
  add('interceptors', 'after the interceptor', (count) => `after ${count} interceptors`);
  return at.length === 0 ? 'where drains begin' : at.join(', ');
}
