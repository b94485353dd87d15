import type { SpeedLaw } from './friction.ts';
import { partFull } from './part-full.ts';

/** Water in a level pipe: flow in l/s, speed in m/s, depth as share of the bore. */
export interface DrainFlow {
  readonly flow: number;
  readonly speed: number;
  readonly fill: number;
}

/** What a pipe of this bore (metres) carries at a slope (m/m) when filled to a share of its bore. */
export function flowAtFill(bore: number, slope: number, fill: number, law: SpeedLaw): DrainFlow {
  const { area, radius } = partFull(bore, bore * fill);
  const speed = law(radius, slope);
  return { flow: area * speed * litres, speed, fill };
}

/** Fuller than this a round pipe carries less again: each flow above has two depths, and the lower one counts. */
export const fullestFlow = 0.938;

/** Depth and speed at which a pipe carries a flow in l/s; null where it cannot without running full. */
export function flowInDrain(bore: number, slope: number, flow: number, law: SpeedLaw): DrainFlow | null {
  if (!(flow > 0 && slope > 0) || flowAtFill(bore, slope, fullestFlow, law).flow < flow) return null;
  let [low, high] = [0, fullestFlow];
  for (let step = 0; step < halvings; step++) {
    const middle = (low + high) / 2;
    if (flowAtFill(bore, slope, middle, law).flow < flow) low = middle;
    else high = middle;
  }
  return { ...flowAtFill(bore, slope, high, law), flow };
}

/** Water runs fastest at this fill, by Manning as by Colebrook and White within what anybody measures. */
const fastestFill = 0.813;

/** Fill from which on a pipe's water runs at `speed` in m/s; null where it never does. */
export function fillAtSpeed(bore: number, slope: number, speed: number, law: SpeedLaw): number | null {
  if (!(slope > 0) || flowAtFill(bore, slope, fastestFill, law).speed < speed) return null;
  let [low, high] = [0, fastestFill];
  for (let step = 0; step < halvings; step++) {
    const middle = (low + high) / 2;
    if (flowAtFill(bore, slope, middle, law).speed < speed) low = middle;
    else high = middle;
  }
  return high;
}

/** The depth to a millionth of a millionth of the bore. */
const halvings = 40;
const litres = 1000;
