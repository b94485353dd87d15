import type { Outcome } from '../verdicts/outcome.ts';

/** What a riser is drawn from. */
export type RiserSource = Pick<Outcome, 'model' | 'network' | 'paths' | 'identities'>;
