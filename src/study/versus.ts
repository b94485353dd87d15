import type { PlumbingCode } from '../codes/plumbing-code.ts';
import type { Role } from '../codes/role.ts';
import type { Step } from '../codes/sizing-rule.ts';
import type { ElementId } from '../model/model.ts';
import type { PipeId } from '../network/network.ts';
import type { NominalSize } from '../units/nominal-size.ts';
import type { Outcome, PipeVerdict, Verdict } from '../verdicts/outcome.ts';

/** One building under two codes: the pipes that come out differently. */
export interface Versus {
  /** Pipe elements that both sized or judged. */
  readonly pipes: number;
  /** In the order of the model. */
  readonly contrasts: readonly Contrast[];
}

export interface Contrast {
  readonly element: ElementId;
  readonly what: readonly ('required' | 'verdict')[];
  readonly from: Side;
  readonly to: Side;
}

/** A pipe under one code: the section that asks for most. */
export interface Side {
  readonly section: PipeId;
  readonly role: Role;
  readonly modelled: NominalSize | null;
  readonly required: PipeVerdict['required'];
  readonly verdict: Verdict;
  readonly reason: string | null;
  /** The demand that decides, at the pipe where it starts; null where nothing asks for a size. */
  readonly because: { readonly step: Step; readonly at: PipeId } | null;
}

/** Both outcomes must come from one model. Sizes of one family are held together by label, of two by their DN. */
export function versus(from: Outcome, to: Outcome): Versus {
  if (from.model !== to.model) throw new Error('two codes are held together over one model');
  const sameSeries = from.code.family === to.code.family;
  const key = ({ series }: PlumbingCode, size: NominalSize | null): string | null =>
    size === null || sameSeries ? size : String(series.sizes[series.rank(size)]!.dn);
  const requiredKey = ({ code }: Outcome, { required }: Side): string =>
    required === null ? 'none' : `${key(code, required.least)} ${key(code, required.most)}`;
  const elements = [...from.network.pipesOf.keys()]
    .filter((element) => sectionsOf(from, element).length > 0 && sectionsOf(to, element).length > 0)
    .sort((a, b) => a - b);
  const contrasts = elements.flatMap((element): Contrast[] => {
    const [one, other] = [sideOf(from, element), sideOf(to, element)];
    const what: Contrast['what'][number][] = [];
    if (requiredKey(from, one) !== requiredKey(to, other)) what.push('required');
    if (one.verdict !== other.verdict) what.push('verdict');
    return what.length === 0 ? [] : [{ element, what, from: one, to: other }];
  });
  return { pipes: elements.length, contrasts };
}

const sectionsOf = ({ network }: Outcome, element: ElementId): readonly PipeId[] => network.pipesOf.get(element) ?? [];

function sideOf(outcome: Outcome, element: ElementId): Side {
  const { pipes, shown } = outcome;
  const sections = sectionsOf(outcome, element);
  const section = [...sections].sort((a, b) => asked(outcome, b) - asked(outcome, a) || a - b)[0]!;
  const worst = [...sections].sort((a, b) => weight(pipes[b]!) - weight(pipes[a]!) || a - b)[0]!;
  const { verdict, reason } = pipes[worst]!;
  return {
    section,
    role: shown.roles.uses[section]!.role,
    modelled: shown.loads.modelled[section]!.size,
    required: pipes[section]!.required,
    verdict,
    reason,
    because: rootOf(outcome, section),
  };
}

/** How much a section asks for; one that no size holds asks for most. */
function asked({ pipes, code }: Outcome, section: PipeId): number {
  const { required } = pipes[section]!;
  if (required === null) return -1;
  return required.most === null ? Number.POSITIVE_INFINITY : code.series.rank(required.most);
}

/** One pipe has one size: a section that could be smaller is no fault where another section needs what is drawn. */
const weights: Readonly<Record<Verdict, number>> = { undersized: 3, unknown: 2, agrees: 1, oversized: 0 };
const weight = ({ verdict }: PipeVerdict): number => weights[verdict];

/** The demand that governs; where it hands on another pipe's size, that pipe's, up to where it starts. */
function rootOf({ shown }: Outcome, section: PipeId): Side['because'] {
  let at = section;
  let step = ownFirst(shown.sizes[at]!.governing);
  for (const seen = new Set<PipeId>(); ; ) {
    if (step === undefined) return null;
    const before = step.facts.fromPipe;
    seen.add(at);
    if (typeof before !== 'number' || shown.sizes[before] === undefined || seen.has(before as PipeId))
      return { step, at };
    at = before as PipeId;
    // Where no size holds a load, the size handed on is still the one that another demand asks for.
    const handed: NominalSize | null = step.asks;
    step = ownFirst(shown.sizes[at]!.trail.filter(({ asks }) => asks === handed));
  }
}

/** A demand of the pipe itself before one that another pipe hands on. */
const ownFirst = (steps: readonly Step[]): Step | undefined =>
  steps.find(({ facts }) => typeof facts.fromPipe !== 'number') ?? steps[0];
