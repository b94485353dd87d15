import type { FixtureId } from '../paths/paths.ts';
import { unitsOf } from '../units/quantity.ts';
import type { Outcome } from '../verdicts/outcome.ts';
import type { ResultFixture } from './result.ts';
import { type ResultIndex, roundMetres } from './result-index.ts';

/** Fixtures with an outlet, by file and STEP id. */
export function resultFixtures(outcome: Outcome, index: ResultIndex): ResultFixture[] {
  const { paths } = outcome;
  return [...paths.fixtures].sort((a, b) => a.element - b.element).map(({ id }) => fixture(outcome, index, id));
}

function fixture(
  { model, identities, paths, shown, fixtureLoads, code }: Outcome,
  index: ResultIndex,
  id: FixtureId,
): ResultFixture {
  const path = paths.fixtures[id]!;
  const element = model.elements[path.element]!;
  const { kind, detail, evidence } = identities[path.element]!;
  const trap = shown.roles.air[id]!;
  const venting = shown.roles.venting[id]!;
  const arm = shown.roles.arms[id] ?? null;
  const { row, trap: trapSize } = shown.loads.fixtures[id]!;
  const { least, most } = fixtureLoads[id]!;
  const limit = arm === null ? null : code.armLimit(trapSize, row);
  return {
    globalId: index.idOf(path.element),
    stepId: element.stepId,
    name: element.name,
    kind,
    detail,
    row: kind === null ? null : row.id,
    evidence,
    load: { least: unitsOf(least), most: unitsOf(most) },
    trapSize: index.size(trapSize),
    storey: index.storeyOf(path.element),
    waterPath: index.idsOf(path.water),
    airPath: index.idsOf([...trap.arm, ...trap.through, ...trap.dry]),
    ventedBy: {
      how: venting.how,
      vents: index.idsOf(venting.vents),
      ...(venting.free === null || venting.how !== 'free' ? {} : { rule: venting.free.rule }),
    },
    trap: { at: index.at(trap.at), how: trap.how },
    trapArm:
      arm === null
        ? null
        : {
            length: roundMetres(arm.length),
            fall: arm.fall === null ? null : roundMetres(arm.fall),
            slope: arm.slope === null ? null : roundMetres(arm.slope),
            turn: arm.turn === null ? null : Math.round(arm.turn * 100) / 100,
            limit,
          },
  };
}
