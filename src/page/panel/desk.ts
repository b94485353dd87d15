import type { Building } from '../building.ts';
import type { Theme } from '../colours.ts';
import type { Side } from '../plan-side.ts';
import type { SceneView } from '../scene/scene-view.ts';
import type { Chosen, Store } from '../state.ts';
import type { Words } from '../words/words.ts';

/** What every part of the page works with. `scene` is null where the browser or the model gives no picture. */
export interface Desk {
  readonly building: Building;
  readonly store: Store;
  readonly words: Words;
  scene: SceneView | null;
  theme(): Theme;
  /** Says it to whoever cannot see the change. */
  announce(text: string): void;
  choosePipe(row: number, frame?: readonly number[]): void;
  chooseFixture(row: number): void;
  /** Controls under the card of what is chosen; absent where the page cannot check anew. */
  readonly whatIf?: (chosen: Chosen) => HTMLElement;
  /** Shows the building as modelled or as mended, at the same place; does nothing where there is no plan. */
  showSide(side: Side): void;
}
