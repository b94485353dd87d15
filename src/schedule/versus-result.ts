import { type Side, versus } from '../study/versus.ts';
import type { Outcome } from '../verdicts/outcome.ts';
import type { Result, SizeLabel, SizeRange, TrailStep, Verdict } from './result.ts';
import { type ResultIndex, resultIndex } from './result-index.ts';
import { resultTrail } from './result-trail.ts';

/** `format: "drainwright-versus"`: the pipes of one model whose required size or verdict differs under two codes. */
export interface VersusResult {
  readonly format: 'drainwright-versus';
  readonly version: 1;
  readonly model: Result['model'];
  /** Set when several files were read as one building. */
  readonly models?: readonly Result['model'][];
  readonly code: Result['code'];
  readonly versus: Result['code'];
  /** What the user set that only one of the two codes knows: it counted for that one alone. */
  readonly onlyFor: { readonly code: readonly string[]; readonly versus: readonly string[] };
  readonly counts: {
    readonly pipes: number;
    readonly alike: number;
    readonly required: number;
    readonly verdict: number;
    readonly errors: { readonly code: number; readonly versus: number };
  };
  /** In the order of the model. */
  readonly pipes: readonly VersusPipe[];
  readonly caution: string;
}

export interface VersusPipe {
  readonly globalId: string;
  readonly stepId: number;
  readonly name: string | null;
  readonly what: readonly ('required' | 'verdict')[];
  readonly from: VersusSide;
  readonly to: VersusSide;
}

export interface VersusSide {
  readonly role: string;
  readonly modelled: SizeLabel | null;
  readonly required: SizeRange | null;
  readonly verdict: Verdict;
  readonly reason?: string;
  /** The demand that decides, and the pipe it starts at where that is another. */
  readonly because: TrailStep | null;
  readonly at?: string;
}

export interface VersusInput {
  readonly outcome: Outcome;
  readonly result: Result;
  /** Settings that only this code knows. */
  readonly only: readonly string[];
}

export function versusResult(first: VersusInput, second: VersusInput): VersusResult {
  const { pipes, contrasts } = versus(first.outcome, second.outcome);
  const indices = [resultIndex(first.outcome), resultIndex(second.outcome)] as const;
  const count = (what: string): number => contrasts.filter((one) => one.what.some((word) => word === what)).length;
  const errors = ({ findings }: Result): number => findings.filter(({ severity }) => severity === 'error').length;
  return {
    format: 'drainwright-versus',
    version: 1,
    model: first.result.model,
    ...(first.result.models === undefined ? {} : { models: first.result.models }),
    code: first.result.code,
    versus: second.result.code,
    onlyFor: { code: first.only, versus: second.only },
    counts: {
      pipes,
      alike: pipes - contrasts.length,
      required: count('required'),
      verdict: count('verdict'),
      errors: { code: errors(first.result), versus: errors(second.result) },
    },
    pipes: contrasts.map(({ element, what, from, to }) => ({
      globalId: indices[0].idOf(element),
      stepId: first.outcome.model.elements[element]!.stepId,
      name: first.outcome.model.elements[element]!.name,
      what,
      from: sideOf(first.outcome, indices[0], from),
      to: sideOf(second.outcome, indices[1], to),
    })),
    caution: first.result.caution,
  };
}

function sideOf(outcome: Outcome, index: ResultIndex, side: Side): VersusSide {
  const { because, reason } = side;
  const trail = because === null ? [] : resultTrail(outcome, index, because.at);
  const place = because === null ? -1 : outcome.shown.sizes[because.at]!.trail.indexOf(because.step);
  const [own] = because === null ? [] : index.idsOf([because.at]);
  const [shown] = index.idsOf([side.section]);
  return {
    role: side.role,
    modelled: side.modelled === null ? null : index.size(side.modelled),
    required: index.sizeRange(side.required),
    verdict: side.verdict,
    ...(reason === null ? {} : { reason }),
    because: trail[place] ?? null,
    ...(own === undefined || own === shown ? {} : { at: own }),
  };
}
