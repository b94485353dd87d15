import type { ElementId } from '../model/model.ts';
import type { Change, VentChange } from '../study/mend/change.ts';
import type { Plan, PlanStep } from '../study/mend/mend.ts';
import type { MendChange, MendResult, MendSearch, MendVent } from './mend.ts';
import { adviceOn } from './mend-advice.ts';
import { decimal, lengthText, slopeText } from './number-text.ts';
import type { Result } from './result.ts';
import { elementName, resultFinding } from './result-findings.ts';
import { type ResultIndex, resultIndex, roundMetres } from './result-index.ts';
import { plainWords } from './trade-words.ts';
import { ventedText } from './weigh-verdict.ts';

/** The published plan. `result` is that of the building as it is modelled. */
export function mendResult(plan: Plan, result: Result): MendResult {
  const { first, last, steps, cost, weights, left } = plan;
  const index = resultIndex(last);
  return {
    format: 'drainwright-mend',
    version: 1,
    program: result.program,
    model: result.model,
    ...(result.models === undefined ? {} : { models: result.models }),
    code: result.code,
    settings: result.settings,
    weights,
    changes: steps.map((step) => mendChange(plan, index, step)),
    cost: points(cost),
    search: searchOf(plan),
    before: { errors: first.findings.filter(({ severity }) => severity === 'error').length },
    after: {
      errors: left.length,
      findings: left.map((finding) => resultFinding(last, index, finding)),
      advice: adviceOn(left.map(({ code }) => code)),
    },
    caution: result.caution,
  };
}

function searchOf({ exact, least, runs, cost, steps, left, hopeless }: Plan): MendSearch {
  const open = `The search was broken off after ${runs} runs of all stages: a plan may exist that ${hopeless ? `costs less, from ${decimal(least, 1)} points on` : 'settles more'}.`;
  const proved =
    steps.length > 0
      ? 'No other combination of the changes that the program knows costs less.'
      : left.length === 0
        ? 'No error to mend.'
        : 'No change that the program knows settles these errors.';
  const sentence = exact ? proved : open;
  return { exact, least: points(Math.min(least, cost)), runs, hopeless: left.length > 0 && hopeless, sentence };
}

const points = (cost: number): number => Math.round(cost * 100) / 100;

function mendChange(plan: Plan, index: ResultIndex, step: PlanStep): MendChange {
  const { first, last } = plan;
  const ids = (elements: readonly ElementId[]): string[] =>
    elements.filter((element) => element < first.model.elements.length).map(index.idOf);
  if (step.kind === 'size') {
    return {
      kind: 'size',
      about: ids([step.element]),
      from: step.from,
      to: step.to,
      why: sizeWhy(plan, index, step),
      finding: step.why === null ? null : resultFinding(last, index, step.why),
      cost: points(step.cost),
      size: { from: index.size(step.from), to: index.size(step.to) },
    };
  }
  if (step.kind === 'cleanout') {
    const { pipe, size, place, clause } = step.cleanout;
    return {
      kind: 'cleanout',
      about: ids([pipe]),
      from: null,
      to: `cleanout of ${size ?? 'unknown size'} (${place})`,
      why:
        step.why === null
          ? `The row is read another way, and needs a cleanout there (${last.code.id}, ${clause}).`
          : resultFinding(last, index, step.why).sentence,
      finding: step.why === null ? null : resultFinding(last, index, step.why),
      cost: points(step.cost),
      cleanout: { size: size === null ? null : index.size(size), place },
    };
  }
  const { change, why, cost } = step;
  const finding = resultFinding(last, index, why);
  const row = readAnew(plan, change);
  const then =
    row === null || change.kind === 'reading'
      ? []
      : [`With the vent the row of ${row.fixtures} fixtures is ${ventedText(row.to)}, not ${ventedText(row.from)}.`];
  return {
    kind: change.kind,
    about: ids(change.about),
    ...inWords(plan, change),
    why: [finding.sentence, ...then].join(' '),
    finding,
    cost: points(cost),
    ...data(plan, index, change),
    ...(row === null ? {} : { reading: row }),
  };
}

/** The row that a change makes another reading of: its own words, or what a vent makes of the row that it serves. */
function readAnew({ first, last }: Plan, change: Change): NonNullable<MendChange['reading']> | null {
  if (change.kind === 'reading') return { from: change.from, to: change.to, fixtures: change.about.length };
  if (!('added' in change)) return null;
  const rows = change.added
    .flatMap((element) => last.network.pipesOf.get(element) ?? [])
    .flatMap((pipe) => last.shown.roles.uses[pipe]!.battery ?? []);
  const row = rows[0];
  if (row === undefined) return null;
  const fixtures = row.facts.traps.map(({ fixture }) => last.paths.fixtures[fixture]!.element);
  const before = first.shown.roles.batteries.find(({ facts }) =>
    facts.traps.some(({ fixture }) => fixtures.includes(first.paths.fixtures[fixture]!.element)),
  );
  if (before === undefined || before.reading === row.reading) return null;
  return { from: before.reading, to: row.reading, fixtures: fixtures.length };
}

