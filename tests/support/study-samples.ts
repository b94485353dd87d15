import { readFileSync } from 'node:fs';
import { join } from 'node:path';

/** Text of a sample drawing. */
export const sampleText = (name: string): string =>
  readFileSync(join(import.meta.dirname, `../../sample-models/${name}.piping`), 'utf8');

/** Fixtures in a row on a line under the floor, a vent at its head, and a drop to the sewer: `J1` to `J<count>`. */
export function row(count: number, what: string, size = '3 in'): string {
  const at = Array.from({ length: count }, (_, index) => index + 1);
  const line = at.slice(1).map((n) => ` > J${n} (east 0.7 fall 1:50)`);
  const [word, ...details] = what.split(', ');
  const bore = /trap ([^,]*) in/.exec(what)?.[1] ?? '2';
  return `node J1 at 0 0 -0.4
drain ${size}: J1${line.join('')} > D1 (east 0.7 fall 1:50) > D2 (to -1.2)
drain 4 in: D2 > OUT (east 8 fall 1:50)
sewer OUT
vent 3 in: J1 > VT (to 4.4)
terminal VT
${at
  .map(
    (n) => `trap T${n} from J${n} south 0.3 rise 1:50
${word} F${n} from T${n} to 0${details.map((one) => `, ${one}`).join('')}
drain ${bore} in: F${n} > T${n} > J${n}`,
  )
  .join('\n')}`;
}

/** A floor and a roof over a drawing. */
export const hall = (drawing: string): string => `model "A hall"
storey "Ground floor" at 0
${drawing}
roof "Roof" from -3 -3 to 18 3 top 4 thick 0.2
`;
