/** Something the model does not say and a person can: what to ask, and where the answer goes in an answers file. */
export interface Question {
  /** GlobalIds, the thing in question first. */
  readonly about: readonly string[];
  readonly ask: string;
  /** How many pipes may get another size or verdict by the answer. */
  readonly weight: number;
  /** What may be answered; empty where any size, slope or name may. */
  readonly choices: readonly string[];
  readonly answer: AnswerPlace;
}

export interface AnswerPlace {
  readonly part: 'settings' | 'sewerEnds' | 'fixtures' | 'pipes' | 'batteries';
  readonly key: string | null;
  /** `kind`; a dot leads further in: `detail.flush`. `space` is answered for everything the question is about. */
  readonly field: string | null;
}
