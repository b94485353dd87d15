import { decimal } from './number-text.ts';
import { counted, listed } from './trade-words.ts';
import type { WeighAlternative, WeighObstacle, WeighWall } from './weigh.ts';

/** `wet vented`, `circuit vented`, `individually vented`; `as a waste stack` of readings that only some codes know. */
export const ventedText = (reading: string): string =>
  otherReadings[reading] ?? `${reading.replace(/-vent$/, '')} vented`;

const otherReadings: Readonly<Record<string, string>> = {
  'individual-vent': 'individually vented',
  'waste-stack-vent': 'as a waste stack',
  'combination-waste-and-vent': 'as combination waste and vent',
  'single-stack': 'as a single stack',
  'ventilated-branch': 'as a ventilated branch',
};

/** One sentence: what governs the choice among the alternatives of a battery. */
export function weighVerdict(alternatives: readonly WeighAlternative[]): string {
  const holding = alternatives.filter(({ holds }) => holds);
  const failing = alternatives.filter(({ holds }) => !holds);
  const [only] = holding;
  if (only === undefined) return `No reading holds: ${failing.map(failText).join('; ')}.`;
  const against = failing.length === 0 ? '' : `; ${failing.map(failText).join('; ')}`;
  if (holding.length === 1) return `It can only be ${ventedText(only.reading)}${against}.`;
  return `${governs(holding)}${against}.`;
}

/** `circuit vented it cannot be: 2 outlets below 2 in stand beside larger ones (2.5.3.1.(2))`. */
const failText = ({ reading, broken }: WeighAlternative): string =>
  `${ventedText(reading)} it cannot be: ${listed(broken.map(obstacleText)) || 'no vent finds a place'}`;

export const obstacleText = ({ sentence, clause }: WeighObstacle): string =>
  clause === null ? sentence : `${sentence} (${clause})`;

function governs(holding: readonly WeighAlternative[]): string {
  const pipe = `; ${pipeText(holding)}`;
  const drawn = grouped(holding, ({ wall }) => (wall?.fits == null ? null : String(wall.fits)));
  const studs = grouped(holding, ({ wall }) => (wall === null ? null : (wall.stud ?? 'none')));
  const takes = (studs ?? []).map(([stud, some]) => {
    const sizes = listed([...new Set(some.map(({ wall }) => laidText(wall!)))]);
    return `${named(some)} asks for ${stud === 'none' ? 'more than any usual stud' : `studs of ${stud}`} (${sizes})`;
  });
  if (drawn !== null) {
    const [fits, not] = ['true', 'false'].map((said) => drawn.find(([one]) => one === said)![1]);
    const more = takes.length === 0 ? '' : `; ${takes.join(', ')}`;
    return `The wall as modelled governs: ${named(fits!)} the pipes fit it, ${named(not!)} they do not${more}${pipe}`;
  }
  if (studs !== null) return `The wall governs: ${takes.join(', ')}${pipe}`;
  const bored = grouped(holding, ({ wall }) => (wall?.bored == null ? null : (boredStud(wall) ?? 'none')));
  if (bored !== null) {
    const asks = bored.map(([stud, some]) => {
      const sizes = listed([...new Set(some.map(({ wall }) => wall!.bored!.size.label))]);
      return `${named(some)} asks for ${stud === 'none' ? 'more than any usual stud' : stud} (${sizes})`;
    });
    return `The wall governs, its studs bored by level pipes: ${asks.join(', ')}${pipe}`;
  }
  const below = grouped(holding, ({ largest }) => largest?.underFloor?.label ?? null);
  if (below !== null)
    return `The pipe under the floor governs: ${below.map(([size, some]) => `${size} ${named(some)}`).join(', ')}${pipe}`;
  return `The largest pipes are the same either way: the amount of pipe governs${pipe}`;
}

const laidText = ({ size, laidAs }: WeighWall): string =>
  laidAs === undefined ? size.label : `${size.label}, laid as ${laidAs.label}`;

/** As the modelled walls bear load or not; as if they bore none where nobody says. */
const boredStud = ({ bored, modelled }: WeighWall): string | null =>
  modelled.some(({ loadBearing }) => loadBearing === true) ? bored!.stud.loadbearing : bored!.stud.other;

/** What the alternatives say, by what they say; null where they say the same, or one says nothing. */
function grouped(
  holding: readonly WeighAlternative[],
  of: (one: WeighAlternative) => string | null,
): [string, WeighAlternative[]][] | null {
  const groups = new Map<string, WeighAlternative[]>();
  for (const one of holding) {
    const said = of(one);
    if (said === null) return null;
    groups.set(said, [...(groups.get(said) ?? []), one]);
  }
  return groups.size > 1 ? [...groups] : null;
}

/** `circuit or individually vented`. */
const named = (some: readonly WeighAlternative[]): string =>
  some.every(({ reading }) => ventedText(reading).endsWith(' vented'))
    ? `${some.map(({ reading }) => ventedText(reading).replace(/ vented$/, '')).join(' or ')} vented`
    : some.map(({ reading }) => ventedText(reading)).join(' or ');

export const totalLength = ({ pipes }: WeighAlternative): number => pipes.reduce((sum, { length }) => sum + length, 0);

/** `wet vented needs the least pipe; circuit vented 5.7 m and 1 cleanout more`. */
function pipeText(holding: readonly WeighAlternative[]): string {
  const [least, ...others] = [...holding].sort((a, b) => totalLength(a) - totalLength(b));
  const more = others.map((one) => {
    const rods = one.cleanouts.length - least!.cleanouts.length;
    const length = decimal(totalLength(one) - totalLength(least!), 1);
    const fewer = rods < 0 ? `, ${counted(-rods, 'cleanout')} fewer` : '';
    return `${ventedText(one.reading)} ${length} m${rods > 0 ? ` and ${counted(rods, 'cleanout')}` : ''} more${fewer}`;
  });
  return `${ventedText(least!.reading)} needs the least pipe, ${more.join(', ')}`;
}
