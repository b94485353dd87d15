import { brokenText, sentences } from '../findings/sentences.ts';
import type { ElementId } from '../model/model.ts';
import type { PipeId } from '../network/network.ts';
import type { Obstacle } from '../study/attempt.ts';
import type { Quantities } from '../study/quantities.ts';
import type { Alternative, Weighing } from '../study/weigh.ts';
import type { NominalSize } from '../units/nominal-size.ts';
import type { Outcome } from '../verdicts/outcome.ts';
import { decimal, lengthText, slopeText } from './number-text.ts';
import { costsOf, type Prices } from './prices.ts';
import type { Result, SizeLabel } from './result.ts';
import { type ResultIndex, resultIndex, roundMetres } from './result-index.ts';
import { printedFacts } from './result-trail.ts';
import { countedKinds, plainWords } from './trade-words.ts';
import type { WeighAlternative, WeighBattery, WeighObstacle, WeighResult } from './weigh.ts';
import { englishWeigh } from './weigh-english.ts';
import { addsOf, fittingsOf, pipesOf, type SizeOf, sectionsOf, tallied, wallOf } from './weigh-quantities.ts';
import { weighVerdict } from './weigh-verdict.ts';

/**
 * The published comparison of batteries. `result` is that of the same outcome; prices are the user's own figures. Each
 * weighing is printed as it comes and not kept: every one holds several runs of the whole building.
 */
export function weighResult(
  outcome: Outcome,
  result: Result,
  weighings: Iterable<Weighing>,
  prices: Prices | null = null,
): WeighResult {
  const index = resultIndex(outcome);
  return {
    format: 'drainwright-weigh',
    version: 1,
    program: result.program,
    model: result.model,
    ...(result.models === undefined ? {} : { models: result.models }),
    code: result.code,
    settings: result.settings,
    ...(prices === null ? {} : { currency: prices.currency }),
    batteries: Array.from(weighings, (weighing) => weighBattery(outcome, index, result, weighing, prices)),
    caution: result.caution,
  };
}

function weighBattery(
  outcome: Outcome,
  index: ResultIndex,
  result: Result,
  { row, alternatives }: Weighing,
  prices: Prices | null,
): WeighBattery {
  const { facts, reading } = row.battery;
  const id = index.batteryName(facts.id);
  const { identities, paths } = outcome;
  const elements = row.fixtures.map((fixture) => paths.fixtures[fixture]!.element);
  const kinds = elements.map((element) => plainWords(identities[element]!.kind ?? 'unidentified fixture'));
  const modelled = alternatives.find((one) => one.reading === reading);
  const printed = alternatives.map((one) => alternativeOf(outcome, index, one, reading, modelled, prices));
  return {
    id,
    fixtures: elements.map(index.idOf),
    title: countedKinds(kinds),
    storey: index.storeyOf(elements[0]!),
    modelled: reading,
    why: result.batteries.find((one) => one.id === id)?.why ?? '',
    verdict: weighVerdict(printed, englishWeigh),
    alternatives: printed,
  };
}

function alternativeOf(
  outcome: Outcome,
  index: ResultIndex,
  { reading, holds, obstacles, attempt, quantities }: Alternative,
  modelled: string,
  base: Alternative | undefined,
  prices: Prices | null,
): WeighAlternative {
  const size = (label: NominalSize | null): SizeLabel | null => (label === null ? null : index.size(label));
  const broken = obstacles.map((one) => obstacleOf(attempt?.outcome ?? outcome, index, one));
  const head = { reading, modelled: reading === modelled, holds, broken };
  if (quantities === null || attempt === null) {
    const none = {
      pipes: [],
      sections: [],
      fittings: [],
      cleanouts: [],
      floorHoles: [],
      adds: [],
      leavesOut: [],
      resizes: [],
    };
    return { ...head, largest: null, wall: null, ...none };
  }
  const built = attempt.outcome;
  const nameOf = (element: ElementId): string | null => attempt.piping.model.elements[element]!.name;
  const leavesOut = [...attempt.piping.removed]
    .sort((a, b) => a - b)
    .map((pipe) => ({
      element: outcome.network.pipes[pipe]!.element,
      role: outcome.shown.roles.uses[pipe]!.role,
      length: outcome.paths.stream.span(pipe),
    }));
  const alternative: WeighAlternative = {
    ...head,
    largest: largestOf(quantities, size),
    pipes: pipesOf(quantities, size),
    sections: sectionsOf(quantities, index, nameOf, size),
    fittings: fittingsOf(quantities, size),
    cleanouts: quantities.cleanouts.map(({ size: own, pipe, ...rest }) => ({
      size: index.size(own),
      pipe: index.size(pipe),
      ...rest,
    })),
    floorHoles: tallied(
      quantities.floorHoles.map((hole) => hole.size),
      (label) => outcome.code.series.rank(label),
    ).map(([label, count]) => ({ size: size(label), count })),
    wall: wallOf(outcome, index, quantities),
    adds: addsOf(quantities, nameOf, size),
    leavesOut: [...new Set(leavesOut.flatMap(({ element }) => element ?? []))].map((element) => {
      const own = leavesOut.filter((one) => one.element === element);
      return {
        globalId: index.idOf(element),
        name: nameOf(element),
        role: own[0]!.role,
        length: roundMetres(own.reduce((sum, { length }) => sum + length, 0)),
      };
    }),
    resizes:
      base?.attempt == null || base.reading === reading
        ? []
        : resizesOf(outcome, index, base, { attempt, quantities }, size, built),
  };
  return prices === null ? alternative : { ...alternative, costs: costsOf(alternative, prices) };
}

