import type { ElementId } from '../model/model.ts';
import type { PipeId } from '../network/network.ts';
import { type FixtureLike, type Margin, margins, moreFixtures, wayMargin } from '../study/margin.ts';
import { type WhatIf, whatIf } from '../study/what-if.ts';
import { unitsOf } from '../units/quantity.ts';
import type { Outcome } from '../verdicts/outcome.ts';
import { lengthText, unitsText } from './number-text.ts';
import type { SizeLabel } from './result.ts';
import { elementName } from './result-findings.ts';
import { resultIndex, roundMetres } from './result-index.ts';
import { counted, listed, plainWords } from './trade-words.ts';

/** How much more one pipe takes; loads in the code's unit, lengths in metres. Of its tightest section. */
export interface PipeMargin {
  readonly globalId: string;
  /** Before it needs another size; null: no load changes it. */
  readonly load: number | null;
  /** At the size that is drawn; negative: so much too much. null: no size is drawn, or load does not decide. */
  readonly drawn: number | null;
  /** Length of a vent before it needs another size; null: no length changes it. */
  readonly length: number | null;
  readonly next: { readonly size: SizeLabel | null; readonly clause: string } | null;
}

export interface BatteryMargin {
  readonly id: string;
  /** Of its line: what the tightest pipe takes. */
  readonly load: number | null;
  /** Further fixtures of its own kinds under its reading, each kind by itself. */
  readonly more: readonly { readonly kind: string; readonly count: number }[];
}

export interface StackMargin {
  readonly pipes: readonly string[];
  readonly load: number | null;
}

export interface MarginResult {
  /** In the order of the model; pipes that need no size are not in it. */
  readonly pipes: readonly PipeMargin[];
  readonly batteries: readonly BatteryMargin[];
  readonly stacks: readonly StackMargin[];
}

/** Margins of a whole building, for the page to colour by. */
export function marginResult(outcome: Outcome): MarginResult {
  const index = resultIndex(outcome);
  const own = margins(outcome);
  const { network, shown } = outcome;
  const least = (pipes: readonly PipeId[]): number | null => {
    const loads = pipes.flatMap((pipe) => own[pipe]?.load ?? []);
    return loads.length === 0 ? null : unitsOf(Math.min(...loads) as Parameters<typeof unitsOf>[0]);
  };
  return {
    pipes: [...network.pipesOf.keys()]
      .sort((a, b) => a - b)
      .flatMap((element) => {
        const margin = tightest(outcome, own, element);
        return margin === null ? [] : [printed(margin, element)];
      }),
    batteries: shown.roles.batteries.map(({ facts, reading }) => {
      const pipes = reading === 'circuit-vent' ? facts.circuit.branch : facts.line;
      const kinds = likesOf(outcome).filter(({ kind }) => facts.traps.some((trap) => trap.kind === kind));
      return {
        id: index.batteryName(facts.id),
        load: least(pipes),
        more: kinds.map((like) => ({
          kind: like.kind,
          count: pipes.length === 0 ? 0 : Math.min(...pipes.map((pipe) => moreFixtures(outcome, pipe, like))),
        })),
      };
    }),
    stacks: shown.roles.stacks.map(({ pipes }) => ({ pipes: index.idsOf(pipes), load: least(pipes) })),
  };

  function printed({ load, drawn, length, next }: Margin, element: ElementId): PipeMargin {
    return {
      globalId: index.idOf(element),
      load: load === null ? null : unitsOf(load),
      drawn: drawn === null ? null : unitsOf(drawn),
      length: length === null ? null : roundMetres(length),
      next: next === null ? null : { size: next.size === null ? null : index.size(next.size), clause: next.by.clause },
    };
  }
}

/** The margin of one pipe; null where it needs no size. */
export function marginOfPipe(outcome: Outcome, globalId: string): { margin: PipeMargin | null; sentences: string[] } {
  const index = resultIndex(outcome);
  const element = [...outcome.network.pipesOf.keys()].find((one) => index.idOf(one) === globalId);
  if (element === undefined) return { margin: null, sentences: [] };
  const margin = marginResult(outcome).pipes.find((one) => one.globalId === globalId) ?? null;
  return { margin, sentences: marginSentences(outcome, element) };
}

/** Of the sections of a pipe the one that takes the least more. */
function tightest(outcome: Outcome, own: readonly (Margin | null)[], element: ElementId): Margin | null {
  const sections = (outcome.network.pipesOf.get(element) ?? []).flatMap((section) => own[section] ?? []);
  const value = ({ load }: Margin): number => load ?? Number.POSITIVE_INFINITY;
  return sections.length === 0 ? null : sections.reduce((a, b) => (value(b) < value(a) ? b : a));
}

/** Fixtures as the building has some, each kind and load once, in the order of the model. */
function likesOf({ paths, shown, identities }: Outcome): FixtureLike[] {
  const likes = new Map<string, FixtureLike>();
  for (const { id, element } of paths.fixtures) {
    const { load, row } = shown.loads.fixtures[id]!;
    const kind = identities[element]!.kind;
    if (kind !== null && load > 0 && !likes.has(kind)) likes.set(kind, { kind, load, closet: row.closet });
  }
  return [...likes.values()];
}

