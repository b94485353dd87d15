import type { Riser } from '../../schedule/riser.ts';
import { riserDrawing } from '../../schedule/riser-drawing.ts';
import { type LabelBox, placeRiserLabels } from '../../schedule/riser-labels.ts';
import type { RiserRun } from '../../schedule/riser-runs.ts';
import { shortLoad, sizesText, slopeText } from '../format.ts';
import type { Desk } from '../panel/desk.ts';
import { make, makeSvg } from '../panel/element.ts';
import { capital, pipeName, shown } from '../panel/names.ts';
import type { PageState } from '../state.ts';
import { kindName, named } from '../words/words.ts';
import { panZoom } from './pan-zoom.ts';
import { shapeElement } from './shape-element.ts';

/** The line drawing of one drain system; what is chosen here is chosen everywhere. */
export function riserView(desk: Desk): HTMLElement {
  const { building, store, words } = desk;
  const { risers } = building.data;
  const whole = risers[store.state.riser] ?? risers[0];
  if (whole === undefined)
    return make('div', { class: 'riser' }, make('p', { class: 'riser-none quiet' }, words.riser.none));
  const riser = store.state.unfolded ? whole : (whole.folded ?? whole);
  const storeyName = (storey: number): string =>
    shown(building.data.scene.storeys[storey]?.name) || `${words.tools.storey} ${storey + 1}`;
  const placed = placeRiserLabels(riser, {
    run: (run) => runTexts(desk, run),
    floor: ({ storey, like, also }) => {
      if (like !== undefined) return words.riser.like(storeyName(storey), storeyName(like));
      if (also === undefined) return storeyName(storey);
      return words.riser.also(storeyName(storey), also.length + 1, also.map(storeyName).join(', '));
    },
  });
  const { shapes, frame: tight } = riserDrawing(riser, placed, {
    looks: words.riser.looks,
    marks: words.riser.marks,
    kind: (kind) => kindName(words, kind),
  });
  const frame = atLeast(tight, 820, 560);
  const drawing = makeSvg('svg', {
    class: 'riser-drawing',
    role: 'img',
    'aria-label': words.riser.picture,
    viewBox: `${frame.x} ${frame.y} ${frame.width} ${frame.height}`,
  });
  drawing.append(...shapes.map(shapeElement));
  drawing.addEventListener('click', (event) => {
    const target = event.target instanceof Element ? event.target.closest('[data-pipe], [data-fixture]') : null;
    const pipe = target?.getAttribute('data-pipe');
    const fixture = target?.getAttribute('data-fixture');
    if (pipe != null) desk.choosePipe(Number(pipe));
    else if (fixture != null && Number(fixture) >= 0) desk.chooseFixture(Number(fixture));
    else store.set({ chosen: null });
  });
  const view = panZoom(drawing, frame);
  const host = make(
    'div',
    { class: 'riser' },
    make('div', { class: 'tool-host' }, riserTools(desk, whole, view)),
    drawing,
  );
  return host;
}

/** A small drawing is not blown up: it stands in the middle of a sheet of usual size. */
function atLeast(frame: LabelBox, width: number, height: number): LabelBox {
  const [w, h] = [Math.max(frame.width, width), Math.max(frame.height, height)];
  return { x: frame.x - (w - frame.width) / 2, y: frame.y - (h - frame.height) / 2, width: w, height: h };
}

/** Marks what is chosen without drawing anew. */
export function markChosen(desk: Desk, host: HTMLElement): void {
  const { chosen } = desk.store.state;
  for (const element of host.querySelectorAll('.chosen')) element.classList.remove('chosen');
  if (chosen === null) return;
  const name = chosen.is === 'pipe' ? 'data-pipe' : 'data-fixture';
  for (const element of host.querySelectorAll(`[${name}="${chosen.row}"]`)) element.classList.add('chosen');
}

/**
 * What to open so that what is chosen is seen: its drawing, unfolded where it stands on a storey that is folded away;
 * null where it is seen already, or on none.
 */
export function riserOf(desk: Desk): Pick<PageState, 'riser' | 'unfolded'> | null {
  const { chosen, riser, unfolded } = desk.store.state;
  const { risers } = desk.building.data;
  const has = (drawing: Riser | undefined): boolean =>
    chosen?.is === 'pipe'
      ? (drawing?.lines.some(({ pipe }) => pipe === chosen.row) ?? false)
      : (drawing?.symbols.some(({ fixture }) => fixture === chosen?.row) ?? false);
  const seen = (drawing: Riser | undefined): boolean => has(unfolded ? drawing : (drawing?.folded ?? drawing));
  if (chosen === null || seen(risers[riser])) return null;
  const found = has(risers[riser]) ? riser : risers.findIndex(has);
  return found < 0 ? null : { riser: found, unfolded: unfolded || !seen(risers[found]) };
}

function riserTools(desk: Desk, open: Riser, view: ReturnType<typeof panZoom>): HTMLElement {
  const { store, words, building } = desk;
  const { risers } = building.data;
  const tool = (label: string, press: () => void): HTMLElement =>
    make('button', { type: 'button', class: 'tool', onclick: press }, label);
  const select = make(
    'select',
    { id: 'riser-which', onchange: () => store.set({ riser: Number(select.value) }) },
    ...risers.map((riser, at) =>
      make('option', { value: at, selected: at === store.state.riser }, riserName(desk, riser)),
    ),
  );
  return make(
    'div',
    { class: 'toolbar', role: 'toolbar', 'aria-label': words.page.tools },
    risers.length > 1 &&
      make('label', { class: 'tool-select' }, make('span', { class: 'offscreen' }, words.riser.which), select),
    open.folded !== undefined &&
      make(
        'button',
        {
          type: 'button',
          class: 'tool',
          id: 'riser-fold',
          'aria-pressed': String(!store.state.unfolded),
          onclick: () => store.set({ unfolded: !store.state.unfolded }),
        },
        words.riser.fold,
      ),
    tool(words.riser.fit, () => view.fit()),
    tool(words.riser.zoomIn, () => view.zoom(0.8)),
    tool(words.riser.zoomOut, () => view.zoom(1.25)),
    tool(words.riser.print, () => {
      view.fit();
      window.print();
    }),
  );
}

function riserName({ building, words }: Desk, { system, stack }: Riser): string {
  if (system === null) return words.riser.lost;
  const whole = words.riser.whole(system + 1);
  return stack === null || stack < 0 ? whole : `${whole} · ${words.riser.part(pipeName(building, words, stack))}`;
}

/** Role where it begins to be said, size, then load and slope; a fixture's own drain needs its size alone. */
function runTexts({ building, words }: Desk, run: RiserRun): readonly string[] {
  const state = building.state(run.section);
  if (state === undefined) return [];
  const size = sizesText(words, state);
  if (state.role === 'fixture-drain' || state.role === 'idle') return [size];
  const load = state.load.most === 0 && state.ventLoad !== undefined ? state.ventLoad : state.load;
  const slope = state.slope?.value == null || state.load.most === 0 ? null : slopeText(words, state.slope.value);
  const numbers = [load.most === 0 ? null : shortLoad(words, load, building.result.code.unit), slope];
  return [
    ...(run.role === null ? [] : [capital(named(words.roles, run.role))]),
    size,
    numbers.filter((text) => text !== null).join(' · '),
  ].filter((text) => text !== '');
}