function largestOf({ largest }: Quantities, size: SizeOf): NonNullable<WeighAlternative['largest']> {
  const { inWall, underFloor, laidUnderFloor } = largest;
  const laid = laidUnderFloor === underFloor ? null : size(laidUnderFloor);
  return { inWall: size(inWall), underFloor: size(underFloor), ...(laid === null ? {} : { laidUnderFloor: laid }) };
}

function obstacleOf(
  outcome: Outcome,
  index: ResultIndex,
  { rule, clause, facts, finding, about }: Obstacle,
): WeighObstacle {
  const { code, model } = outcome;
  const given = {
    facts,
    about: about.map((element) => model.elements[element]!.name ?? `#${model.elements[element]!.stepId}`),
    clause: '',
    unit: code.unit,
    length: lengthText,
    slope: slopeText,
    number: (value: number): string => decimal(value, 2),
  };
  const sentence = (): string => {
    if (facts.notInCode === true) return 'the code does not know it';
    if (facts.noPlace === true) return `the drain of ${given.about[0] ?? 'a fixture'} leaves no place for a vent`;
    if (rule === null) return sentences[finding](given).replace(/\.$/, '');
    if (finding === 'relief-vent-missing')
      return 'no relief vent, and no vented drain that may stand in, joins after the last fixture';
    return brokenText(given);
  };
  return {
    rule,
    title: rule === null ? null : code.ruleTitle(rule),
    clause,
    facts: printedFacts(outcome, index, facts),
    sentence: sentence(),
  };
}

/** Elements of the model whose largest section needs another size than under the modelled reading. */
function resizesOf(
  { network, code }: Outcome,
  index: ResultIndex,
  base: Alternative,
  { attempt, quantities }: { attempt: NonNullable<Alternative['attempt']>; quantities: Quantities },
  size: SizeOf,
  built: Outcome,
): WeighAlternative['resizes'] {
  const sizesOf = (one: NonNullable<Alternative['attempt']>): Map<ElementId, NominalSize | null> => {
    const sizes = new Map<ElementId, NominalSize | null>();
    one.piping.origin.forEach((from, id) => {
      const element = from === null ? null : network.pipes[from]!.element;
      if (element === null) return;
      const own = one.outcome.pipes[id]!.required?.most ?? null;
      const known = sizes.get(element) ?? null;
      sizes.set(element, known === null ? own : own === null ? known : code.series.larger(known, own));
    });
    return sizes;
  };
  const [before, after] = [sizesOf(base.attempt!), sizesOf(attempt)];
  const seen = new Set<ElementId>();
  return quantities.pieces.flatMap(({ element, added, pipe }) => {
    if (element === null || added || seen.has(element)) return [];
    seen.add(element);
    const [from, to] = [before.get(element) ?? null, after.get(element) ?? null];
    if (from === to) return [];
    const role = built.shown.roles.uses[pipe as PipeId]!.role;
    return [
      {
        globalId: index.idOf(element),
        name: attempt.piping.model.elements[element]!.name,
        role,
        from: size(from),
        to: size(to),
      },
    ];
  });
}
