import { conditionText } from './condition-text.ts';
import type { Facts, FindingCode } from './finding.ts';
import { placeSentences } from './place-sentences.ts';
import { has, num, type SentenceFacts } from './sentence-facts.ts';

type Sentence = (given: SentenceFacts) => string;

const plain = (value: unknown): string => String(value).replaceAll('-', ' ');
const text = ({ facts }: SentenceFacts, key: string): string =>
  facts[key] === null || facts[key] === undefined ? '?' : String(facts[key]);
const first = ({ about }: SentenceFacts): string => about[0] ?? 'The model';
const many = ({ about }: SentenceFacts, one: string, several: string): string =>
  about.length === 1
    ? `${about[0]} ${one}`
    : `${about.length} elements (${about.slice(0, 3).join(', ')}${about.length > 3 ? ', …' : ''}) ${several}`;
const load = (given: SentenceFacts, key = 'loadUnits'): string => `${given.number(num(given, key))} ${given.unit}`;

/** The condition of a reading that a battery breaks, in words; the finding adds whose and where. */
export function brokenText(given: SentenceFacts): string {
  const { facts } = given;
  const said = conditionText(given);
  if (said !== null) return said;
  if (has(given, 'guestUnits'))
    return `fixtures with vents of their own bring ${load(given, 'guestUnits')}, at most ${given.number(num(given, 'guestUnitsMost'))} may join; let the others join downstream of it`;
  if (has(given, 'closetsMost'))
    return `${text(given, 'closets')} water closets are served, at most ${text(given, 'closetsMost')} may be; vent the others by themselves`;
  if (facts.closetsApart === true)
    return 'its two water closets do not join at one level by a double fitting; let them';
  if (facts.closetUpstream === true)
    return 'a water closet joins upstream of another wet-vented fixture; let it join last';
  if (has(given, 'armMost'))
    return `an arm of ${text(given, 'arm')} joins, at most ${text(given, 'armMost')} may; vent that fixture by itself`;
  if (has(given, 'storey') && has(given, 'limitUnits'))
    return `storey ${num(given, 'storey') + 1} brings ${load(given)}, at most ${given.number(num(given, 'limitUnits'))} may come from one above the lowest; vent the others by themselves`;
  if (has(given, 'offsetsMost'))
    return `it has ${text(given, 'offsets')} horizontal offsets, at most ${text(given, 'offsetsMost')}; lead it straight, or vent what lies below by itself`;
  if (has(given, 'offsetMostM'))
    return `its offset is ${given.length(num(given, 'offsetM'))} long, at most ${given.length(num(given, 'offsetMostM'))}; make it shorter, or vent what lies below by itself`;
  if (facts.joinedInOffset === true) return 'a drain joins in its horizontal offset; let it join above or below';
  if (has(given, 'levelFixtures'))
    return `only ${text(given, 'levelFixtures')} of its fixtures drains into a level line: there is none to share a circuit vent with`;
  if (has(given, 'verticalPipes')) return 'the branch has a vertical piece; lead it level, or end it there';
  if (has(given, 'storeys'))
    return `its fixtures stand on ${text(given, 'storeys')} storeys; vent each storey by itself`;
  if (facts.stackUpstream === true) return 'a stack joins upstream of a circuit-vented fixture; lead it past the row';
  if (has(given, 'trapsAtStart'))
    return num(given, 'trapsAtStart') === 0
      ? 'the vent does not join on the drain of the most upstream fixture; let it'
      : 'more than one fixture joins upstream of the vent; let the vent join after the first';
  if (has(given, 'smallOutlets'))
    return num(given, 'smallOutlets') === 1
      ? `one outlet below ${text(given, 'smallBelow')} stands beside larger ones`
      : `${text(given, 'smallOutlets')} outlets below ${text(given, 'smallBelow')} stand beside larger ones`;
  if (has(given, 'trapsMost'))
    return `${text(given, 'traps')} fixtures join between two vents, at most ${text(given, 'trapsMost')} may`;
  if (has(given, 'turnMostDeg'))
    return `the branch turns ${given.number(num(given, 'turnDeg'))}° in plan between two vents, at most ${text(given, 'turnMostDeg')}°`;
  if (has(given, 'fixturesMost'))
    return `${text(given, 'fixturesOnVent')} fixtures drain into the vent, at most ${text(given, 'fixturesMost')} may; lead the others to the branch`;
  if (facts.fixturesApart === true) return 'the two fixtures on the vent do not join by one double fitting; let them';
  if (has(given, 'limitUnits'))
    return `${load(given)} are counted, the limit is ${given.number(num(given, 'limitUnits'))}; vent some of them by themselves`;
  if (has(given, 'loadUnits')) return `${load(given)} are more than any size holds`;
  return 'a condition is broken';
}

