import type { Piping } from '../pipeline.ts';
import type { Outcome } from '../verdicts/outcome.ts';

/** The piping that an outcome was reached with: what a study changes and runs again. */
export const pipingOf = ({ model, identities, network, outline, code, answers, read }: Outcome): Piping => ({
  model,
  identities,
  network,
  outline,
  code,
  answers,
  findings: read,
});
