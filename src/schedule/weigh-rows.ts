import { decimal } from './number-text.ts';
import type { SizeLabel } from './result.ts';
import { shownText, unbroken } from './shown-text.ts';
import type { ComparedRow } from './side-by-side.ts';
import { counted, listed, plainWords } from './trade-words.ts';
import type { WeighAlternative, WeighWall } from './weigh.ts';
import { obstacleText, totalLength, ventedText } from './weigh-verdict.ts';

/** A battery's readings line by line, a cell for each; a line that says nothing of any of them is left out. */
export function weighRows(alternatives: readonly WeighAlternative[], currency: string | undefined): ComparedRow[] {
  const row = (label: string, of: (one: WeighAlternative) => string): ComparedRow => ({
    label,
    cells: alternatives.map((one) => (one.largest === null ? '' : of(one))),
  });
  const isDry = (role: string): boolean => /vent|^idle$/.test(role) && !/^(wet-vent|circuit-vented-branch)$/.test(role);
  const metres = (one: WeighAlternative, dry: boolean): string =>
    `${one.pipes
      .filter(({ role }) => isDry(role) === dry)
      .reduce((sum, { length }) => sum + length, 0)
      .toFixed(2)} m`;
  const bySize = (one: WeighAlternative): [SizeLabel | null, number][] => {
    const lengths = new Map<string | null, [SizeLabel | null, number]>();
    for (const { size, length } of one.pipes) {
      const key = size?.label ?? null;
      lengths.set(key, [size, (lengths.get(key)?.[1] ?? 0) + length]);
    }
    return [...lengths.values()].sort(([a], [b]) => (b?.dn ?? 0) - (a?.dn ?? 0));
  };
  const sizes = [...new Map(alternatives.flatMap(bySize).map(([size]) => [size?.label ?? null, size])).values()].sort(
    (a, b) => (b?.dn ?? 0) - (a?.dn ?? 0),
  );
  const rows: ComparedRow[] = [
    {
      label: '',
      cells: alternatives.map(({ reading, modelled }) => `${ventedText(reading)}${modelled ? ' *' : ''}`),
      tone: 'heading',
    },
    {
      label: 'holds',
      cells: alternatives.map(({ holds, broken }) =>
        holds ? 'yes' : `no: ${shownText(listed(broken.map(obstacleText)) || 'no vent finds a place')}`,
      ),
    },
    row('largest in the wall', ({ largest }) => largest!.inWall?.label ?? 'none'),
    row('largest under floor', ({ largest }) => {
      const { underFloor, laidUnderFloor } = largest!;
      const laid = laidUnderFloor === undefined ? '' : `, laid as ${laidUnderFloor.label}`;
      return underFloor === null ? 'none' : `${underFloor.label}${laid}`;
    }),
    row('room it needs', ({ wall }) => studText(wall)),
    row('bored along the wall', ({ wall }) => boredText(wall)),
    row('wall as modelled', ({ wall }) =>
      wall?.fits == null ? 'none drawn' : wall.fits ? 'takes it' : 'does not take it',
    ),
    ...sizes.map((size, at) => ({
      label: at === 0 ? 'pipe by size' : '',
      cells: alternatives.map((one) => {
        const own = bySize(one).find(([label]) => (label?.label ?? null) === (size?.label ?? null));
        return own === undefined ? '' : `${(size?.label ?? 'unsized').padEnd(8)}${own[1].toFixed(2).padStart(6)} m`;
      }),
    })),
    row('drains and vents', (one) => `${metres(one, false)} and ${metres(one, true)}`),
    row('all pipe', (one) => `${totalLength(one).toFixed(2)} m`),
    row('bends, junctions', ({ fittings }) => {
      const count = (kinds: readonly string[]): number =>
        fittings.filter(({ kind }) => kinds.includes(kind)).reduce((sum, one) => sum + one.count, 0);
      const reducers = count(['reducer']);
      return `${count(['bend'])}, ${count(['junction', 'double-junction'])}${reducers === 0 ? '' : `, ${counted(reducers, 'reducer')}`}`;
    }),
    row(
      'cleanouts',
      ({ cleanouts }) =>
        cleanouts.map(({ size, place }) => `${unbroken(size.label)} (${place})`).join(', ') || 'none of its own',
    ),
    row('holes through floors', ({ floorHoles }) =>
      floorHoles.length === 0
        ? 'none'
        : floorHoles.map(({ size, count }) => unbroken(`${count} × ${size?.label ?? '?'}`)).join(', '),
    ),
    row('vents added', ({ adds }) => addsText(adds)),
    row('left out', ({ leavesOut }) => leftOutText(leavesOut)),
    row('pipes that change', ({ resizes, modelled }) => (modelled ? '' : resizesText(resizes))),
  ];
  if (currency !== undefined)
    rows.push(
      row('cost', ({ costs }) =>
        costs === undefined
          ? ''
          : `${decimal(costs.total, 2)} ${shownText(currency)}${costs.unpriced.length === 0 ? '' : `, without ${listed(costs.unpriced)}`}`,
      ),
    );
  return rows.filter(({ cells }) => cells.some((cell) => cell !== ''));
}

