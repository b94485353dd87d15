import { demandText, placeText } from './demand-text.ts';
import { type ElementNames, elementNames } from './element-names.ts';
import { hydraulicsText } from './hydraulics-text.ts';
import { limitCounts, type NextSmaller } from './next-smaller.ts';
import { decimal, lengthText, limitText, loadText, sizeText, slopeText } from './number-text.ts';
import { rangeStory } from './ranges-text.ts';
import type { Result, ResultPipe } from './result.ts';
import { shownText } from './shown-text.ts';
import { counted, countedKinds, listed, plainWords, sentence } from './trade-words.ts';

/** The story of one pipe: what it is, whose water, whose air, why that role, each demand, the verdict, what is wrong. */
export function explainPipe(result: Result, pipe: ResultPipe, smaller: NextSmaller | null): string[] {
  const names = elementNames(result);
  const { unit } = result.code;
  const battery = result.batteries.find(({ id }) => id === pipe.battery);
  return [
    identity(pipe, names),
    water(result, pipe, names),
    air(result, pipe, names),
    roleReason(pipe),
    ...(battery === undefined
      ? []
      : [`Its battery, ${battery.id}, is read as ${plainWords(battery.reading)}, since ${shownText(battery.why)}.`]),
    ...demands(pipe, unit, names),
    verdict(pipe),
    ...rangeStory(result, pipe),
    ...smallerSize(smaller),
    ...(pipe.provisional
      ? ['The size is provisional: a figure of the code that comes before it could not be read.']
      : []),
    ...hydraulicsText(pipe),
    ...sections(pipe),
    ...result.findings
      .filter(({ about, code }) => about[0] === pipe.globalId && code !== 'undersized')
      .map((finding) => shownText(finding.sentence)),
  ];
}

function identity(pipe: ResultPipe, names: ElementNames): string {
  const { role, also, portion, storey, orientation, slope, length, system } = pipe;
  const parts = [
    `${names.of(pipe.globalId)} (GlobalId ${pipe.globalId}) is ${article(plainWords(role))}`,
    ...(also.length === 0 ? [] : [`also ${listed(also.map((one) => article(plainWords(one))))}`]),
    ...(portion === undefined ? [] : [`its ${portion} portion`]),
    ...(orientation === 'unknown' ? [] : [orientation]),
    ...(length === null ? ['of unknown length'] : [`${lengthText(length)} long`]),
    ...(slope?.value === null || slope === null ? [] : [`${fallText(slope.value)} ${slopeGround[slope.ground] ?? ''}`]),
    ...(storey === null ? [] : [`on ${shownText(storey)}`]),
    ...(system === null ? [] : [`in ${shownText(system)}`]),
  ];
  return `${parts.join(', ')}.`;
}

const slopeGround: Readonly<Record<string, string>> = {
  geometry: 'as drawn',
  property: 'by its slope property',
  answer: 'as answered',
};

function water(result: Result, { globalId, servesWater = [], load, next }: ResultPipe, names: ElementNames): string {
  const isEnd = result.systems.some(({ sewerEnd }) => sewerEnd.pipe === globalId);
  const to = next === null ? (isEnd ? 'and out to the sewer' : 'and ends there') : `and on through ${names.of(next)}`;
  if (servesWater.length === 0) return 'No water runs through it.';
  return `Water: ${whose(result, servesWater, names)}; ${loadText(load, result.code.unit)}, ${to}.`;
}

function air(result: Result, { servesAir = [], ventLoad, developedLength }: ResultPipe, names: ElementNames): string {
  if (servesAir.length === 0) return 'No trap breathes through it.';
  const measures = [
    ...(ventLoad === undefined ? [] : [`${loadText(ventLoad, result.code.unit)} enter its vent table`]),
    ...(developedLength === undefined ? [] : [`its developed length is ${lengthText(developedLength)}`]),
  ];
  return `Air: for ${whose(result, servesAir, names)}${measures.map((one) => `; ${one}`).join('')}.`;
}

