import { explainFixture } from './explain-fixture.ts';
import { explainPipe } from './explain-pipe.ts';
import type { Found } from './find-in-result.ts';
import type { PipeMargin } from './margin.ts';
import { type NextSmaller, nextSmallerOf } from './next-smaller.ts';
import type { Result, ResultFixture, ResultPipe, SizeLabel } from './result.ts';
import type { WhatIfResult } from './what-if.ts';

/** `format: "drainwright-explain"`: everything about one pipe or fixture, as data and as sentences. */
export interface Explanation {
  readonly format: 'drainwright-explain';
  readonly version: 1;
  readonly model: Result['model'];
  /** Set when several files were read as one building. */
  readonly models?: readonly Result['model'][];
  readonly code: Result['code'];
  readonly pipe?: ResultPipe;
  readonly fixture?: ResultFixture;
  /** Whole sentences, in the order they are to be read. */
  readonly story: readonly string[];
  /** Of pipes: the next smaller size of the code, and the first demand of the trail that it fails. */
  readonly nextSmaller: NextSmaller | null;
  /** Of pipes: how much more they take; null where they need no size. */
  readonly margin?: PipeMargin | null;
  /** What would be different, where that was asked. */
  readonly whatIf?: WhatIfResult;
  readonly caution: string;
}

/** `sizes` are those the code offers, smallest first. */
export function explain(result: Result, found: Found, sizes: readonly SizeLabel[]): Explanation {
  const { model, models, code, caution } = result;
  const head = {
    format: 'drainwright-explain',
    version: 1,
    model,
    ...(models === undefined ? {} : { models }),
    code,
  } as const;
  if (found.kind === 'fixture') {
    return {
      ...head,
      fixture: found.fixture,
      story: explainFixture(result, found.fixture),
      nextSmaller: null,
      caution,
    };
  }
  const nextSmaller = nextSmallerOf(found.pipe, sizes);
  return { ...head, pipe: found.pipe, story: explainPipe(result, found.pipe, nextSmaller), nextSmaller, caution };
}
