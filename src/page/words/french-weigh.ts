import type { CutFacts, WeighWords } from '../../schedule/weigh-words.ts';

const vented: Readonly<Record<string, string>> = {
  'wet-vent': 'interne',
  'circuit-vent': 'terminale',
  'individual-vent': 'individuelle',
  'common-vent': 'commune',
};
const others: Readonly<Record<string, string>> = {
  'waste-stack-vent': 'en colonne d’eaux usées ventilée',
  'combination-waste-and-vent': 'en évacuation et ventilation combinées',
  'single-stack': 'en colonne unique',
  'ventilated-branch': 'en branchement ventilé',
};
const list = (texts: readonly string[], last = 'et'): string =>
  texts.length < 2 ? texts.join('') : `${texts.slice(0, -1).join(', ')} ${last} ${texts.at(-1)}`;
const one = (reading: string): string =>
  Object.hasOwn(vented, reading)
    ? `en ventilation ${vented[reading]}`
    : (others[reading] ?? reading.replaceAll('-', ' '));
const decimal = (value: number): string => String(Number(value.toFixed(1))).replace('.', ',');
const mm = (value: number): string => `${decimal(value)} mm`;
const cleanouts = (count: number): string => `${count} ${count === 1 ? 'regard' : 'regards'} de nettoyage`;

/** The verdict on a battery's readings and the cut through its wall, in French. What stands against a reading and a battery's name need the page. */
export const frenchWeigh = (
  obstacle: WeighWords['obstacle'],
  battery: WeighWords['battery'],
  size: WeighWords['size'],
): WeighWords => ({
  vented: one,
  named: (readings) =>
    readings.every((reading) => Object.hasOwn(vented, reading))
      ? `en ventilation ${list(
          readings.map((reading) => vented[reading] ?? reading),
          'ou',
        )}`
      : list(readings.map(one), 'ou'),
  noneHolds: (fails) => `Aucune lecture ne tient : ${fails}.`,
  only: (reading) => `La seule lecture possible est ${reading}`,
  fails: (reading, reasons) => `${reading} est exclu : ${reasons}`,
  noPlace: 'aucune ventilation ne trouve sa place',
  obstacle,
  asks: (named, stud, sizes) => `${named} demande ${stud ?? 'plus que tout poteau courant'} (${sizes})`,
  studsOf: (stud) => `des poteaux de ${stud}`,
  laidAs: (of, as) => `${of}, posé en ${as}`,
  modelledWall: (fit, fitNot) =>
    `Le mur tel que dessiné décide : ${fit} les tuyaux y entrent, ${fitNot} ils n’y entrent pas`,
  wall: (asks) => `Le mur décide : ${asks}`,
  bored: (asks) => `Le mur décide, ses poteaux étant percés par des tuyaux de niveau : ${asks}`,
  floor: (sizes) => `Le tuyau sous le plancher décide : ${sizes}`,
  onlyPipe: 'Les plus gros tuyaux sont les mêmes dans tous les cas : la quantité de tuyau décide',
  leastPipe: (reading, more) => `${reading} demande le moins de tuyau, ${more.join(', ')}`,
  more: (reading, metres, rods) =>
    `${reading} ${decimal(metres)} m de plus${rods === 0 ? '' : rods > 0 ? ` et ${cleanouts(rods)} de plus` : ` mais ${cleanouts(-rods)} de moins`}`,
  size,
  list: (texts) => list(texts),
  battery,
  asModelled: 'tel que dessiné',
  noWidth: 'Aucun tuyau de largeur connue dans le mur.',
  cannotBe: (reasons) => `Exclu : ${reasons}.`,
  cut: ({ size: of, laidAs, judgedBy, depth, room, isModelled, stud, level }) => {
    const by = judgedBy === 'fitting' ? 'raccord' : 'tuyau';
    const thing = `${laidAs === null ? of : `${of}, posé en ${laidAs},`} ${by} ${mm(depth)}`;
    const where = isModelled ? 'dans le mur tel que dessiné' : `dans ${stud ?? 'une saignée'}`;
    const spare =
      room < 0
        ? `${mm(-room)} de trop; plus petit poteau : ${stud ?? 'aucun'}`
        : `il reste ${mm(room / 2)} de chaque côté`;
    const hole =
      level === null ? '' : `; de niveau ${level.size} : un trou de ${mm(level.hole)}, que ${boredStuds(level)}`;
    return `${thing} ${where} : ${spare}${hole}.`;
  },
});

function boredStuds({ stud, loadbearing }: NonNullable<CutFacts['level']>): string {
  if (stud === null) return 'ne reçoit aucun poteau courant';
  const most = loadbearing === null ? ', mais aucun poteau porteur' : `, porteurs : ${loadbearing}`;
  return `reçoivent des poteaux de ${stud}${loadbearing === stud ? '' : most}`;
}
