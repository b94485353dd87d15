import type { PlumbingCode } from '../codes/plumbing-code.ts';
import type { FixtureDetail, FixtureKind } from '../model/identity.ts';
import { answerableParts, fixtureKinds } from '../model/identity-words.ts';
import type { FixtureId } from '../paths/paths.ts';
import { unitsOf } from '../units/quantity.ts';
import type { Outcome } from '../verdicts/outcome.ts';
import type { OpenFact, ResultFixture } from './result.ts';
import { type ResultIndex, roundMetres } from './result-index.ts';

/** What a person may say of a fixture whose load is open; what no row of the code tells apart has at least a flow. */
function openFacts({ fixtures }: PlumbingCode, kind: FixtureKind | null, detail: FixtureDetail): OpenFact[] {
  if (kind === null) return [{ field: 'kind', choices: [...fixtureKinds, ...answerableParts] }];
  const uses = fixtures.openUses?.(kind, detail) ?? null;
  if (uses !== null) return [{ field: 'settings.use', choices: uses }];
  const facts = fixtures.openDetails(kind, detail).map(
    ({ field, choices }): OpenFact => ({
      field: `detail.${field}`,
      choices: choices.some((choice) => typeof choice === 'number') ? [] : choices.map(String),
    }),
  );
  return facts.length > 0 ? facts : [{ field: 'detail.flow', choices: [] }];
}

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
  const { row, trap: trapSize, settled } = shown.loads.fixtures[id]!;
  const { least, most } = fixtureLoads[id]!;
  const limit = arm === null ? null : code.armLimit(trapSize, row);
  return {
    globalId: index.idOf(path.element),
    stepId: element.stepId,
    name: element.name,
    kind,
    detail,
    ...(settled ? {} : { open: openFacts(code, kind, detail) }),
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
