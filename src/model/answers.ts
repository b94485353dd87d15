/** What the user knows and the model does not say, as the answers file holds it. Keys: GlobalId or `name:` pattern. */
export interface Answers {
  readonly settings: Settings;
  readonly sewerEnds: readonly string[];
  readonly fixtures: ReadonlyMap<string, FixtureAnswer>;
  readonly pipes: ReadonlyMap<string, PipeAnswer>;
  readonly batteries: ReadonlyMap<string, { readonly reading: string }>;
  readonly leaveOut: readonly string[];
  readonly cleanouts: readonly string[];
}

export type Settings = Readonly<Record<string, string | number | boolean | readonly string[]>>;

export interface FixtureAnswer {
  readonly kind?: string;
  readonly detail?: Readonly<Record<string, string | number | boolean>>;
  readonly trapSize?: string;
  readonly space?: string;
}

export interface PipeAnswer {
  readonly size?: string;
  readonly slope?: number;
  readonly material?: string;
}

export const noAnswers: Answers = {
  settings: {},
  sewerEnds: [],
  fixtures: new Map(),
  pipes: new Map(),
  batteries: new Map(),
  leaveOut: [],
  cleanouts: [],
};