const row = (given: SentenceFacts): string =>
  `The row of ${text(given, 'fixtures')} fixtures (${text(given, 'battery') === '?' ? '' : `battery ${num(given, 'battery') + 1}`})`;

/** What of its way a branch may not have, and whether a vent would cure it. */
function outOfReach(given: SentenceFacts): string {
  const { facts } = given;
  const vented = facts.ventilated === true;
  const how = vented ? 'with a vent' : 'without a vent';
  const cure = vented ? '' : ': it needs a vent';
  switch (facts.what) {
    case 'bends':
      return `turns ${given.number(num(given, 'bends'))} bends of 90°, at most ${text(given, 'bendsMost')} ${how}${cure}`;
    case 'drop':
      return `drops ${given.length(num(given, 'lengthM'))}, at most ${given.length(num(given, 'limitM'))} ${how}${cure}`;
    case 'steep':
      return `falls ${given.slope(num(given, 'slope'))}, at most ${given.slope(num(given, 'slopeMost'))} ${how}`;
    case 'group':
      return `takes ${text(given, 'fixtures')} appliances together, which no row of the table lists ${how}${cure}`;
    default:
      return `is ${given.length(num(given, 'lengthM'))} long, at most ${given.length(num(given, 'limitM'))} ${how}${cure}`;
  }
}

