/** What the reader of the page has chosen. Everything on the screen follows from this and the building. */
export interface PageState {
  readonly view: 'model' | 'riser';
  /** A row of the result; the panel shows it, the scene frames it. */
  readonly chosen: Chosen | null;
  readonly colourBy: ColourBy;
  /** Legend entries that are switched off, by their key. */
  readonly hidden: ReadonlySet<string>;
  /** Only this storey (index), or the whole building. */
  readonly storey: number | null;
  /** Rows of pipes to show alone, or all. */
  readonly isolated: readonly number[] | null;
  readonly follow: Follow | null;
  readonly labels: boolean;
  readonly context: boolean;
  readonly measuring: boolean;
  readonly tab: Tab;
  readonly search: string;
  /** Severities and codes of findings to list; null: all. */
  readonly findingFilter: string | null;
  readonly findingsBy: 'cause' | 'place' | 'storey';
  readonly pipesBy: PipeOrder;
  readonly language: Language;
  readonly theme: 'light' | 'dark';
  readonly riser: number;
  /** Alike storeys of a riser each drawn for itself. */
  readonly unfolded: boolean;
}

export type Chosen = { readonly is: 'pipe' | 'fixture'; readonly row: number };
export type ColourBy = 'verdict' | 'role' | 'system' | 'size' | 'storey' | 'load' | 'margin' | 'change';
export type Tab = 'findings' | 'mend' | 'questions' | 'batteries' | 'pipes' | 'model';
export type Language = 'en' | 'fr';
/** The water's or the air's way of one fixture; `step` is the section along it that the reader has slid to. */
export interface Follow {
  readonly what: 'water' | 'air';
  readonly fixture: number;
  readonly step: number;
}

export type PipeOrder = 'verdict' | 'name' | 'size' | 'load' | 'storey';

export interface Store {
  readonly state: PageState;
  set(change: Partial<PageState>): void;
  /** Called after each change with what was before; in the order of subscription. */
  watch(listener: (now: PageState, before: PageState) => void): void;
}

export function storeOf(initial: PageState): Store {
  let state = initial;
  const listeners: ((now: PageState, before: PageState) => void)[] = [];
  return {
    get state() {
      return state;
    },
    set(change) {
      const before = state;
      state = { ...state, ...change };
      for (const listener of listeners) listener(state, before);
    },
    watch(listener) {
      listeners.push(listener);
    },
  };
}
