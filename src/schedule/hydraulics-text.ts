import { decimal, slopeText } from './number-text.ts';
import type { LevelHydraulics, ResultPipe, StackHydraulics } from './result.ts';

/** What physics says beside the code's size, in a sentence or two; none where it says nothing. */
export function hydraulicsText({ hydraulics }: ResultPipe): string[] {
  if (hydraulics === undefined) return [];
  return [
    `For information, not for its size: ${hydraulics.kind === 'level' ? levelText(hydraulics) : stackText(hydraulics)}.`,
  ];
}

function levelText({ bore, law, slope, halfFull, atFlow }: LevelHydraulics): string {
  const pipe = `a bore of ${decimal(bore * 1000, 1)} mm at ${slopeText(slope)}`;
  const half = `half full, ${pipe} carries ${decimal(halfFull.flow, 2)} l/s at ${decimal(halfFull.speed, 2)} m/s (${law})`;
  if (atFlow === undefined) return `${half}; ${cleansing(halfFull.cleansItself)}`;
  if (atFlow === null) return `${half}; at its own flow it would run full`;
  const own = `at its ${decimal(atFlow.flow, 2)} l/s it runs ${decimal(atFlow.fill * 100, 0)} % full at ${decimal(atFlow.speed, 2)} m/s`;
  return `${half}; ${own}; ${cleansing(atFlow.cleansItself)}`;
}

const cleansing = (cleansItself: boolean): string =>
  cleansItself ? 'it cleans itself, which takes 0.6 m/s' : 'less than the 0.6 m/s at which a drain cleans itself';

function stackText({ flow, speed, terminalLength, share }: StackHydraulics): string {
  const full = `7/24 full it carries ${decimal(flow, 2)} l/s, which falls at ${decimal(speed, 2)} m/s from ${decimal(terminalLength, 1)} m below the entry on (Wyly and Eaton)`;
  return share === undefined ? full : `${full}; its own flow fills ${decimal(share * 100, 0)} % of it`;
}
