import type { PlumbingCode } from '../codes/plumbing-code.ts';
import type { PlanPoint } from '../geometry/plan-outline.ts';
import type { Answers } from '../model/answers.ts';
import type { Identity } from '../model/identity.ts';
import type { Model } from '../model/model.ts';
import type { Network } from '../network/network.ts';

/** A building with its network, and the code that its drainage is judged by: what every stage from the loads on begins with. */
export interface Building {
  readonly model: Model;
  readonly identities: readonly Identity[];
  readonly network: Network;
  /** Of the building in plan; null where the model draws none. */
  readonly outline: readonly PlanPoint[] | null;
  readonly code: PlumbingCode;
  readonly answers: Answers;
}
