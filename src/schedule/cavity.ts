import type { WeighResult } from './weigh.ts';
export const cavitySvg = (_: WeighResult): string => '';
