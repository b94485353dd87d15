import { toCleanout } from '../verdicts/compare.ts';
import { answerTexts } from './answers-text.ts';
import { type ElementNames, elementNames } from './element-names.ts';
import { lengthText, loadText } from './number-text.ts';
import type { BrokenCondition, Result, ResultBattery, ResultPipe, ResultSystem } from './result.ts';
import { padded, shownText } from './shown-text.ts';
import { heading, paragraph, type TextLine } from './text-line.ts';
import { counted, countedKinds, listed, plainWords, sentence, tally } from './trade-words.ts';

/** A role as people say it; of idle pipes those that lead to a cleanout have a name of their own. */
const calledBy = ({ role, reason }: ResultPipe): string =>
  role === 'idle' && reason === toCleanout ? 'cleanout extension' : plainWords(role);

/** What the program took the model to be, before any judgement: fixtures, systems, batteries, joints, what it left out. */
export function understoodText(result: Result): TextLine[] {
  const { counts, fixtures, joints, batteries, systems } = result;
  const names = elementNames(result);
  const kindOf = new Map(fixtures.map(({ globalId, kind }) => [globalId, plainWords(kind ?? 'unidentified')]));
  const left = Object.values(counts.leftOut).reduce((sum, count) => sum + count, 0);
  const widest = Math.max(0, ...joints.inferred.map(({ gap }) => gap));
  const leftOut = left === 0 ? [] : paragraph(`${left}: ${reasons(counts.leftOut)}`, row('Left out'));
  if (isEmpty(result)) return [...titleText(result), ...remarksText(result), ...leftOut, ...notPlaced(result)];
  return [
    ...titleText(result),
    ...remarksText(result),
    ...answeredText(result),
    ...paragraph(
      fixtures.length === 0 ? 'none' : `${fixtures.length}: ${countedKinds([...kindOf.values()])}`,
      row('Fixtures'),
    ),
    ...paragraph(`${counts.pipes}: ${countedKinds(result.pipes.map(calledBy))}`, row('Pipes')),
    ...folded(systems, mostSystems, 'more systems').flatMap((system, place) =>
      typeof system === 'string'
        ? paragraph(system, row(''))
        : paragraph(systemText(system, result.code.unit, names), row(place === 0 ? 'Systems' : '')),
    ),
    ...folded(alike(batteries, kindOf), mostBatteries, 'more kinds of battery').flatMap((group, place) =>
      typeof group === 'string' ? paragraph(group, row('')) : batteryText(group, row(place === 0 ? 'Batteries' : '')),
    ),
    ...paragraph(
      `${counted(joints.ports, 'joint')} by ports, ${joints.geometry} by geometry` +
        (joints.inferred.length === 0 ? '' : `; the widest gap bridged is ${lengthText(widest)}`),
      row('Joints'),
    ),
    ...leftOut,
    ...notPlaced(result),
  ];
}

const remarksText = ({ model, models }: Result): TextLine[] =>
  (models ?? [model]).flatMap(({ file, remarks }) =>
    (remarks ?? []).flatMap((remark) =>
      paragraph(`${models === undefined ? '' : `${shownText(file)}: `}${shownText(remark)}`, row('File'), 'warning'),
    ),
  );

function answeredText(result: Result): TextLine[] {
  const said = answerTexts(result);
  if (said.length === 0) return [];
  const more = said.length > mostAnswers ? `; and ${said.length - mostAnswers} more` : '';
  return paragraph(`${said.slice(0, mostAnswers).join('; ')}${more}`, row('Answered'));
}
const mostAnswers = 8;

function notPlaced({ unresolved }: Result): TextLine[] {
  if (unresolved.length === 0) return [];
  const why = tally(unresolved.map(({ reason }) => reason)).map(([reason, count]) => `${count} ${shownText(reason)}`);
  return paragraph(`${unresolved.length}: ${why.join(', ')}`, row('Not placed'), 'warning');
}

/** No pipe and no fixture with a drain: there is nothing to size. */
export const isEmpty = ({ fixtures, pipes }: Result): boolean => fixtures.length + pipes.length === 0;

/** File, schema, unit, code; a model without drainage says so here, on the first line. Of several files each has a line. */
export function titleText(result: Result): TextLine[] {
  const { model, models, code, counts } = result;
  const local = code.localTables === undefined ? '' : `, with local tables ${listed(code.localTables.map(shownText))}`;
  const book = `${code.title} ${code.edition} (${code.id})${local}`;
  const about = models === undefined ? `${writtenIn(model)}; ${book}` : book;
  const name = models === undefined ? shownText(model.file) : `${models.length} files as one building`;
  const files = (models ?? []).flatMap((one) =>
    paragraph(`${shownText(one.file)}: ${writtenIn(one)}; SHA-256 ${one.sha256}`, row('File')),
  );
  if (!isEmpty(result)) return [...heading(`${name}: ${about}`), ...files];
  const dry = counts.fixtures === 0 ? '' : `; ${counted(counts.fixtures, 'fixture')}, but no drain at any`;
  const where = models === undefined ? 'in this model' : 'in them';
  return [
    ...heading(`${name}: no sanitary drainage ${where} (${counted(counts.elements, 'element')} read${dry})`),
    ...files,
    ...paragraph(about),
  ];
}

