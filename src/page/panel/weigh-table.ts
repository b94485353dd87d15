import { cavityDrawing } from '../../schedule/cavity.ts';
import { visible } from '../../schedule/shown-text.ts';
import type { WeighAlternative, WeighBattery } from '../../schedule/weigh.ts';
import { englishWeigh } from '../../schedule/weigh-english.ts';
import { totalLength, weighVerdict } from '../../schedule/weigh-verdict.ts';
import type { WeighWords } from '../../schedule/weigh-words.ts';
import { decimal, lengthText, oneSize, placeIn, sizeLabel } from '../format.ts';
import { shapeElement } from '../riser/shape-element.ts';
import { frenchWeigh } from '../words/french-weigh.ts';
import { planWords } from '../words/plan-words.ts';
import { countedKind, named, ruleName } from '../words/words.ts';
import type { Desk } from './desk.ts';
import { make, makeSvg, modelText } from './element.ts';
import { conditionText } from './finding-sentence.ts';
import { batteryName, capital } from './names.ts';

/** What each reading of a battery would cost: sizes, lengths, cleanouts, the wall it asks for; and a cut through it. */
export function weighTable(desk: Desk, battery: WeighBattery): HTMLElement {
  const { words } = desk;
  const { alternatives } = battery;
  const row = (label: string, value: (one: WeighAlternative) => string): HTMLElement =>
    make(
      'tr',
      {},
      make('th', { scope: 'row' }, label),
      ...alternatives.map((one) => make('td', { class: one.modelled ? 'chosen' : '' }, value(one))),
    );
  const known =
    (value: (one: WeighAlternative) => string) =>
    (one: WeighAlternative): string =>
      one.largest === null ? '–' : value(one);
  const said = weighWords(desk);
  const drawing = cavityDrawing(battery, said);
  return make(
    'div',
    { class: 'weighed' },
    make(
      'table',
      { class: 'readings side' },
      make('caption', {}, words.weigh.title),
      make(
        'thead',
        {},
        make(
          'tr',
          {},
          make('td', {}),
          ...alternatives.map((one) =>
            make(
              'th',
              { scope: 'col', class: one.modelled ? 'chosen' : '' },
              capital(named(words.roles, one.reading)),
              one.modelled && make('span', { class: 'tag' }, words.battery.chosen),
            ),
          ),
        ),
      ),
      make(
        'tbody',
        {},
        row(words.weigh.holds, (one) => (one.holds ? `✓ ${words.yes}` : `✕ ${words.no}`)),
        row(
          words.weigh.inWall,
          known((one) => oneSize(words, one.largest?.inWall, '–')),
        ),
        row(
          words.weigh.underFloor,
          known((one) => underFloor(desk, one)),
        ),
        row(
          words.weigh.pipe,
          known((one) => `${decimal(words, totalLength(one), 1)} m`),
        ),
        row(
          words.weigh.adds,
          known((one) => added(desk, one)),
        ),
        row(
          words.weigh.cleanouts,
          known((one) => one.cleanouts.map(({ size }) => oneSize(words, size)).join(', ') || '0'),
        ),
        row(
          words.weigh.depth,
          known((one) => (one.wall === null ? '–' : lengthText(words, one.wall.depth))),
        ),
        row(
          words.weigh.stud,
          known((one) => (one.wall === null ? '–' : (one.wall.stud ?? words.weigh.noStud))),
        ),
      ),
    ),
    make(
      'p',
      {},
      modelText(visible(words.language === 'en' ? battery.verdict : capital(weighVerdict(alternatives, said)))),
    ),
    make(
      'details',
      {},
      make('summary', {}, words.weigh.cut),
      make(
        'div',
        { class: 'cut', tabindex: '0', role: 'group', 'aria-label': words.weigh.cut },
        makeSvg(
          'svg',
          {
            viewBox: `0 0 ${drawing.width} ${drawing.height}`,
            width: drawing.width,
            height: drawing.height,
            role: 'img',
            'aria-label': words.weigh.cut,
          },
          makeSvg('rect', { width: drawing.width, height: drawing.height, fill: '#ffffff' }),
          ...drawing.shapes.map(shapeElement),
        ),
      ),
    ),
  );
}

function weighWords(desk: Desk): WeighWords {
  const { building, words } = desk;
  if (words.language === 'en') return englishWeigh;
  const obstacle: WeighWords['obstacle'] = ({ rule, title, facts, clause }) => {
    const what =
      conditionText(desk, facts) ?? (rule === null || title === null ? '' : ruleName(words, { rule, title }));
    const reason = what === '' ? words.weigh.unnamed : what;
    return clause === null ? reason : `${reason} (${placeIn(words, clause)})`;
  };
  const battery: WeighWords['battery'] = ({ id, fixtures, storey }) => {
    const kinds = new Map<string | null, number>();
    for (const fixture of fixtures) {
      const kind = building.result.fixtures[building.fixtureAt.get(fixture) ?? -1]?.kind ?? null;
      kinds.set(kind, (kinds.get(kind) ?? 0) + 1);
    }
    const counted = [...kinds].map(([kind, count]) => countedKind(words, kind, count)).join(', ');
    return [`${capital(words.findings.ofBattery(batteryName(id)))}${words.colon}${counted}`, storey]
      .filter((part) => part !== null)
      .join(', ');
  };
  return frenchWeigh(obstacle, battery, (label) => sizeLabel(words, label));
}

/** In the size that is asked, and in which it is laid where it is not made so. */
function underFloor({ words }: Desk, { largest }: WeighAlternative): string {
  const asked = oneSize(words, largest?.underFloor, '–');
  const laid = largest?.laidUnderFloor;
  return laid === undefined ? asked : `${asked} (${planWords[words.language].laid} ${oneSize(words, laid)})`;
}

function added({ words }: Desk, { adds }: WeighAlternative): string {
  if (adds.length === 0) return '0';
  const length = adds.reduce((sum, one) => sum + one.length, 0);
  return `${decimal(words, length, 1)} m`;
}
