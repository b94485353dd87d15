import { type NamedView, namedViews } from '../scene/orbit.ts';
import type { Desk } from './desk.ts';
import { connectedRows, upstreamOf } from './neighbours.ts';

/** Single keys for what one does often. None of them acts while somebody types. */
export function keysOn(desk: Desk, parts: { readonly search: HTMLInputElement }): () => void {
  const { building, store } = desk;
  const off = new AbortController();
  const chosenPipe = (): number | null => (store.state.chosen?.is === 'pipe' ? store.state.chosen.row : null);
  const step = (to: (row: number) => number | undefined): void => {
    const row = chosenPipe();
    const next = row === null ? undefined : to(row);
    if (next !== undefined) desk.choosePipe(next);
  };
  const acts: Readonly<Record<string, () => void>> = {
    f: () => desk.scene?.fit(),
    n: () => step((row) => building.pipeAt.get(building.result.pipes[row]?.next ?? '')),
    p: () => step((row) => upstreamOf(desk, row)),
    i: () => {
      const row = chosenPipe();
      store.set({ isolated: store.state.isolated === null && row !== null ? connectedRows(desk, row) : null });
    },
    l: () => store.set({ labels: !store.state.labels }),
    m: () => store.set({ measuring: !store.state.measuring }),
    r: () => store.set({ view: store.state.view === 'riser' ? 'model' : 'riser' }),
    '/': () => parts.search.focus(),
  };
  window.addEventListener(
    'keydown',
    (event) => {
      const target = event.target instanceof Element ? event.target : document.body;
      if (event.altKey || event.metaKey || event.ctrlKey) return;
      if (event.key === 'Escape') {
        if (document.querySelector('dialog[open]') === null) letGo(desk);
        return;
      }
      if (target.closest('input, select, textarea, dialog') !== null) return;
      const view = (Object.keys(namedViews) as NamedView[])[Number(event.key) - 1];
      const act = acts[event.key.toLowerCase()] ?? (view === undefined ? undefined : () => desk.scene?.view(view));
      if (act === undefined) return;
      event.preventDefault();
      act();
    },
    { signal: off.signal },
  );
  return () => off.abort();
}

/** One thing at a time: the measure, the way, the search, what is alone, what is chosen. */
function letGo({ store }: Desk): void {
  const { measuring, follow, search, isolated, chosen } = store.state;
  if (measuring) store.set({ measuring: false });
  else if (follow !== null) store.set({ follow: null });
  else if (chosen !== null) store.set({ chosen: null });
  else if (isolated !== null) store.set({ isolated: null });
  else if (search !== '') store.set({ search: '' });
}
