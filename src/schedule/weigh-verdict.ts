import type { WeighAlternative, WeighObstacle, WeighWall } from './weigh.ts';
import type { WeighWords } from './weigh-words.ts';

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
export function weighVerdict(alternatives: readonly WeighAlternative[], words: WeighWords): string {
  const holding = alternatives.filter(({ holds }) => holds);
  const failing = alternatives
    .filter(({ holds }) => !holds)
    .map(({ reading, broken }) => words.fails(words.vented(reading), whyNot(broken, words)))
    .join('; ');
  const [only] = holding;
  if (only === undefined) return words.noneHolds(failing);
  const against = failing === '' ? '' : `; ${failing}`;
  return `${holding.length === 1 ? words.only(words.vented(only.reading)) : governs(holding, words)}${against}.`;
}

/** `2 outlets below 2 in stand beside larger ones (2.5.3.1.(2))`. */
const whyNot = (broken: readonly WeighObstacle[], words: WeighWords): string =>
  words.list(broken.map(words.obstacle)) || words.noPlace;

export const obstacleText = ({ sentence, clause }: WeighObstacle): string =>
  clause === null ? sentence : `${sentence} (${clause})`;

function governs(holding: readonly WeighAlternative[], words: WeighWords): string {
  const pipe = `; ${pipeText(holding, words)}`;
  const named = (some: readonly WeighAlternative[]): string => words.named(some.map(({ reading }) => reading));
  const asks = (stud: string, some: readonly WeighAlternative[], size: (wall: WeighWall) => string): string =>
    words.asks(
      named(some),
      stud === 'none' ? null : stud,
      words.list([...new Set(some.map(({ wall }) => size(wall!)))]),
    );
  const drawn = grouped(holding, ({ wall }) => (wall?.fits == null ? null : String(wall.fits)));
  const studs = grouped(holding, ({ wall }) => (wall === null ? null : (wall.stud ?? 'none')));
  const takes = (studs ?? []).map(([stud, some]) =>
    asks(stud === 'none' ? stud : words.studsOf(stud), some, (wall) => laidText(wall, words)),
  );
  if (drawn !== null) {
    const [fits, not] = ['true', 'false'].map((said) => drawn.find(([one]) => one === said)![1]);
    const more = takes.length === 0 ? '' : `; ${takes.join(', ')}`;
    return `${words.modelledWall(named(fits!), named(not!))}${more}${pipe}`;
  }
  if (studs !== null) return `${words.wall(takes.join(', '))}${pipe}`;
  const bored = grouped(holding, ({ wall }) => (wall?.bored == null ? null : (boredStud(wall) ?? 'none')));
  if (bored !== null) {
    const each = bored.map(([stud, some]) => asks(stud, some, (wall) => words.size(wall.bored!.size.label)));
    return `${words.bored(each.join(', '))}${pipe}`;
  }
  // What is not made in a size is laid in the next: two sizes that come out of one pipe are no choice.
  const below = grouped(holding, ({ largest }) => (largest?.laidUnderFloor ?? largest?.underFloor)?.label ?? null);
  if (below !== null)
    return `${words.floor(below.map(([size, some]) => `${words.size(size)} ${named(some)}`).join(', '))}${pipe}`;
  return `${words.onlyPipe}${pipe}`;
}

const laidText = ({ size, laidAs }: WeighWall, words: WeighWords): string =>
  laidAs === undefined ? words.size(size.label) : words.laidAs(words.size(size.label), words.size(laidAs.label));

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

export const totalLength = ({ pipes }: WeighAlternative): number => pipes.reduce((sum, { length }) => sum + length, 0);

/** `wet vented needs the least pipe, circuit vented 5.7 m and 1 cleanout more`. */
function pipeText(holding: readonly WeighAlternative[], words: WeighWords): string {
  const [least, ...others] = [...holding].sort((a, b) => totalLength(a) - totalLength(b));
  const more = others.map((one) =>
    words.more(
      words.vented(one.reading),
      totalLength(one) - totalLength(least!),
      one.cleanouts.length - least!.cleanouts.length,
    ),
  );
  return words.leastPipe(words.vented(least!.reading), more);
}