function studText(wall: WeighWall | null): string {
  if (wall === null) return 'nothing in it';
  const laid = wall.laidAs === undefined ? '' : `, laid as ${wall.laidAs.label}`;
  const width = `${unbroken(`(${decimal(wall.depth * 1000, 1)} mm ${wall.judgedBy}`)}${laid})`;
  const clear = wall.modelled.flatMap(({ cavity, framing }) => (framing === null ? (cavity ?? []) : []));
  if (clear.length > 0 && clear.length === wall.modelled.length)
    return `${unbroken(`chase of ${decimal(Math.min(...clear) * 1000, 0)} mm`)} ${width}`;
  return wall.stud === null ? `no usual stud ${width}` : `${unbroken(`studs ${wall.stud}`)} ${width}`;
}

function boredText(wall: WeighWall | null): string {
  const bored = wall?.bored ?? null;
  if (bored === null) return 'nothing';
  const { other, loadbearing } = bored.stud;
  const most = other === loadbearing ? '' : `; loadbearing: ${unbroken(loadbearing ?? 'none')}`;
  return `${unbroken(`${bored.size.label} (${decimal(bored.hole * 1000, 1)} mm):`)} ${unbroken(other ?? 'no stud')}${most}`;
}

/** `circuit vent 2.57 m, relief vent 3.16 m`. */
function addsText(list: readonly { readonly role: string; readonly length: number }[]): string {
  const byRole = new Map<string, { count: number; length: number }>();
  for (const { role, length } of list) {
    const known = byRole.get(role) ?? { count: 0, length: 0 };
    byRole.set(role, { count: known.count + 1, length: known.length + length });
  }
  const told = [...byRole].map(
    ([role, { count, length }]) => `${counted(count, plainWords(role))} ${unbroken(`${length.toFixed(2)} m`)}`,
  );
  return told.length === 0 ? 'none' : told.join(', ');
}

/** `relief vent 7.19 m`: one vent may be several pipes of the model. */
function leftOutText(list: WeighAlternative['leavesOut']): string {
  const lengths = new Map<string, number>();
  for (const { role, length } of list) lengths.set(role, (lengths.get(role) ?? 0) + length);
  return (
    [...lengths].map(([role, length]) => `${plainWords(role)} ${unbroken(`${length.toFixed(2)} m`)}`).join(', ') ||
    'none'
  );
}

/** `9 from 4 in to 3 in`: by change, most first. */
function resizesText(resizes: WeighAlternative['resizes']): string {
  const changes = new Map<string, number>();
  for (const { from, to } of resizes) {
    const key = `${from?.label ?? '?'} to ${to?.label ?? '?'}`;
    changes.set(key, (changes.get(key) ?? 0) + 1);
  }
  const told = [...changes].sort(([, a], [, b]) => b - a).map(([change, count]) => `${count} from ${change}`);
  return told.length === 0 ? 'none' : told.join(', ');
}
