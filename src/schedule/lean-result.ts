import type { PipeState, Result } from './result.ts';

/** The result without the lists of ids that grow with depth: paths of fixtures, who uses a pipe. */
export function leanResult(result: Result): Result {
  return {
    ...result,
    fixtures: result.fixtures.map(({ waterPath: _water, airPath: _air, ...fixture }) => fixture),
    pipes: result.pipes.map(({ sections, ...pipe }) => ({
      ...leanState(pipe),
      ...(sections === undefined ? {} : { sections: sections.map(leanState) }),
    })),
  };
}

const leanState = <T extends PipeState>({
  servesWater: _water,
  servesAir: _air,
  ...rest
}: T): Omit<T, 'servesWater' | 'servesAir'> => rest;
