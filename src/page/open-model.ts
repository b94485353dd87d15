import type { PageData } from '../deliver/page-data.ts';
import { type Building, buildingOf } from './building.ts';
import { asksMended } from './link.ts';
import { type Kept, openPage, type PageAround } from './open-page.ts';
import { planSide, type Side } from './plan-side.ts';
import type { Chosen } from './state.ts';

/**
 * Opens a page on its building as modelled; where it holds a plan, the reader may go to the building as mended and back,
 * with the same thing chosen from the same place. Returns what closes it.
 */
export function openModel(host: HTMLElement, data: PageData, around: PageAround = {}): () => void {
  const { mend } = data;
  const made = new Map<Side, Building>();
  const building = (side: Side): Building => {
    const found =
      made.get(side) ?? buildingOf(side === 'after' && mend !== null ? mend.after : data, planSide(data, side));
    made.set(side, found);
    return found;
  };
  let close = (): void => undefined;
  const open = (side: Side, kept?: Kept): void => {
    close();
    const { whatIf, ...rest } = around;
    close = openPage(host, building(side), {
      ...rest,
      // What is supposed is supposed of the model.
      ...(whatIf === undefined || side === 'after' ? {} : { whatIf }),
      ...(kept === undefined ? {} : { kept }),
      showSide: (to, now) => {
        if (to !== side && mend !== null) open(to, carried(building(side), building(to), now));
      },
    });
  };
  open(mend !== null && asksMended(location.hash) ? 'after' : 'before', around.kept);
  return () => close();
}

/** Rows are numbered anew: what is chosen or followed is found again by its GlobalId, and let go where it is not there. */
function carried(from: Building, to: Building, { state, eye }: Kept): Kept {
  const { chosen = null, follow = null } = state;
  const fixture = follow === null ? undefined : to.fixtureAt.get(from.result.fixtures[follow.fixture]?.globalId ?? '');
  return {
    state: {
      ...state,
      chosen: chosen === null ? null : rowIn(from, to, chosen),
      follow: follow === null || fixture === undefined ? null : { ...follow, fixture, step: 0 },
      isolated: null,
      riser: 0,
    },
    eye,
  };
}

function rowIn(from: Building, to: Building, { is, row }: Chosen): Chosen | null {
  const id = (is === 'pipe' ? from.result.pipes : from.result.fixtures)[row]?.globalId ?? '';
  const found = (is === 'pipe' ? to.pipeAt : to.fixtureAt).get(id);
  return found === undefined ? null : { is, row: found };
}
