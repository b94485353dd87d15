import { decimal, lengthText, slopeText } from './number-text.ts';
import type { LevelHydraulics, ResultPipe, StackHydraulics } from './result.ts';

/** What physics says beside the code's size, in a few sentences; none where it says nothing. */
export function hydraulicsText({ hydraulics }: Pick<ResultPipe, 'hydraulics'>): string[] {
  if (hydraulics === undefined) return [];
  const said = hydraulics.kind === 'level' ? levelText(hydraulics) : stackText(hydraulics);
  return [`For information, not for its size: ${said[0]}.`, ...said.slice(1).map((sentence) => `${sentence}.`)];
}

function levelText({ bore, law, slope, halfFull, otherLaw, cleansFrom, atFlow }: LevelHydraulics): string[] {
  const carries = ({ flow, speed }: { readonly flow: number; readonly speed: number }, by: string): string =>
    `${decimal(flow, 2)} l/s at ${decimal(speed, 2)} m/s by ${by.replace(/, (.*)$/, ' ($1)')}`;
  const deep = (fill: number): string => `${decimal(fill * 100, 0)} % full, ${lengthText(fill * bore)} deep`;
  const half = `half full, a bore of ${boreText(bore)} at ${slopeText(slope)} carries ${carries(halfFull, law)}, ${carries(otherLaw, otherLaw.law)}`;
  const cleans =
    cleansFrom === null
      ? 'It is too slow at every depth to clean itself, which takes 0.6 m/s'
      : `It cleans itself, which takes 0.6 m/s, from ${deep(cleansFrom)}`;
  if (atFlow === undefined) return [half, cleans];
  if (atFlow === null) return [half, cleans, 'At the flow that the code reckons with it would run full'];
  const own = `At its ${decimal(atFlow.flow, 2)} l/s it runs ${deep(atFlow.fill)}, at ${decimal(atFlow.speed, 2)} m/s`;
  return [half, cleans, `${own}: ${atFlow.cleansItself ? 'it cleans itself' : 'too slow to clean itself'}`];
}

function stackText({ bore, flow, speed, terminalLength, share }: StackHydraulics): string[] {
  const full = `7/24 full, a stack of ${boreText(bore)} bore carries ${decimal(flow, 2)} l/s, which fall at ${decimal(speed, 2)} m/s from ${decimal(terminalLength, 1)} m below the entry on (Wyly and Eaton)`;
  return share === undefined ? [full] : [full, `Its own flow fills ${decimal(share * 100, 0)} % of it`];
}

/** Bores are told to a tenth of a millimetre. */
const boreText = (metres: number): string => `${decimal(metres * 1000, 1)} mm`;
