import type { Building } from './building.ts';
import { switchesOf } from './panel/legend.ts';
import type { PageState } from './state.ts';

/** What the address after `#` says of the state. `#pipe=` or a bare GlobalId chooses; unknown ids choose nothing. */
export function stateFromLink(building: Building, hash: string): Partial<PageState> {
  const text = hash.replace(/^#/, '');
  if (text === '') return {};
  const asked = new URLSearchParams(text.includes('=') ? text : `id=${encodeURIComponent(text)}`);
  const id = asked.get('pipe') ?? asked.get('fixture') ?? asked.get('id');
  const pipe = id === null ? undefined : building.pipeAt.get(id);
  const fixture = id === null ? undefined : building.fixtureAt.get(id);
  const colour = switchesOf(building).find((by) => by === asked.get('colour'));
  const storey = Number(asked.get('storey') ?? Number.NaN);
  const language = asked.get('lang');
  return {
    ...(pipe !== undefined
      ? { chosen: { is: 'pipe', row: pipe } }
      : fixture !== undefined
        ? { chosen: { is: 'fixture', row: fixture } }
        : {}),
    ...(asked.get('view') === 'riser' ? { view: 'riser' } : asked.get('view') === 'model' ? { view: 'model' } : {}),
    ...(colour === undefined ? {} : { colourBy: colour }),
    ...(Number.isInteger(storey) && building.data.scene.storeys[storey] !== undefined ? { storey } : {}),
    ...(language === 'fr' || language === 'en' ? { language } : {}),
  };
}

/** Whether the address asks for the building as mended. */
export const asksMended = (hash: string): boolean => new URLSearchParams(hash.replace(/^#/, '')).get('mended') === '1';

/** The address that brings another reader to the same place; only what differs from a fresh page stands in it. */
export function linkOf(building: Building, state: PageState): string {
  const parts = new URLSearchParams();
  const { chosen } = state;
  const rows = chosen?.is === 'pipe' ? building.result.pipes : building.result.fixtures;
  const id = chosen === null ? undefined : rows[chosen.row]?.globalId;
  if (chosen !== null && id !== undefined) parts.set(chosen.is, id);
  if (state.view === 'riser') parts.set('view', 'riser');
  if (state.colourBy !== 'verdict') parts.set('colour', state.colourBy);
  if (building.plan?.side === 'after') parts.set('mended', '1');
  if (state.storey !== null) parts.set('storey', String(state.storey));
  const text = parts.toString();
  return text === '' ? '' : `#${text}`;
}