/** One sentence a code, that a designer can act on: the thing, the number, the limit, the clause. */
export const sentences: Readonly<Record<FindingCode, Sentence>> = {
  ...placeSentences,
  undersized: (f) =>
    `${first(f)} (${plain(f.facts.role)}) is drawn ${text(f, 'modelled')} and needs ${f.facts.requiredLeast !== f.facts.required && has(f, 'requiredLeast') ? `${text(f, 'requiredLeast')} to ` : ''}${text(f, 'required')} for ${load(f)}${f.clause}${has(f, 'steeperSlope') ? `; laid at ${f.slope(num(f, 'steeperSlope'))} or steeper ${text(f, 'steeperSize')} is enough` : ''}${f.facts.provisional === true ? '; provisional, a figure of the code could not be read' : ''}.`,
  oversized: (f) =>
    `${first(f)} (${plain(f.facts.role)}) is drawn ${text(f, 'modelled')}; ${text(f, 'required')} is enough by its own load${f.clause}${f.facts.mainVent === true ? '; it is the widest vent of the building drain, which must have one of its least size' : ''}.`,
  'size-unknown': (f) =>
    f.facts.said === null || f.facts.said === undefined
      ? `${many(f, 'has', 'have')} no size in the model: sized, but nothing to compare.`
      : `${many(f, 'says its size is', 'say their size is')} ${text(f, 'said')} (${text(f, 'from')}), which is no size of the code.`,
  'size-contradicted': (f) =>
    `${first(f)} is ${text(f, 'size')} by ${text(f, 'from')} but ${text(f, 'other')} by ${text(f, 'otherFrom')}; the first is used.`,
  'size-from-name': (f) =>
    `${many(f, 'says its size', 'say their sizes')} in ${f.about.length === 1 ? 'its name' : 'their names'} alone${has(f, 'size') ? ` (${text(f, 'size')})` : ''}: nothing drawn or stated confirms it.`,
  'smaller-downstream': (f) =>
    `${first(f)} is drawn ${text(f, 'modelled')}, smaller than ${f.about[1] ?? 'the pipe'} (${text(f, 'upstream')}) that drains into it${f.clause}.`,
  'unvented-trap': (f) =>
    `The trap of ${first(f)} has no air path: no vent on its own drain, and none upstream that the code allows${f.clause}.`,
  'wet-vent-overloaded': (f) => `${row(f)}: no wet vent size holds it, ${brokenText(f)}${f.clause}.`,
  'wet-vent-not-allowed': (f) => `${row(f)} may not be wet vented: ${brokenText(f)}${f.clause}.`,
  'circuit-vent-not-allowed': (f) => `${row(f)} may not be circuit vented: ${brokenText(f)}${f.clause}.`,
  'relief-vent-missing': (f) =>
    `${row(f)} is circuit vented and no relief vent, nor a vented drain that may stand in, joins downstream of its last fixture${f.clause}.`,
  'additional-circuit-vent-missing': (f) => `${row(f)} needs an additional circuit vent: ${brokenText(f)}${f.clause}.`,
  'one-vent-short': (f) =>
    `${row(f)} is read as ${plain(f.facts.reading)} and ${num(f, 'undersized')} of its pipes are too small for that; as ${plain(f.facts.instead)} it lacks one thing only, ${f.facts.lacks === 'relief-vent-missing' ? 'a relief vent downstream of its last fixture' : 'an additional circuit vent'}${f.clause}: draw that vent, or lay the larger pipes.`,
  'common-vent-not-allowed': (f) => `${row(f)} may not share a common vent: ${brokenText(f)}${f.clause}.`,
  'waste-stack-vent-not-allowed': (f) => `${row(f)} may not be vented by its waste stack: ${brokenText(f)}${f.clause}.`,
  'combination-not-allowed': (f) => `${row(f)} may not have a combination waste and vent: ${brokenText(f)}${f.clause}.`,
  'single-stack-not-allowed': (f) => `${row(f)} may not be vented by a single stack: ${brokenText(f)}${f.clause}.`,
  'island-vent-not-allowed': (f) =>
    `The vent ${first(f)} turns down again before it reaches open air: only ${text(f, 'allowed')} may be vented so, not a ${plain(f.facts.kind)}${f.clause}.`,
  'valve-not-allowed': (f) =>
    f.facts.onlyValves === true
      ? `Every vent of the building drain ${first(f)} ends in an air admittance valve; one must reach open air${f.clause}.`
      : `The vent ${first(f)} ends in an air admittance valve: ${has(f, 'intervalsMost') ? `its stack has ${text(f, 'intervals')} branch intervals, at most ${text(f, 'intervalsMost')} may end so; lead it to open air` : has(f, 'leastM') ? `the valve stands ${f.length(num(f, 'heightM'))} above the drain it vents, at least ${f.length(num(f, 'leastM'))}` : has(f, 'belowMost') ? `it stands ${text(f, 'below')} branch intervals below the top of the stack, and beyond ${text(f, 'belowMost')} the branch needs a relief vent` : 'the code does not let it stand here'}${f.clause}.`,
  'valve-needs-approval': (f) =>
    `The vent ${first(f)} ends in an air admittance valve: ${f.facts.listed === true ? 'the code lets one stand only over fixtures in island counters, where frost may close a vent, in houses under renovation, or where no vent can be led out; the model does not say which' : 'this code names none'}, so the authority having jurisdiction decides${f.clause}.`,
  'stack-vent-missing': (f) =>
    `The stack ${first(f)} carries ${load(f)} and does not go on upward as a stack vent${f.clause}.`,
  'vent-stack-missing': (f) =>
    has(f, 'intervals')
      ? `The stack ${first(f)} has ${text(f, 'intervals')} branch intervals; from ${text(f, 'intervalsFrom')} on it needs a vent stack${f.clause}.`
      : has(f, 'storeysHigh')
        ? `The stack ${first(f)} rises through ${text(f, 'storeysHigh')} storeys; from ${text(f, 'storeysFrom')} on it needs a vent stack${f.clause}.`
        : `The stack ${first(f)} takes fixtures from ${text(f, 'storeys')} storeys; beyond ${text(f, 'storeysMost')} it needs a vent stack from its foot${f.clause}.`,
  'vent-stack-misplaced': (f) =>
    has(f, 'distanceMostM')
      ? `The vent stack of ${first(f)} starts ${f.length(num(f, 'distanceM'))} past the foot of its stack, at most ${f.length(num(f, 'distanceMostM'))}${f.clause}.`
      : `The vent stack of ${first(f)} does not start on a vertical part of its stack, at or just below the lowest connection${f.clause}.`,
  'yoke-vent-missing': (f) =>
    has(f, 'interval')
      ? `The stack ${first(f)} has ${text(f, 'intervals')} branch intervals and no relief vent to its vent stack at the ${text(f, 'interval')}th from the top${f.clause}.`
      : `The stack ${first(f)} takes fixtures from ${text(f, 'storeys')} storeys and has no yoke vent at ${f.facts.offset === true ? 'or above its offset at ' : ''}storey ${num(f, 'storey') + 1}${f.clause}.`,
  'offset-relief-vent-missing': (f) =>
    has(f, 'leastM')
      ? `A branch joins the stack ${f.length(num(f, 'distanceM'))} from its inclined offset ${first(f)}, below ${text(f, 'intervals')} branch intervals: nearer than ${f.length(num(f, 'leastM'))} the offset needs a vent to the vent stack beside it${f.clause}.`
      : has(f, 'intervals')
        ? `The offset ${first(f)} is ${f.length(num(f, 'offsetM'))} long below ${text(f, 'intervals')} branch intervals with ${load(f)}; beyond ${text(f, 'intervalsMost')} it needs a vent above it and one below it, and has ${text(f, 'reliefVents')} of the two${has(f, 'larger') ? `; or stack and offset of ${text(f, 'larger')}, as wide as stack and vent together` : ''}${f.clause}.`
        : `The offset ${first(f)} is ${f.length(num(f, 'offsetM'))} long below ${text(f, 'storeys')} storeys with ${load(f)}; it has ${text(f, 'reliefVents')} of two offset relief vents${f.clause}.`,
  'trap-arm-too-long': (f) =>
    has(f, 'turnDeg')
      ? `The trap arm of ${first(f)} turns ${f.number(num(f, 'turnDeg'))}°, at most ${f.number(num(f, 'limitDeg'))}°${f.clause}.`
      : f.facts.what === 'too short'
        ? `The trap arm of ${first(f)} is ${f.length(num(f, 'lengthM'))} long, at least ${f.length(num(f, 'limitM'))} on a ${text(f, 'trap')} trap${f.clause}.`
        : `From the trap of ${first(f)} to its vent it is ${f.length(num(f, 'lengthM'))}${f.facts.what === 'closet height' ? ' in height' : ''}, at most ${f.length(num(f, 'limitM'))} on a ${text(f, 'trap')} trap${f.clause}.`,
  'trap-arm-too-steep': (f) =>
    `The trap arm of ${first(f)} falls ${f.length(num(f, 'fallM'))} before its vent, at most ${f.length(num(f, 'limitM'))} on a ${text(f, 'trap')} trap: it would empty the trap${f.clause}.`,
  'outlet-pipe-too-long': (f) =>
    `The pipe between ${first(f)} and its trap is ${f.length(num(f, 'lengthM'))} long, at most ${f.length(num(f, 'limitM'))}${f.clause}.`,
  'slope-too-small': (f) =>
    `${first(f)} falls ${f.slope(num(f, 'slope'))}; ${text(f, 'size')} needs ${f.slope(num(f, 'least'))}${f.clause}.`,
  'slope-unknown': (f) =>
    `${many(f, 'has', 'have')} no slope, neither drawn nor stated: each size is read at its own least slope. What slope are they laid to?`,
  backfall: (f) => `${first(f)} climbs ${f.length(num(f, 'climbM'))} on the way of its water.`,
  'no-open-air': (f) =>
    `${first(f)} ends ${has(f, 'topM') ? `inside, at ${f.length(num(f, 'topM'))},` : 'closed'} and not in open air: the traps that count on it are not vented.`,
  'open-air-assumed': () =>
    'No roof is modelled: vents that end 2 m above the highest floor with fixtures are taken to reach open air.',
  'storeys-assumed': (f) =>
    `The model has no storeys: one is counted for each ${f.length(num(f, 'heightM'))} of height.`,
  'closet-needs-larger': (f) =>
    `${first(f)} carries ${text(f, 'closets')} water closets and needs a larger size${f.clause}.`,
  'branch-too-long': (f) => `The branch of ${first(f)} ${outOfReach(f)}${f.clause}.`,
  'appliance-not-allowed': (f) =>
    f.facts.what === 'mixed'
      ? `The stack ${first(f)} takes ${text(f, 'soil')} closets or urinals and ${text(f, 'others')} other appliances: in this system they have stacks of their own${f.clause}.`
      : `${first(f)}${has(f, 'kind') ? ` (${text(f, 'kind')})` : ''} may not be used in this system${f.clause}.`,
  'vent-area-too-small': (f) =>
    `${f.facts.vents === 1 ? `The one vent of the building drain ${first(f)} that reaches open air has ${f.number(num(f, 'areaM2') * 10000)} cm²` : `The ${text(f, 'vents')} vents of the building drain ${first(f)} that reach open air have ${f.number(num(f, 'areaM2') * 10000)} cm² together`}, less than the ${f.number(num(f, 'leastM2') * 10000)} cm² of the ${text(f, 'required')} sewer that its load requires: one more vent, or a larger one${f.clause}.`,
  'main-vent-missing': (f) =>
    `No vent of the building drain reaches open air at ${text(f, 'least')} or larger${has(f, 'widest') ? `; the widest is ${text(f, 'widest')}` : ''}${f.clause}.`,
  'fixture-unidentified': (f) =>
    f.facts.kind === null || f.facts.kind === undefined
      ? `${first(f)} drains, but nothing in the model says what it is: sizes are given from the lightest to the heaviest it may be.`
      : `${first(f)} is a ${plain(f.facts.kind)}, but a detail that decides its load is missing: sizes are given for both.`,
  'sewer-too-large': (f) =>
    `The building sewer ${first(f)} is drawn ${text(f, 'modelled')} and carries ${load(f)}: at its slope it wants at least ${f.number(num(f, 'leastUnits'))} to keep itself clean; a smaller sewer, or a steeper one${f.clause}.`,
  'use-unknown': (f) =>
    `${many(f, 'counts', 'count')} by the use of the building, which nobody says (setting use: ${text(f, 'uses')}): sizes are given from the lightest to the heaviest${f.facts.uses === 'private, public, assembly' ? ' of private and public use' : ''}.`,
  'fixture-unconnected': (f) => `${first(f)} has no drain pipe.`,
  'kind-contradicted': (f) =>
    `${first(f)} is taken for a ${plain(f.facts.taken)} by ${text(f, 'takenFrom')}, but ${text(f, 'otherFrom')} says ${plain(f.facts.other)}.`,
  'open-end': (f) =>
    f.facts.cutOff === true
      ? `${first(f)} is broken off: what drains into it (${num(f, 'fixtures') === 1 ? 'one fixture' : `${text(f, 'fixtures')} fixtures`}) goes no farther, and no size beyond counts it.`
      : `${first(f)} has an open end${has(f, 'gapM') ? `; the nearest thing is ${f.length(num(f, 'gapM'))} away` : ''}.`,
  'dead-end': (f) =>
    f.facts.noFixtures === true
      ? `${many(f, 'belongs', 'belong')} to drainage that no fixture of the model drains into: nothing to size.`
      : `${first(f)} leads nowhere: no water and no air passes.`,
  'joint-inferred': (f) =>
    `${text(f, 'joints')} joints without connected ports were found by geometry; the widest gap is ${f.length(num(f, 'gapM'))}.`,
  'joint-contradicted': (f) =>
    f.facts.what === 'direction'
      ? `The ports of ${first(f)} and ${f.about[1] ?? 'another element'} are joined against their flow directions.`
      : `Ports join ${first(f)} to ${f.about[1] ?? 'another element'}, but they lie ${f.length(num(f, 'gapM'))} apart.`,
  loop: (f) => `${many(f, 'closes', 'close')} a loop between drains.`,
  'no-sewer-end': (f) =>
    `${many(f, 'drains', 'drain')} into piping that has no end to leave by: no sewer end was found.`,
  'sewer-end-assumed': (f) =>
    `The sewer end is taken at ${first(f)} (${plain(f.facts.how)}, of ${num(f, 'candidates') === 1 ? 'one open end' : `${text(f, 'candidates')} open ends`}): say so in the answers file if it is another.`,
  'wrong-system': (f) => `${first(f)} is filed under a system it does not belong to by its piping.`,
  'fit-in-wall': (f) => {
    const wall = has(f, 'wall') ? text(f, 'wall') : 'its wall';
    const takes = has(f, 'stud')
      ? `studs of ${text(f, 'stud')} take it${has(f, 'studIfNotLoadbearing') ? ` (${text(f, 'studIfNotLoadbearing')} if the wall bears no load)` : ''}`
      : has(f, 'studIfNotLoadbearing')
        ? `studs of ${text(f, 'studIfNotLoadbearing')} take it if the wall bears no load`
        : 'no usual stud takes it: a chase, or another place';
    const mm = (key: string): string => `${f.number(num(f, key))} mm`;
    const at = `${first(f)} at ${text(f, 'required')}${has(f, 'made') ? `, laid as ${text(f, 'made')},` : ''}`;
    if (f.facts.what !== 'hole')
      return `${at} does not fit in ${wall}: ${f.facts.what === 'fitting' ? 'its fittings are' : 'it is'} ${mm('needsMm')} wide, the wall has room for ${mm('cavityMm')}; ${takes}.`;
    const bears =
      f.facts.loadBearing === true ? ' and bears load' : f.facts.loadBearing === false ? '' : ' if it bears load';
    return `${at} runs along ${wall} through its studs: a hole of ${mm('holeMm')}, at most ${mm('holeMostMm')} in a stud that is ${mm('cavityMm')} deep${bears} and not reinforced (${text(f, 'holeClause')}); ${takes}.`;
  },
  'double-water-path': (f) =>
    `${first(f)} has ${text(f, 'ways')} ways for its water: sized by one of them, what leaves by ${f.about.slice(1).join(', ') || 'the other'} is not counted there.`,
  'doubled-element': (f) => `${first(f)} stands twice at one place; one is used.`,
  'group-not-applied': (f) =>
    `${text(f, 'fixtures')} fixtures may form bathroom groups, but the model puts them in no room: their loads are added one by one${f.clause}.`,
  'files-apart': (f) =>
    `${text(f, 'file')} lies ${f.length(num(f, 'distanceM'))} from ${text(f, 'from')}: the two count from different origins, so nothing of ${text(f, 'file')} is joined. Export both with the same origin.`,
  'file-damaged': (f) =>
    `${text(f, 'file')} is damaged: ${plain(f.facts.problem)}, ${text(f, 'count')} times, first at line ${text(f, 'line')}.`,
  'text-damaged': (f) =>
    `${text(f, 'file')} has ${text(f, 'count')} damaged texts (${plain(f.facts.problem)}), first at line ${text(f, 'line')}.`,
};

/** Readings under which alone a finding holds, as a sentence of its own; empty where it holds under all. */
export function onlyIfText({ onlyIf }: Facts): string {
  if (!Array.isArray(onlyIf) || onlyIf.length === 0) return '';
  const words = onlyIf.map(plain);
  if (words.every((word) => word === 'lightest' || word === 'heaviest'))
    return ` Only at the ${words.join(' or the ')} reading of what is open.`;
  const named = words.slice(0, mostKinds).join(', ');
  const more = words.length > mostKinds ? ` or one of ${words.length - mostKinds} more` : '';
  return ` Only if what nothing identifies is a ${named}${more}.`;
}

const mostKinds = 4;