/** The finding that asks for it, else what follows from the other changes. */
function sizeWhy({ last }: Plan, index: ResultIndex, step: Extract<PlanStep, { kind: 'size' }>): string {
  if (step.why !== null) return resultFinding(last, index, step.why).sentence;
  const { code } = last;
  const grows = code.series.rank(step.to) > code.series.rank(step.from);
  const name = elementName(last, step.element);
  const clause = step.governs === null ? '' : ` (${code.id}, ${step.governs.clause})`;
  return grows
    ? `With the other changes ${name} needs ${step.to}${clause}.`
    : `${name} is larger than what it drains into; ${step.to} is enough for it${clause}.`;
}

function inWords(plan: Plan, change: Change): Pick<MendChange, 'from' | 'to'> {
  switch (change.kind) {
    case 'reading':
      return { from: plainWords(change.from), to: plainWords(change.to) };
    case 'slope':
      return {
        from: change.from === null ? null : slopeText(change.from),
        to: `${slopeText(change.to)}${change.lowered === null ? '' : `: ${loweringText(change.lowered)}`}`,
      };
    case 'trap':
      return { from: `${lengthText(change.from)} from the fixture`, to: `${lengthText(change.to)} from the fixture` };
    default:
      return { from: change.kind === 'vent' ? null : ventFrom(change), to: ventTo(plan, change) };
  }
}

const loweringText = (lowered: number): string =>
  Math.abs(lowered) < 0.0005
    ? 'its ends stay'
    : `its lower end comes ${lowered > 0 ? 'down' : 'up'} ${lengthText(Math.abs(lowered))}, and what follows with it`;

const ventFrom = ({ kind }: VentChange): string => (kind === 'moved-vent' ? 'where it stands now' : 'its end inside');

/** `relief vent of 1½ in, 960 mm, to S4.VJ-S4.VE`. */
function ventTo(plan: Plan, change: VentChange): string {
  const { role, size } = madeOf(plan, change);
  const ends = endsOf(plan, change);
  const end = change.joins !== null && ends === 'pipe' ? `to ${elementName(plan.last, change.joins)}` : endWords[ends];
  return [`${plainWords(role)} of ${size ?? 'unknown size'}`, lengthText(change.length), end].join(', ');
}

const endWords: Readonly<Record<MendVent['ends'], string>> = {
  pipe: 'to the vent there',
  'new-vent': 'to the new vent beside it',
  'open-air': 'through the roof to open air',
  'as-before': 'to where it goes on',
};

function endsOf({ first }: Plan, { kind, joins }: VentChange): MendVent['ends'] {
  if (joins !== null) return joins >= first.model.elements.length ? 'new-vent' : 'pipe';
  return kind === 'moved-vent' ? 'as-before' : 'open-air';
}

/** What the new pipe is in the changed building: by its first piece that something breathes through. */
function madeOf({ last }: Plan, { added }: VentChange): { role: string; size: string | null } {
  for (const element of added) {
    for (const pipe of last.network.pipesOf.get(element) ?? []) {
      const { role } = last.shown.roles.uses[pipe]!;
      // The proof has it drawn in the size that it needs.
      if (role !== 'idle') return { role, size: last.shown.loads.modelled[pipe]!.size };
    }
  }
  const drawn = added.flatMap((element) => last.network.pipesOf.get(element) ?? []);
  return { role: 'vent', size: drawn.flatMap((pipe) => last.shown.loads.modelled[pipe]!.size ?? [])[0] ?? null };
}

function data(plan: Plan, index: ResultIndex, change: Change): Pick<MendChange, 'vent' | 'slope' | 'trap'> {
  switch (change.kind) {
    case 'reading':
      return {};
    case 'slope':
      return {
        slope: {
          from: change.from === null ? null : roundMetres(change.from),
          to: roundMetres(change.to),
          lowered: change.lowered === null ? null : roundMetres(change.lowered),
        },
      };
    case 'trap':
      return { trap: { from: roundMetres(change.from), to: roundMetres(change.to) } };
    default: {
      const { role, size } = madeOf(plan, change);
      const ends = endsOf(plan, change);
      const vent: MendVent = {
        role,
        size: size === null ? null : index.size(size as Parameters<ResultIndex['size']>[0]),
        length: roundMetres(change.length),
        points: change.points.map(([x, y, z]) => [roundMetres(x), roundMetres(y), roundMetres(z)] as const),
        ends,
        joins: change.joins !== null && ends === 'pipe' ? index.idOf(change.joins) : null,
      };
      return { vent };
    }
  }
}

/** What a plan does to one element, for its sets and cards: changes in their order. */
export const changesOf = ({ changes }: MendResult, globalId: string): readonly MendChange[] =>
  changes.filter(({ about }) => about.includes(globalId));
