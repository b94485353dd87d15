/** Drainage in the manner of EN 12056-2 in the piping notation: fixtures without vents of their own on a stack. */

export interface Floor {
  /** Fixtures of a branch to the west of the stack, the farthest first; and of one to the east. */
  readonly west?: readonly string[];
  readonly east?: readonly string[];
}

export interface EuropeanTower {
  readonly more?: string;
  /** The stack goes on to the roof. */
  readonly stackVent?: boolean;
  /** A vent stack from below the lowest branch to above the highest. */
  readonly ventStack?: boolean;
  /** Branches come down into the stack at 45 degrees. */
  readonly flat?: boolean;
  /** Slope of the drain below, and its length to the sewer. */
  readonly slope?: string;
  /** Air admittance valve instead of the way through the roof. */
  readonly valve?: boolean;
}

export const floorHeight = 3;
const spacing = 0.7;

/**
 * A stack `S<top>` down through `S1` to its foot `SF` and out, with a branch west and east of it on every storey: fixtures
 * `F<storey>.w1` (the farthest) on, each by a level arm of 0.3 m to `J<storey>.w1`. The stack vent is `S<top>-VT`.
 */
export function europeanTower(floors: readonly Floor[], options: EuropeanTower = {}): string {
  const { more = '', stackVent = true, ventStack = false, slope = '1:100', valve = false } = options;
  const top = floors.length;
  const roof = floorHeight * top;
  const level = (storey: number): number => floorHeight * (storey - 1) - 0.4;
  const storeys = floors.map((_, at) => at + 1).reverse();
  const foot = ventStack ? ' > VF (down 0.5)' : '';
  const crown = ventStack ? ' > VH (up 1.6)' : '';
  const end = valve ? '' : ` > VT (to ${roof + 0.6})`;
  return `model "A European stack"
${floors.map((_, at) => `storey "Storey ${at + 1}" at ${floorHeight * at}`).join('\n')}
${storeys.map((storey) => `node S${storey} at 0 0 ${level(storey)}`).join('\n')}
drain DN 100: ${storeys.map((storey) => `S${storey}`).join(' > ')}${foot} > SF (to -1.6) > OUT (east 9 fall ${slope})
sewer OUT
${storeys.map((storey) => branches(storey, floors[storey - 1]!, options)).join('\n')}
${stackVent ? `vent DN 100: S${top}${valve ? ' > VT (up 1.6)' : `${crown}${end}`}\n${valve ? 'admittance-valve' : 'terminal'} VT` : ''}
${ventStack ? `vent DN 50: VF > VB (north 0.4 rise 1:50) > VU (to ${level(top) + 1.5}) > VH` : ''}
on "Storey 1"
${more}
roof "Roof" from -20 -20 to 20 20 top ${roof} thick 0.3
`;
}

function branches(storey: number, { west = [], east = [] }: Floor, { flat = false }: EuropeanTower): string {
  return `on "Storey ${storey}"
${branch(storey, 'w', 'west', west, flat)}
${branch(storey, 'e', 'east', east, flat)}`;
}

function branch(storey: number, side: string, way: string, fixtures: readonly string[], flat: boolean): string {
  if (fixtures.length === 0) return '';
  const at = (n: number): string => `J${storey}.${side}${n}`;
  const last = fixtures.length;
  const start = flat ? `D${storey}.${side}` : `S${storey}`;
  const drop = flat ? `node ${start} from S${storey} ${way} 0.2 up 0.2` : '';
  const nodes = fixtures.map((_, n) => `node ${at(n + 1)} from ${start} ${way} ${(last - n) * spacing} rise 1:50`);
  const line = [...fixtures.map((_, n) => at(n + 1)), ...(flat ? [start] : []), `S${storey}`].join(' > ');
  return `${drop}
${nodes.join('\n')}
drain DN 100: ${line}
${fixtures.map((what, n) => `${placed(what, `F${storey}.${side}${n + 1}`, at(n + 1))}\ndrain DN 100: F${storey}.${side}${n + 1} > ${at(n + 1)}`).join('\n')}`;
}

/** `closet, tank` at a joint: `closet F1 from J1 south 0.3 rise 1:50, tank`. */
export function placed(what: string, name: string, joint: string, length = 0.3): string {
  const [word = '', ...details] = what.split(', ');
  const rest = details.map((detail) => `, ${detail}`).join('');
  return `${word} ${name} from ${joint} south ${length} rise 1:50${rest}`;
}

/** Pipes and bends by hand onto the stack at `S2`; the stack, a basin on the storey above and the stack vent round them. */
export const ontoStack = (piping: string): string => `model "A branch"
storey "Ground floor" at 0
storey "First floor" at 3
storey "Second floor" at 6
node S3 at 0 0 5.6
node S2 at 0 0 2.6
drain DN 100: S3 > S2 > SF (to -1.6) > OUT (east 9 fall 1:50)
sewer OUT
vent DN 100: S3 > VT (to 9.6)
terminal VT
on "First floor"
${piping}
on "Second floor"
lavatory LX from S3 east 1 rise 1:50
drain DN 50: LX > S3
roof "Roof" from -20 -20 to 20 20 top 9 thick 0.3
`;
