import { armOf, lineOf } from './rows.ts';

/** A quarter inch a foot, as the American codes print it. */
export const quarter = '1:48';
export const at48 = (text: string): string => text.replaceAll('1:50', quarter);

export interface StackRow {
  /** Metres that the circuit vent runs level before it joins the stack vent at `SV`. */
  readonly run?: number;
  /** Fixtures with vents of their own on the storey above, which put drainage on the stack. */
  readonly above?: readonly string[];
  /** A dry relief vent `RV-RT`, `RT-RJ` between the last fixture and the stack. */
  readonly relief?: boolean;
  /** Slope of the branch. */
  readonly slope?: string;
  readonly more?: string;
  /** Size drawn for the branch. */
  readonly branch?: string;
}

/**
 * A level row on the upper of two storeys, circuit vented: `J1-CV`, the vent's foot `CV`, the others at `J2` on, `RV`, and
 * into the stack at `S2`, down to `SF` and out. The circuit vent is `CV-VR`, `VR-SV`; the stack vent `S2-SV` or `S3-SV`, `SV-VT`.
 */
export function circuitRowToStack(fixtures: readonly string[], options: StackRow = {}): string {
  const { run = 4, above = [], relief = false, slope = quarter, more = '', branch = '3 in' } = options;
  const floor = 3;
  const last = fixtures.length;
  const used = above.length > 0;
  const top = used ? 'S3' : 'S2';
  const roof = used ? 9 : 6;
  const upper = used
    ? `on "Third floor"
node S3 from S2 up 3
${above.map((_, n) => `node A${n + 1} from S3 east ${(above.length - n) * 0.7} rise 1:48`).join('\n')}
drain 3 in: ${above.map((_, n) => `A${n + 1}`).join(' > ')} > S3
${above.map((what, n) => armOf(`A${n + 1}`, what, { floor: 6, vented: true, sky: roof + 0.8 }).replaceAll(`JA${n + 1}`, `A${n + 1}`)).join('')}`
    : '';
  return at48(`model "A row and its stack"
storey "Ground floor" at 0
storey "Second floor" at ${floor}
${used ? 'storey "Third floor" at 6' : ''}
on "Second floor"
node J1 at 0 0 ${floor - 0.4}
drain ${branch}: J1 > CV (east 0.4 fall ${slope})${lineOf(2, last).replaceAll('1:50', slope)} > RV (east 0.4 fall ${slope}) > S2 (east 0.6 fall ${slope})
drain 4 in: ${used ? 'S3 > ' : ''}S2 > SF (to -1) > OUT (south 9 fall 1:48)
${fixtures.map((what, n) => armOf(n + 1, what, { floor })).join('')}
vent 3 in: CV > VR (to ${floor + 2}) > VQ (north ${run} rise 1:100) > SV
vent 4 in: ${top} > SV (to ${roof - 0.6}) > VT (to ${roof + 0.8})
${relief ? `vent 3 in: RV > RT (to ${floor + 2}) > RJ (north 0.4 rise 1:100) > SV` : ''}
terminal VT
sewer OUT
${upper}
${more}
roof "Roof" from -20 -20 to 40 40 top ${roof} thick 0.3
`);
}
