import { armOf } from './rows.ts';

export interface Tower {
  /** Lines drawn beside the stack. */
  readonly more?: string;
  /** Size of the stack and the drain below it. */
  readonly stack?: string;
  /** `false`: the stack ends at its highest branch. */
  readonly stackVent?: boolean;
  /** Metres that the stack steps aside to the east, in `OA-OB`, between its lowest branch and its foot. */
  readonly offset?: number;
  /** A vent stack from just below the lowest branch, with a foot `VF`, to the stack vent. */
  readonly ventStack?: boolean;
  /** Storeys with a yoke vent: from `Y<storey>`, just below the storey's branch, to `W<storey>` on the vent stack. */
  readonly yokes?: readonly number[];
}

/** Metres from floor to floor. */
export const storeyHeight = 3;
export const floorOf = (storey: number): number => storeyHeight * (storey - 1);

/**
 * A stack `S<top>` down through `S1` to its foot `SF` and out. `storeys[0]` stands on storey 1; its fixtures `F<storey>.<n>`
 * have vents of their own and drain to the joint `S<storey>` by a branch through `J<storey>.1` and so on. Storeys
 * without fixtures are passed by. The stack vent is `S<top>-VH`, `VH-VT`; the vent stack comes in at `VH`.
 */
export function tower(storeys: readonly (readonly string[])[], options: Tower = {}): string {
  const { more = '', stack = '4 in', stackVent = true, ventStack = false, yokes = [], offset } = options;
  const top = storeys.findLastIndex((fixtures) => fixtures.length > 0) + 1;
  const used = storeys.flatMap((fixtures, at) => (fixtures.length > 0 ? [at + 1] : [])).reverse();
  const roof = floorOf(storeys.length + 1);
  const floors = storeys.map((_, at) => `storey "Storey ${at + 1}" at ${floorOf(at + 1)}`);
  const joints = used.map((storey) => `node S${storey} at 0 0 ${floorOf(storey) - 0.4}`);
  const foot = ventStack ? ['VF (down 0.3)'] : [];
  const aside = offset === undefined ? [] : ['OA (down 1.2)', `OB (east ${offset} fall 1:50)`];
  const upward = [...yokes].sort((a, b) => a - b);
  const onStack = used.flatMap((storey) => [
    `S${storey}`,
    ...(yokes.includes(storey) ? [`Y${storey} (down 0.2)`] : []),
  ]);
  const ties = upward.map((storey) => ` > W${storey} (to ${floorOf(storey) + 1.1})`).join('');
  const down = [...onStack, ...foot, ...aside, 'SF (to -1.6)', 'OUT (east 9 fall 1:50)'];
  return `model "A stack"
${floors.join('\n')}
${joints.join('\n')}
drain ${stack}: ${down.join(' > ')}
sewer OUT
${used.map((storey) => branchOf(storey, storeys[storey - 1]!, roof + 1)).join('\n')}
${stackVent ? `vent 3 in: S${top} > VH (to ${roof + 0.2}) > VT (to ${roof + 0.8})\nterminal VT` : ''}
${ventStack ? `vent 3 in: VF > VB (north 0.5 rise 1:50)${ties} > VU (to ${roof + 0.15}) > VH` : ''}
${upward.map((storey) => `vent 3 in: Y${storey} > W${storey}`).join('\n')}
on "Storey 1"
${more}
roof "Roof" from -20 -20 to 20 20 top ${roof} thick 0.3
`;
}

function branchOf(storey: number, fixtures: readonly string[], sky: number): string {
  const at = (n: number): string => `J${storey}.${n}`;
  const last = fixtures.length;
  const nodes = fixtures.map((_, n) => `node ${at(n + 1)} from S${storey} west ${(last - n) * 0.7} rise 1:50`);
  const line = [...fixtures.map((_, n) => at(n + 1)), `S${storey}`].join(' > ');
  const arms = fixtures.map((what, n) =>
    armOf(`${storey}.${n + 1}`, what, { floor: floorOf(storey), vented: true, sky }),
  );
  return `on "Storey ${storey}"\n${nodes.join('\n')}\ndrain 3 in: ${line}${arms.join('')}`;
}