const mostKinds = 3;

/** What a pipe still takes, in sentences: units, fixtures, length, the way to the sewer, and one more floor drain. */
export function marginSentences(outcome: Outcome, element: ElementId): string[] {
  const { network, code, paths } = outcome;
  const own = margins(outcome);
  const section = (network.pipesOf.get(element) ?? [])[0];
  const margin = tightest(outcome, own, element);
  if (section === undefined || margin === null) return [];
  const wet = paths.wet[section]!;
  return [
    ...loadSentence(outcome, margin, element, wet),
    ...lengthSentence(margin),
    ...(wet ? waySentence(outcome, own, section, margin) : []),
    ...(wet ? [floorDrainSentence(outcome, element)] : []),
    ...drawnSentence(margin, code.unit),
  ];
}

function loadSentence(outcome: Outcome, { load, next }: Margin, element: ElementId, wet: boolean): string[] {
  if (load === null) return ['No load changes its size.'];
  const { unit } = outcome.code;
  const units = unitsOf(load);
  const clause = next === null ? '' : ` (${next.by.clause})`;
  const then = next?.size == null ? 'no size holds it' : `it needs ${next.size}`;
  const half = load >= 30 ? '' : ' Half a unit more is too much.';
  const takes = `It takes ${units === 0 ? 'no' : unitsText(units, unit)} more before ${then}${clause}.`;
  return [`${takes}${half}`, ...(wet ? fixtureSentence(outcome, element) : [])];
}

function fixtureSentence(outcome: Outcome, element: ElementId): string[] {
  const { network, shown, identities, paths } = outcome;
  const sections = network.pipesOf.get(element) ?? [];
  const { from, to } = shown.loads.pipes[sections[0]!]!;
  const drained = new Set(
    shown.loads.order
      .slice(from, to)
      .map((fixture) => identities[paths.fixtures[fixture]!.element]!.kind as string | null),
  );
  const likes = likesOf(outcome).sort((a, b) => Number(drained.has(b.kind)) - Number(drained.has(a.kind)));
  const counts = likes.slice(0, mostKinds).map((like) => ({
    kind: plainWords(like.kind),
    count: Math.min(...sections.map((section) => moreFixtures(outcome, section, like))),
  }));
  if (counts.length === 0) return [];
  const some = counts.filter(({ count }) => count > 0);
  const none = counts.filter(({ count }) => count === 0);
  const more = some.map(({ kind, count }) => counted(count, `more ${kind}`));
  return [
    ...(some.length === 0 ? [] : [`That is ${alternatives(more)} at this size and reading.`]),
    ...(none.length === 0 ? [] : [`Not one more ${alternatives(none.map(({ kind }) => kind))}.`]),
  ];
}

const alternatives = (texts: readonly string[]): string => listed(texts).replace(' and ', ' or ');

function lengthSentence({ length }: Margin): string[] {
  if (length === null) return [];
  const half = length >= 0.5 ? 'half a metre more changes nothing' : 'half a metre more is too much';
  return [`It may be ${lengthText(length)} longer at this size; ${half}.`];
}

function waySentence(outcome: Outcome, own: readonly (Margin | null)[], section: PipeId, margin: Margin): string[] {
  const way = wayMargin(outcome, own, section);
  const element = way === null ? null : outcome.network.pipes[way.pipe]!.element;
  if (way === null || element === null || (margin.load !== null && way.load >= margin.load)) return [];
  return [
    `On its way to the sewer ${elementName(outcome, element)} takes the least more: ${unitsText(unitsOf(way.load), outcome.code.unit)}.`,
  ];
}

const mostChanged = 4;

function floorDrainSentence(outcome: Outcome, element: ElementId): string {
  const more: WhatIf = whatIf(
    outcome,
    [{ edit: 'add', pipe: element, kind: 'floor-drain', count: 1 }],
    () => outcome.code,
  );
  const sized = more.changes.filter(({ from, to }) => from.required !== to.required);
  if (sized.length === 0) return 'One more floor drain into it changes no size.';
  const told = sized
    .slice(0, mostChanged)
    .map(
      ({ element: pipe, from, to }) =>
        `${elementName(outcome, pipe)} from ${from.required ?? 'no size'} to ${to.required ?? 'no size'}`,
    );
  const rest = sized.length - mostChanged;
  return `One more floor drain into it changes ${counted(sized.length, 'pipe')}: ${listed(told)}${rest > 0 ? ` and ${rest} more` : ''}.`;
}

function drawnSentence({ load, drawn }: Margin, unit: string): string[] {
  if (drawn === null || load === null || drawn === load) return [];
  return [
    drawn < 0
      ? `As drawn it carries ${unitsText(-unitsOf(drawn), unit)} too much.`
      : `As drawn it would take ${unitsText(unitsOf(drawn), unit)} more.`,
  ];
}
