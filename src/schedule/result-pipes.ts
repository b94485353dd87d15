import type { ElementId } from '../model/model.ts';
import type { PipeId } from '../network/network.ts';
import type { FixtureId } from '../paths/paths.ts';
import { unitsOf } from '../units/quantity.ts';
import type { Outcome } from '../verdicts/outcome.ts';
import type { PipeState, ResultPipe, Verdict } from './result.ts';
import { resultHydraulics } from './result-hydraulics.ts';
import { type ResultIndex, roundMetres } from './result-index.ts';
import { resultTrail } from './result-trail.ts';

/** Pipe elements of the network, by file and STEP id, each with its sections where it has several. */
export function resultPipes(outcome: Outcome, index: ResultIndex): ResultPipe[] {
  const breathing = trapsThrough(outcome);
  return [...outcome.network.pipesOf]
    .filter(([, sections]) => sections.length > 0)
    .sort(([a], [b]) => a - b)
    .map(([element, sections]) => pipe(outcome, index, breathing, element, sections));
}

function pipe(
  outcome: Outcome,
  index: ResultIndex,
  breathing: readonly (readonly FixtureId[])[],
  element: ElementId,
  sections: readonly PipeId[],
): ResultPipe {
  const { model, network } = outcome;
  const { stepId, name, systems } = model.elements[element]!;
  const states = sections.map((section) => state(outcome, index, breathing, section));
  const shown = shownSection(outcome, sections);
  const union = (of: (one: PipeState) => readonly string[] | undefined): string[] => [
    ...new Set(states.flatMap((one) => of(one) ?? [])),
  ];
  const verdict = states.map((one) => one.verdict).reduce((a, b) => (worse[b] > worse[a] ? b : a));
  const main = states[sections.indexOf(shown)]!;
  const worst = states.find((one) => one.verdict === verdict)!;
  const { reason: _, ...rest } = main;
  const reason = verdict === 'unknown' ? (main.reason ?? worst.reason) : undefined;
  return {
    globalId: index.idOf(element),
    stepId,
    name,
    ...rest,
    length: roundMetres(sections.reduce((sum, section) => sum + network.pipes[section]!.length, 0)),
    verdict,
    ...(reason === undefined ? {} : { reason }),
    system:
      systems
        .map((system) => model.systems[system]!.name ?? model.systems[system]!.predefinedType)
        .find((one) => one !== null) ?? null,
    servesWater: union(({ servesWater }) => servesWater),
    servesAir: union(({ servesAir }) => servesAir),
    ...(sections.length === 1
      ? {}
      : {
          sections: states.map((one, at) => {
            const { from, to } = network.pipes[sections[at]!]!;
            return { from: roundMetres(from), to: roundMetres(to), ...one };
          }),
        }),
  };
}

/** One pipe has one size: a section that could be smaller is no fault where another section needs what is drawn. */
const worse: Readonly<Record<Verdict, number>> = { undersized: 3, unknown: 2, agrees: 1, oversized: 0 };

/** The section with the largest required size, then load, then the most downstream. */
function shownSection({ pipes, code, paths }: Outcome, sections: readonly PipeId[]): PipeId {
  const place = (section: PipeId): number => {
    let steps = 0;
    for (
      let next = paths.next[section] ?? null;
      next !== null && sections.includes(next);
      next = paths.next[next] ?? null
    )
      steps++;
    return -steps;
  };
  const sizeRank = (section: PipeId): number => {
    const required = pipes[section]!.required;
    if (required === null) return -1;
    return required.most === null ? Number.POSITIVE_INFINITY : code.series.rank(required.most);
  };
  return [...sections].sort((a, b) => {
    const [ra, rb] = [sizeRank(a), sizeRank(b)];
    if (ra !== rb) return rb > ra ? 1 : -1;
    return pipes[b]!.load.most - pipes[a]!.load.most || place(b) - place(a) || a - b;
  })[0]!;
}

function state(
  outcome: Outcome,
  index: ResultIndex,
  breathing: readonly (readonly FixtureId[])[],
  section: PipeId,
): PipeState {
  const { network, paths, shown, pipes } = outcome;
  const use = shown.roles.uses[section]!;
  const { load, ventLoad, required, provisional, verdict, reason } = pipes[section]!;
  const { from, to } = shown.loads.pipes[section]!;
  const modelled = shown.loads.modelled[section]!;
  const { slope, ground } = paths.slopes[section]!;
  const vertical = paths.vertical[section];
  const element = network.pipes[section]!.element!;
  const battery = use.battery;
  const length = use.vent?.length ?? null;
  return {
    role: use.role,
    also: use.also,
    ...(use.portion === null ? {} : { portion: use.portion }),
    storey: index.storeyOf(element),
    orientation: vertical === true ? 'vertical' : vertical === false ? 'horizontal' : 'unknown',
    slope: vertical === true ? null : { value: slope === null ? null : roundMetres(slope), ground },
    length: roundMetres(network.pipes[section]!.length),
    ...(length === null ? {} : { developedLength: roundMetres(length) }),
    next: paths.wet[section] ? index.nextElement(section) : null,
    load: { least: unitsOf(load.least), most: unitsOf(load.most) },
    ...(ventLoad === null ? {} : { ventLoad: { least: unitsOf(ventLoad.least), most: unitsOf(ventLoad.most) } }),
    servesWater: shown.loads.order
      .slice(from, to)
      .sort((a, b) => a - b)
      .map(index.fixtureId),
    servesAir: breathing[section]!.map(index.fixtureId),
    modelled: modelled.size === null ? null : { ...index.size(modelled.size), from: modelled.from ?? '' },
    required: index.sizeRange(required),
    provisional,
    verdict,
    ...(reason === null ? {} : { reason }),
    ...(battery === null ? {} : { battery: index.batteryName(battery.facts.id) }),
    ...hydraulicsOf(outcome, section),
    trail: resultTrail(outcome, index, section),
  };
}

function hydraulicsOf(outcome: Outcome, section: PipeId): Pick<PipeState, 'hydraulics'> {
  const hydraulics = resultHydraulics(outcome, section);
  return hydraulics === null ? {} : { hydraulics };
}

/** Traps whose air passes each pipe: through wet pipes and up the dry ones; their own arms not. By pipe id. */
function trapsThrough({ network, shown }: Outcome): FixtureId[][] {
  const through: FixtureId[][] = network.pipes.map(() => []);
  for (const { fixture, through: wet } of shown.roles.air) {
    const { how, vents } = shown.roles.venting[fixture]!;
    if (how === 'unvented' || how === 'free') continue;
    for (const pipe of [...wet, ...vents]) through[pipe]!.push(fixture);
  }
  return through;
}
