import type { Finding, WithFindings } from '../findings/finding.ts';
import type { Answers } from '../model/answers.ts';
import type { Identity } from '../model/identity.ts';
import type { Model } from '../model/model.ts';
import type { Network } from '../network/network.ts';
import { ventTraps } from './air.ts';
import { dryPieces } from './dry-pieces.ts';
import type { Paths } from './paths.ts';
import { pumpedPipes } from './pumped.ts';
import { orientations, pipeSlopes } from './slopes.ts';
import { streamOf } from './stream.ts';
import { seatTraps } from './traps.ts';
import { pipeRanks, waterPaths } from './water.ts';

/**
 * Water from every fixture to its sewer end, and air from every trap to the open sky.
 * A fault of the model (no sewer end, a climb, a piece without open air) is a finding; the paths go as far as they can.
 */
export function findPaths(
  model: Model,
  identities: readonly Identity[],
  network: Network,
  answers: Answers,
): WithFindings<Paths> {
  const findings: Finding[] = [];
  const rank = pipeRanks(model, network);
  const vertical = orientations(model, network);
  const water = waterPaths(model, identities, network, answers, rank, findings);
  const slopes = pipeSlopes(model, network, water, vertical, answers, pumpedPipes(identities, water), findings);
  const seats = seatTraps(model, identities, network, water, vertical);
  const dry = dryPieces(model, identities, network, water.wet, rank, findings);
  const traps = ventTraps(network, water, dry, vertical, seats);
  const toward = water.toward.map((joint, pipe) => joint ?? dry.skyward[pipe] ?? null);
  return {
    value: {
      ...water,
      traps,
      ...dry,
      toward,
      stream: streamOf(network, { wet: water.wet, toward }),
      vertical,
      slopes,
    },
    findings,
  };
}
