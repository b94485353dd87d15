import type { PlumbingCode } from '../codes/plumbing-code.ts';
import type { Reading } from '../codes/reading.ts';
import type { Role } from '../codes/role.ts';
import type { Finding } from '../findings/finding.ts';
import type { FixtureDetail, FixtureKind } from '../model/identity.ts';
import type { ElementId } from '../model/model.ts';
import type { PipeId } from '../network/network.ts';
import { type Piping, runNetwork } from '../pipeline.ts';
import type { NominalSize } from '../units/nominal-size.ts';
import type { Load, Range } from '../units/quantity.ts';
import type { Outcome, Verdict } from '../verdicts/outcome.ts';
import { withFixture } from './added-fixture.ts';
import { withCode, withKind, withReading, withSize, withSlope } from './edits.ts';
import { pipingOf } from './piping-of.ts';

/** What is asked: plain data. Elements are those of the model; a battery goes by any of its fixtures. */
export type Edit =
  | {
      readonly edit: 'kind';
      readonly fixture: ElementId;
      readonly kind: FixtureKind;
      readonly detail?: Partial<FixtureDetail>;
    }
  | { readonly edit: 'slope'; readonly pipe: ElementId; readonly slope: number }
  | { readonly edit: 'size'; readonly pipe: ElementId; readonly size: NominalSize }
  | { readonly edit: 'reading'; readonly fixture: ElementId; readonly reading: Reading }
  | {
      readonly edit: 'add';
      readonly pipe: ElementId;
      readonly kind: FixtureKind;
      readonly detail?: Partial<FixtureDetail>;
      readonly count: number;
    }
  | { readonly edit: 'code'; readonly code: string };

export interface WhatIf {
  /** Of the building as it would be. */
  readonly outcome: Outcome;
  /** Pipes that change in verdict, required size, role or load, in the order of the model. */
  readonly changes: readonly PipeChange[];
  /** Findings that go and come, by code and what they are about. */
  readonly gone: readonly Finding[];
  readonly come: readonly Finding[];
}

export interface PipeChange {
  readonly element: ElementId;
  readonly from: PipeSeen;
  readonly to: PipeSeen;
}

/** A pipe as one element: its worst verdict, its largest required size, its heaviest section. */
export interface PipeSeen {
  readonly verdict: Verdict;
  readonly role: Role;
  readonly required: NominalSize | null;
  readonly load: Range<Load>;
}

/** The building after some edits, one after the other, run through all stages, and what is different. */
export function whatIf(outcome: Outcome, edits: readonly Edit[], codeOf: (id: string) => PlumbingCode): WhatIf {
  const piping = edits.reduce((given, edit) => edited(outcome, given, edit, codeOf), pipingOf(outcome));
  const after = runNetwork(piping);
  return { outcome: after, changes: pipeChanges(outcome, after), ...findingChanges(outcome, after) };
}

function edited(before: Outcome, piping: Piping, edit: Edit, codeOf: (id: string) => PlumbingCode): Piping {
  switch (edit.edit) {
    case 'kind':
      return withKind(piping, edit.fixture, edit.kind, edit.detail);
    case 'size':
      return withSize(piping, edit.pipe, edit.size);
    case 'slope': {
      const { stream } = before.paths;
      return withSlope(piping, levelSections(before, piping, edit.pipe), edit.slope, (pipe) => stream.up(pipe));
    }
    case 'reading':
      return withReading(piping, rowWith(before, edit.fixture), edit.reading);
    case 'add': {
      let changed = piping;
      for (let more = 0; more < edit.count; more++) {
        const section = changed.network.pipesOf.get(edit.pipe)?.[0];
        if (section !== undefined)
          changed = withFixture(changed, section, { kind: edit.kind, detail: edit.detail ?? {} });
      }
      return changed;
    }
    case 'code':
      return withCode(piping, codeOf(edit.code));
  }
}

const levelSections = ({ paths, network }: Outcome, piping: Piping, pipe: ElementId): PipeId[] =>
  (piping.network.pipesOf.get(pipe) ?? []).filter((section) => {
    return section < network.pipes.length && paths.vertical[section] !== true && paths.wet[section];
  });

/** Fixtures of the battery that a fixture belongs to; itself alone where it belongs to none. */
function rowWith({ shown, paths }: Outcome, fixture: ElementId): ElementId[] {
  const rows = shown.roles.batteries.map(({ facts }) =>
    facts.traps.map(({ fixture: id }) => paths.fixtures[id]!.element),
  );
  return rows.find((row) => row.includes(fixture)) ?? [fixture];
}

function pipeChanges(before: Outcome, after: Outcome): PipeChange[] {
  return [...before.network.pipesOf.keys()]
    .sort((a, b) => a - b)
    .flatMap((element): PipeChange[] => {
      const [from, to] = [seen(before, element), seen(after, element)];
      return from === null || to === null || alike(from, to) ? [] : [{ element, from, to }];
    });
}

const alike = (a: PipeSeen, b: PipeSeen): boolean =>
  a.verdict === b.verdict &&
  a.role === b.role &&
  a.required === b.required &&
  a.load.least === b.load.least &&
  a.load.most === b.load.most;

/** One pipe has one size: a section that could be smaller is no fault where another section needs what is drawn. */
const worse: Readonly<Record<Verdict, number>> = { undersized: 3, unknown: 2, agrees: 1, oversized: 0 };

export function seen({ network, pipes, shown, code }: Outcome, element: ElementId): PipeSeen | null {
  const sections = network.pipesOf.get(element) ?? [];
  if (sections.length === 0) return null;
  const rank = (section: PipeId): number => {
    const most = pipes[section]!.required?.most ?? null;
    return most === null ? -1 : code.series.rank(most);
  };
  const main = sections.reduce((a, b) =>
    rank(b) > rank(a) || (rank(b) === rank(a) && pipes[b]!.load.most > pipes[a]!.load.most) ? b : a,
  );
  const verdict = sections.map((section) => pipes[section]!.verdict).reduce((a, b) => (worse[b] > worse[a] ? b : a));
  const { required, load } = pipes[main]!;
  return { verdict, role: shown.roles.uses[main]!.role, required: required?.most ?? null, load };
}

function findingChanges(before: Outcome, after: Outcome): Pick<WhatIf, 'gone' | 'come'> {
  const key = ({ code, about, facts }: Finding): string =>
    `${code} ${about[0] ?? ''} ${facts.what ?? facts.rule ?? ''}`;
  const [old, now] = [new Set(before.findings.map(key)), new Set(after.findings.map(key))];
  const told = ({ severity, code }: Finding): boolean => severity !== 'note' && code !== 'size-unknown';
  return {
    gone: before.findings.filter((finding) => told(finding) && !now.has(key(finding))),
    come: after.findings.filter((finding) => told(finding) && !old.has(key(finding))),
  };
}