function whose({ fixtures }: Result, ids: readonly string[], names: ElementNames): string {
  const kindOf = new Map(fixtures.map(({ globalId, kind }) => [globalId, plainWords(kind ?? 'unidentified fixture')]));
  const some = ids.slice(0, mostNamed).map(names.short);
  const more = ids.length - some.length;
  const kinds = countedKinds(ids.map((id) => kindOf.get(id) ?? 'fixture'));
  return `${kinds} (${some.join(', ')}${more > 0 ? ` and ${more} more` : ''})`;
}
const mostNamed = 12;

function roleReason({ servesWater = [], servesAir = [], role, ventLoad }: ResultPipe): string {
  const name = plainWords(role);
  if (servesWater.length > 0 && servesAir.length > 0)
    return `Water and other traps' air share it, so it is a wet pipe that also vents: ${name}.`;
  if (servesWater.length > 0) return `It carries water and no other trap's air, so it is a drain: ${name}.`;
  if (servesAir.length > 0) return `It carries air and no water, so it is a dry vent: ${name}.`;
  if (ventLoad !== undefined) return `It gives air to drains, and to no one trap by itself: ${name}.`;
  return `Nothing uses it: ${name}.`;
}

function demands({ trail }: ResultPipe, unit: string, names: ElementNames): string[] {
  if (trail.length === 0) return ['No rule of the code asks anything of it.'];
  return trail.map((step) => `${sentence(demandText(step, unit, names.short))}${step.governs ? ' This governs.' : ''}`);
}

function verdict({ modelled, required, verdict: word, reason }: ResultPipe): string {
  const drawn = modelled === null ? 'Its size is not drawn' : `Drawn ${modelled.label} (${shownText(modelled.from)})`;
  const why = reason === undefined ? '' : `: ${shownText(reason)}`;
  return `${drawn}; required ${sizeText(required)}; ${verdicts[word]}${why}.`;
}

const verdicts = {
  undersized: 'undersized',
  agrees: 'as required',
  oversized: 'larger than required',
  unknown: 'no verdict',
} as const;

/** In the words of the page: what the smaller size holds, which demand it fails, and where that stands. */
function smallerSize(next: NextSmaller | null): string[] {
  if (next === null) return [];
  const { size, fails } = next;
  const limit = fails.smaller?.size.dn === size.dn ? fails.smaller.limit : null;
  const holds = limit === null ? '' : ` ${size.label} ${heldText(limit, limitCounts(fails))}.`;
  const asks = fails.asks === null ? 'has no size that is large enough' : `asks for ${fails.asks.label}`;
  return [`Why not ${size.label}?${holds} “${fails.title}” ${asks} (${placeText(fails)}).`];
}

function heldText(limit: number | string, counts: 'load' | 'm' | 'l/s'): string {
  if (counts === 'm' && typeof limit === 'number') return `reaches ${lengthText(limit)}`;
  return `holds ${limitText(limit)}${counts === 'l/s' ? ' l/s' : ''}`;
}

function sections({ sections: parts }: ResultPipe): string[] {
  if (parts === undefined) return [];
  const each = parts.map(
    ({ from, to, role, required, load }) =>
      `${decimal(from, 2)} to ${decimal(to, 2)} m ${plainWords(role)}, load ${decimal(load.most, 2)}, ${sizeText(required)}`,
  );
  return [`It has ${counted(parts.length, 'section')}, since other pipes join along it: ${each.join('; ')}.`];
}

const article = (thing: string): string => `${/^[aeiou]/.test(thing) && !/^un/.test(thing) ? 'an' : 'a'} ${thing}`;

const fallText = (slope: number): string =>
  slope === 0 ? 'level' : `${slope < 0 ? 'climbing' : 'falling'} ${slopeText(Math.abs(slope))}`;
