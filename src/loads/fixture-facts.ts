import type { PlumbingCode } from '../codes/plumbing-code.ts';
import type { Answers } from '../model/answers.ts';
import type { Identity } from '../model/identity.ts';
import type { Model } from '../model/model.ts';
import type { Network } from '../network/network.ts';
import type { Paths } from '../paths/paths.ts';
import type { ModelledSize } from './read-size.ts';

export interface FixtureFacts {
  readonly model: Model;
  readonly identities: readonly Identity[];
  readonly network: Network;
  readonly paths: Paths;
  readonly code: PlumbingCode;
  readonly answers: Answers;
  readonly modelled: readonly ModelledSize[];
}
