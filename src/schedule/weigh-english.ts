import { decimal } from './number-text.ts';
import { counted, listed } from './trade-words.ts';
import { obstacleText, ventedText } from './weigh-verdict.ts';
import type { CutFacts, WeighWords } from './weigh-words.ts';

export const englishWeigh: WeighWords = {
  vented: ventedText,
  named: (readings) =>
    readings.every((reading) => ventedText(reading).endsWith(' vented'))
      ? `${readings.map((reading) => ventedText(reading).replace(/ vented$/, '')).join(' or ')} vented`
      : readings.map(ventedText).join(' or '),
  noneHolds: (fails) => `No reading holds: ${fails}.`,
  only: (vented) => `It can only be ${vented}`,
  fails: (vented, reasons) => `${vented} it cannot be: ${reasons}`,
  noPlace: 'no vent finds a place',
  obstacle: obstacleText,
  asks: (named, stud, sizes) => `${named} asks for ${stud ?? 'more than any usual stud'} (${sizes})`,
  studsOf: (stud) => `studs of ${stud}`,
  laidAs: (size, as) => `${size}, laid as ${as}`,
  modelledWall: (fit, fitNot) => `The wall as modelled governs: ${fit} the pipes fit it, ${fitNot} they do not`,
  wall: (asks) => `The wall governs: ${asks}`,
  bored: (asks) => `The wall governs, its studs bored by level pipes: ${asks}`,
  floor: (sizes) => `The pipe under the floor governs: ${sizes}`,
  onlyPipe: 'The largest pipes are the same either way: the amount of pipe governs',
  leastPipe: (vented, others) => `${vented} needs the least pipe, ${others.join(', ')}`,
  more: (vented, metres, cleanouts) => {
    const fewer = cleanouts < 0 ? `, ${counted(-cleanouts, 'cleanout')} fewer` : '';
    return `${vented} ${decimal(metres, 1)} m${cleanouts > 0 ? ` and ${counted(cleanouts, 'cleanout')}` : ''} more${fewer}`;
  },
  size: (label) => label,
  list: listed,
  battery: ({ id, title, storey }) => `${id}: ${title}${storey === null ? '' : `, ${storey}`}`,
  asModelled: 'as modelled',
  noWidth: 'No pipe of known width in the wall.',
  cannotBe: (reasons) => `Cannot be: ${reasons}.`,
  cut: ({ size, laidAs, judgedBy, depth, room, isModelled, stud, level }) => {
    const mm = (value: number): string => `${decimal(value, 1)} mm`;
    const thing = `${laidAs === null ? size : `${size}, laid as ${laidAs},`} ${judgedBy} ${mm(depth)}`;
    const where = isModelled ? 'in the wall as modelled' : `in ${stud ?? 'a chase'}`;
    const spare =
      room < 0 ? `${mm(-room)} too wide; smallest stud ${stud ?? 'none'}` : `${mm(room / 2)} left on each side`;
    const hole = level === null ? '' : `; level ${level.size}: a hole of ${mm(level.hole)}, which ${boredStuds(level)}`;
    return `${thing} ${where}: ${spare}${hole}.`;
  },
};

/** `studs of 38 × 140 take, loadbearing ones of 38 × 184`. */
function boredStuds({ stud, loadbearing }: NonNullable<CutFacts['level']>): string {
  if (stud === null) return 'no usual stud takes';
  const most = loadbearing === null ? ', no loadbearing one' : `, loadbearing ones of ${loadbearing}`;
  return `studs of ${stud} take${loadbearing === stud ? '' : most}`;
}
