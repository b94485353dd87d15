/** Rows of fixtures in the piping notation, as the tests of the codes draw them again and again. */

export interface Arm {
  /** Height of the floor it stands on. */
  readonly floor?: number;
  readonly length?: number;
  /** A dry vent of its own, `V<n>-VT<n>`, in the middle of the arm. */
  readonly vented?: boolean;
  /** Where that vent ends. */
  readonly sky?: number;
}

/**
 * Fixture `F<n>` at the joint `J<n>`: a trap `T<n>` under the floor and a level arm from the south. `what` is a line of
 * the notation without its place: `urinal, stall, trap 2 in`. A closet has its trap inside and a bend `B<n>` instead.
 */
export function armOf(
  n: number | string,
  what: string,
  { floor = 0, length = 0.3, vented = false, sky = 4.2 }: Arm = {},
): string {
  const [word = '', ...details] = what.split(', ');
  const bore = /trap ([^,]*) in/.exec(what)?.[1] ?? '3';
  const rest = details.length === 0 ? '' : `, ${details.join(', ')}`;
  const inside = word === 'closet' || what.includes('pedestal');
  const end = inside ? `B${n}` : `T${n}`;
  const open = word === 'floor-drain' ? ', untrapped' : '';
  return `
${vented ? `node V${n} from J${n} south ${length} rise 1:50` : ''}
${inside ? 'node' : 'trap'} ${end} from ${vented ? 'V' : 'J'}${n} south ${length} rise 1:50
${word} F${n} from ${end} to ${floor}${rest}${open}
drain ${bore} in: F${n} > ${end}${vented ? ` > V${n}` : ''} > J${n}
${vented ? `vent 1 1/2 in: V${n} > VT${n} (to ${sky})\nterminal VT${n}` : ''}`;
}

/** The joints `J<first>` to `J<last>` in a line to the east, 0.7 m apart, after the node that stands in front. */
export const lineOf = (first: number, last: number): string =>
  Array.from({ length: last - first + 1 }, (_, at) => ` > J${first + at} (east 0.7 fall 1:50)`).join('');

/** Floor, slab and roof of a hall; the drawing goes between. */
export const hall = (title: string, piping: string): string => `model "${title}"
storey "Ground floor" at 0
${piping}
roof "Roof" from -5 -5 to 60 10 top 3.6 thick 0.3
`;

/** Two lavatories of 1 by a double fitting on the vertical pipe at `at`, traps drawn. */
export const lavatoryPair = (at: string): string => `
trap TL1 from ${at} west 0.4 north 0.15 rise 1:50
trap TL2 from ${at} east 0.4 north 0.15 rise 1:50
lavatory L1 from TL1 up 0.12, trap 1 1/4 in
lavatory L2 from TL2 up 0.12, trap 1 1/4 in
drain 1 1/4 in: L1 > TL1 > ${at}
drain 1 1/4 in: L2 > TL2 > ${at}`;

export interface WetRow {
  /** At the head: two lavatories by a double fitting, or one. */
  readonly lavatories?: 1 | 2;
  /** From the head's joint `LJ` down to `LF`; the standard way is straight down. */
  readonly down?: string;
  readonly vent?: string;
  readonly more?: string;
}

/**
 * A row wet vented through lavatories: `LJ` where their arms meet, down to `LF`, level through `J1` to the last joint, on
 * to a drop `K`-`BF` and out. The dry vent is `LJ-VT`.
 */
export function wetVentedRow(fixtures: readonly string[], options: WetRow = {}): string {
  const { lavatories = 2, down = 'LF (to -0.4)', vent = 'vent 3 in: LJ > VT (to 4.2)', more = '' } = options;
  const one = `trap TL1 from LJ north 0.4 rise 1:50
lavatory L1 from TL1 up 0.12, trap 1 1/4 in
drain 1 1/4 in: L1 > TL1 > LJ`;
  return hall(
    'A wet vented row',
    `node LJ at 0 0 0.5
${lavatories === 2 ? lavatoryPair('LJ') : one}
drain 3 in: LJ > ${down}${lineOf(1, fixtures.length)} > K (east 0.7 fall 1:50) > BF (to -1.2) > OUT (east 9 fall 1:50)
${fixtures.map((what, at) => armOf(at + 1, what)).join('')}
${vent}
terminal VT
sewer OUT
${more}`,
  );
}

export interface CircuitRow {
  /** Vents of the notation: `vent 1 1/2 in: RV > RT (to 2.5) > VJ (over CV)` is the standard one. */
  readonly relief?: string;
  /** Two lavatories on the vertical part of the circuit vent. */
  readonly lavatories?: boolean;
  /** Metres that the vents run level under the roof before they go out. */
  readonly run?: number;
  readonly more?: string;
}

/**
 * A row circuit vented: the first fixture's own drain `J0-CV`, the circuit vent's foot `CV`, the others at `J2` on, the
 * relief vent's foot `RV`, on to a drop and out. With lavatories the circuit vent is wet from `LJ` to `CV`.
 */
export function circuitVentedRow(fixtures: readonly string[], options: CircuitRow = {}): string {
  const { relief = 'vent 3 in: RV > RT (to 2.5) > VJ (over CV rise 1:100)', lavatories = false, more = '' } = options;
  const out = options.run === undefined ? 'VT (to 4.2)' : `VR (to 3 east ${options.run} rise 1:100) > VT (to 4.2)`;
  const foot = lavatories ? 'LJ' : 'CV';
  return hall(
    'A circuit vented row',
    `node J1 at 0 0 -0.4
drain 3 in: J1 > CV (east 0.4 fall 1:50)${lineOf(2, fixtures.length)} > RV (east 0.4 fall 1:50) > K (east 0.7 fall 1:50) >
  BF (to -1.2) > OUT (east 9 fall 1:50)
${fixtures.map((what, at) => armOf(at + 1, what)).join('')}
${lavatories ? `node LJ from CV to 0.5\n${lavatoryPair('LJ')}\ndrain 3 in: LJ > CV` : ''}
${relief === '' ? '' : relief}
vent 3 in: ${foot}${relief.includes('VJ') ? ' > VJ' : ''} > ${out}
terminal VT
sewer OUT
${more}`,
  );
}

/**
 * A branch whose fixtures all have vents of their own: level from `J1` through the last joint, on to a drop `K`-`BF` and
 * out. `more` is drawn beside it.
 */
export const ventedRow = (fixtures: readonly string[], more = ''): string =>
  hall(
    'A branch of vented fixtures',
    `node J1 at 0 0 -0.4
drain 3 in: J1${lineOf(2, fixtures.length)} > K (east 0.7 fall 1:50) > BF (to -1.2) > OUT (east 9 fall 1:50)
${fixtures.map((what, at) => armOf(at + 1, what, { vented: true })).join('')}
sewer OUT
${more}`,
  );

/** The row of `ventedRow`, but only the first fixture has a vent, `V1-VT1`: the others breathe through its drain. */
export const rowBehindVent = (fixtures: readonly string[], more = ''): string =>
  hall(
    'A row behind one vent',
    `node J1 at 0 0 -0.4
drain 3 in: J1${lineOf(2, fixtures.length)} > K (east 0.7 fall 1:50) > BF (to -1.2) > OUT (east 9 fall 1:50)
${fixtures.map((what, at) => armOf(at + 1, what, { vented: at === 0 })).join('')}
sewer OUT
${more}`,
  );

/** So many of one kind. */
export const times = (count: number, what: string): string[] => Array.from({ length: count }, () => what);