const writtenIn = ({ schema, lengthUnit }: Result['model']): string =>
  `${shownText(schema)}, ${shownText(lengthUnit).toLowerCase()}`;

/** The label that stands before a line of what was understood. */
export const row = (label: string): string => `  ${padded(label, 11)} `;
const mostSystems = 6;
const mostBatteries = 10;

function folded<T>(list: readonly T[], most: number, rest: string): (T | string)[] {
  return list.length <= most ? [...list] : [...list.slice(0, most), `and ${list.length - most} ${rest}`];
}

const reasons = (counts: Readonly<Record<string, number>>): string =>
  Object.entries(counts)
    .sort(([a, m], [b, n]) => n - m || (a < b ? -1 : 1))
    .map(([reason, count]) => `${count} ${shownText(reason)}`)
    .join(', ');

/** `10 fixtures, 40 pipes, 20 fixture units; to the sewer at CB-SEWER #506 (the model names it)`. */
export function systemText(
  { pipes, fixtures, load, sewerEnd, isCutOff }: ResultSystem,
  unit: string,
  names: ElementNames,
): string {
  const where = sewerEnd.pipe === null ? 'its only joint' : names.of(sewerEnd.pipe);
  const has = `${counted(fixtures, 'fixture')}, ${counted(pipes, 'pipe')}, ${loadText(load, unit)}`;
  if (isCutOff === true) return `${has}; broken off at ${where}, short of a sewer end`;
  return `${has}; to the sewer at ${where} (${sewerEnds[sewerEnd.how] ?? shownText(sewerEnd.how)})`;
}

const sewerEnds: Readonly<Record<string, string>> = {
  answer: 'as answered',
  named: 'the model names it',
  ports: 'where the ports lead',
  lowest: 'assumed: the lowest open end',
  largest: 'assumed: the largest of the low open ends',
  first: 'assumed: one of several equal open ends',
};

interface AlikeBatteries {
  readonly ids: readonly string[];
  readonly who: string;
  readonly first: ResultBattery;
}

/** Batteries of the same fixtures, read the same way for the same reasons, told once: tall buildings repeat them. */
function alike(batteries: readonly ResultBattery[], kindOf: ReadonlyMap<string, string>): AlikeBatteries[] {
  const groups = new Map<string, { ids: string[]; who: string; first: ResultBattery }>();
  for (const battery of batteries) {
    const who = countedKinds(battery.fixtures.map((fixture) => kindOf.get(fixture) ?? 'unidentified'));
    const { reading, why, broken, others } = battery;
    const told = others.map((other) => [other.reading, other.holds, conditionsText(other.broken)]);
    const key = JSON.stringify([who, reading, why, conditionsText(broken), told]);
    const group = groups.get(key);
    if (group === undefined) groups.set(key, { ids: [battery.id], who, first: battery });
    else group.ids.push(battery.id);
  }
  return [...groups.values()];
}

function batteryText({ ids, who, first }: AlikeBatteries, lead: string): TextLine[] {
  const { reading, why, broken, others } = first;
  const nots = others.map((other) =>
    other.holds
      ? `As ${plainWords(other.reading)} it would hold too.`
      : `As ${plainWords(other.reading)} it would break ${sentence(conditionsText(other.broken))}`,
  );
  const name = `${shownText(ids[0] ?? '')}${ids.length === 1 ? '' : ` and ${ids.length - 1} alike`}`;
  return [
    ...paragraph(`${name}: ${who}; ${plainWords(reading)}, since ${shownText(why)}`, lead),
    ...(broken.length === 0 ? [] : paragraph(`It breaks ${sentence(conditionsText(broken))}`, row(''), 'error')),
    ...(nots.length === 0 ? [] : paragraph(nots.join(' '), row(''), 'quiet')),
  ];
}

/** `relief vent required (2.5.3.1.(3))`: the conditions that a reading breaks, each once. */
export function conditionsText(broken: readonly BrokenCondition[]): string {
  if (broken.length === 0) return 'a condition that is not told';
  const each = [...new Set(broken.map(({ title, clause }) => `"${lowerFirst(shownText(title))}" (${clause})`))];
  return each.length <= mostConditions
    ? listed(each)
    : `${each.slice(0, mostConditions).join(', ')} and ${each.length - mostConditions} more`;
}

const mostConditions = 3;

const lowerFirst = (text: string): string => text.charAt(0).toLowerCase() + text.slice(1);
