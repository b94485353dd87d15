import { type NamedView, namedViews } from '../scene/orbit.ts';
import type { Desk } from './desk.ts';
import { make } from './element.ts';
import { shown } from './names.ts';
import { sideSwitch } from './side-switch.ts';

/** What one does with the picture: views, storey, labels, building, measuring. */
export function toolbar(desk: Desk): HTMLElement {
  const { building, words, store } = desk;
  const { state } = store;
  const toggle = (label: string, pressed: boolean, press: () => void): HTMLElement =>
    make('button', { type: 'button', class: 'tool', 'aria-pressed': String(pressed), onclick: press }, label);
  const views = make(
    'select',
    {
      id: 'view',
      onchange: () => {
        desk.scene?.view(views.value as NamedView);
        views.selectedIndex = 0;
      },
    },
    make('option', { value: '', disabled: true, selected: true, hidden: true }, words.tools.view),
    ...(Object.keys(namedViews) as NamedView[]).map((view) => make('option', { value: view }, words.tools.views[view])),
  );
  const storeys = make(
    'select',
    {
      id: 'storey',
      onchange: () => {
        store.set({ storey: storeys.value === '' ? null : Number(storeys.value) });
        desk.scene?.fit();
      },
    },
    make('option', { value: '', selected: state.storey === null }, words.tools.wholeBuilding),
    ...building.data.scene.storeys
      .map(({ name }, index) =>
        make('option', { value: index, selected: state.storey === index }, shown(name) || `${index + 1}`),
      )
      .reverse(),
  );
  return make(
    'div',
    { class: 'toolbar', role: 'toolbar', 'aria-label': words.page.tools },
    sideSwitch(desk),
    make('button', { type: 'button', class: 'tool', onclick: () => desk.scene?.fit() }, words.tools.fit),
    make('label', { class: 'tool-select' }, make('span', { class: 'offscreen' }, words.tools.view), views),
    building.data.scene.storeys.length > 0 &&
      make('label', { class: 'tool-select' }, make('span', { class: 'offscreen' }, words.tools.storey), storeys),
    toggle(words.tools.labels, state.labels, () => store.set({ labels: !store.state.labels })),
    toggle(words.tools.context, state.context, () => store.set({ context: !store.state.context })),
    toggle(words.tools.measure, state.measuring, () => {
      store.set({ measuring: !store.state.measuring });
      if (store.state.measuring) desk.announce(words.tools.measureHint);
    }),
    state.isolated !== null &&
      make(
        'button',
        { type: 'button', class: 'tool strong', onclick: () => store.set({ isolated: null }) },
        words.pipe.showAll,
      ),
  );
}
