import type { Building } from '../building.ts';
import { type Category, categoriesOf, lastLoadStep, loadStepEnd } from '../colouring.ts';
import { hex } from '../colours.ts';
import { decimal, sizeLabel } from '../format.ts';
import type { MarginStep } from '../margin-step.ts';
import type { PipeFate } from '../plan-side.ts';
import type { ColourBy } from '../state.ts';
import { planWords } from '../words/plan-words.ts';
import { named } from '../words/words.ts';
import { verdictMarks } from './chips.ts';
import type { Desk } from './desk.ts';
import { make, makeSvg, modelText } from './element.ts';
import { capital, shown } from './names.ts';

export const switches: readonly ColourBy[] = [
  'verdict',
  'role',
  'system',
  'size',
  'storey',
  'load',
  'margin',
  'change',
];

/** Those that this page has something to show for. */
export const switchesOf = ({ data, plan }: Building): readonly ColourBy[] =>
  switches.filter((by) => (by === 'change' ? plan !== null : by === 'margin' ? data.margins.pipes.length > 0 : true));

/** Names every colour on the picture; each line switches its pipes off and on. */
export function legend(desk: Desk): HTMLElement {
  const { building, words, store } = desk;
  const { colourBy, hidden } = store.state;
  const categories = categoriesOf(building, colourBy, desk.theme());
  const select = make(
    'select',
    { id: 'colour-by', onchange: () => store.set({ colourBy: select.value as ColourBy, hidden: new Set() }) },
    ...switchesOf(building).map((by) => make('option', { value: by, selected: by === colourBy }, words.legend.by[by])),
  );
  if (categories.length === 0) return make('section', { hidden: true });
  return make(
    'section',
    { class: 'legend', 'aria-label': words.legend.colourBy },
    make('div', { class: 'legend-head' }, make('label', { for: 'colour-by' }, words.legend.colourBy), select),
    make(
      'ul',
      {},
      ...categories.map((category) => {
        const name = categoryName(desk, colourBy, category.key);
        const box = make('input', {
          type: 'checkbox',
          checked: !hidden.has(category.key),
          'aria-label': words.legend.hide(name),
          onchange: () => {
            const next = new Set(hidden);
            if (box.checked) next.delete(category.key);
            else next.add(category.key);
            store.set({ hidden: next });
          },
        });
        return make(
          'li',
          { class: hidden.has(category.key) ? 'off' : '' },
          make(
            'label',
            {},
            box,
            swatch(category),
            colourBy === 'verdict' &&
              make(
                'span',
                { class: `mark mark-${category.key}`, 'aria-hidden': 'true' },
                verdictMarks[category.key as 'agrees'],
              ),
            make('span', { class: 'legend-name' }, modelText(name)),
            make('span', { class: 'legend-count' }, String(category.count)),
          ),
        );
      }),
    ),
  );
}

export function categoryName({ building, words }: Desk, by: ColourBy, key: string): string {
  const unit = words.shortUnit(building.result.code.unit);
  switch (by) {
    case 'verdict':
      return words.verdict[key as 'agrees'];
    case 'role':
      return capital(named(words.roles, key));
    case 'system':
      return key === '' ? words.legend.noSystem : shown(key);
    case 'size':
      return key === '' ? words.legend.noSize : sizeLabel(words, key);
    case 'storey':
      return key === '-1'
        ? words.legend.noStorey
        : shown(building.data.scene.storeys[Number(key)]?.name ?? `${Number(key) + 1}`);
    case 'load': {
      const to = loadStepEnd(key);
      if (to === null) return words.legend.loadOver(decimal(words, lastLoadStep, 0), unit);
      return words.legend.loadStep(decimal(words, to, 0), unit);
    }
    case 'margin':
      return planWords[words.language].margins[key as MarginStep];
    case 'change':
      return planWords[words.language].fates[key as PipeFate | 'same'];
  }
}

/** The pipe in small: its colour and, for those who do not see it, its pattern. */
function swatch({ colour, pattern }: Category): SVGSVGElement {
  const dashes = ['', '6 4', '12 3', '2.5 2.5', '7 2 2 2'][pattern] ?? '';
  return makeSvg(
    'svg',
    { class: 'swatch', viewBox: '0 0 28 10', 'aria-hidden': 'true' },
    makeSvg('line', {
      x1: 1,
      y1: 5,
      x2: 27,
      y2: 5,
      stroke: hex(colour),
      'stroke-width': 5,
      'stroke-opacity': pattern === 0 ? 1 : 0.45,
    }),
    pattern !== 0 &&
      makeSvg('line', {
        x1: 1,
        y1: 5,
        x2: 27,
        y2: 5,
        stroke: hex(colour),
        'stroke-width': 5,
        'stroke-dasharray': dashes,
      }),
  );
}
