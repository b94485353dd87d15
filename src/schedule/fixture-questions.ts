import { elementNames } from './element-names.ts';
import { openByUse } from './open-by-use.ts';
import type { Question } from './question.ts';
import { openFixtures } from './ranges-text.ts';
import type { OpenFact, Result, ResultFixture } from './result.ts';
import { counted, plainWords } from './trade-words.ts';

/** What would settle each open fixture; what holds for the whole building is asked once. */
export function fixtureQuestions(result: Result): Question[] {
  const names = elementNames(result);
  const own = openFixtures(result).flatMap((fixture) =>
    (fixture.open ?? [])
      .filter(({ field }) => !isSetting(field))
      .map((fact): Question => {
        const key = fixture.globalId;
        return {
          about: [key],
          ask: ask(fact, fixture, names.of(key), result.code.unit),
          weight: openPipes(result, [fixture]),
          choices: fact.choices,
          answer: { part: 'fixtures', key, field: fact.field },
        };
      }),
  );
  return [...own, ...useQuestion(result), ...roomQuestion(result)];
}

const isSetting = (field: string): boolean => field.startsWith('settings.');

function ask({ field }: OpenFact, { kind, load }: ResultFixture, name: string, unit: string): string {
  if (kind === null) return `What is ${name}? Nothing in the model tells its kind.`;
  const counts = `The code counts it ${load.least === load.most ? `${load.most}` : `from ${load.least} to ${load.most}`} ${unit}.`;
  const what = plainWords(kind);
  switch (field) {
    case 'detail.flush':
      return `What flushes ${name} (${what})? ${counts}`;
    case 'detail.flushLitres':
      return `How many litres does ${name} (${what}) flush? ${counts}`;
    case 'detail.heads':
      return `How many heads has ${name} (${what})? ${counts}`;
    case 'detail.domestic':
      return `Is ${name} (${what}) a domestic one? ${counts}`;
    case 'detail.emergency':
      return `Is ${name} (${what}) there for emergencies only? ${counts}`;
    case 'detail.flow':
      return `What does ${name} (${what}) discharge, in litres a second? No row of the code tells it. ${counts}`;
    default:
      return `Which ${what} is ${name}? ${counts}`;
  }
}

/** Pipes downstream of fixtures, and those that carry their air, whose size is open. */
function openPipes({ pipes }: Result, fixtures: readonly ResultFixture[]): number {
  const ids = new Set(fixtures.map(({ globalId }) => globalId));
  const uses = (list: readonly string[] | undefined): boolean => list?.some((id) => ids.has(id)) === true;
  return pipes.filter(
    ({ required, verdict, servesWater, servesAir }) =>
      (verdict === 'unknown' || required?.least?.label !== required?.most?.label) &&
      (uses(servesWater) || uses(servesAir)),
  ).length;
}

/** One question for all of them: the use of the building. */
function useQuestion(result: Result): Question[] {
  const byUse = openByUse(result);
  const open = result.fixtures.filter(({ globalId }) => byUse.has(globalId));
  if (open.length === 0) return [];
  const uses = [...new Set(open.flatMap((fixture) => (fixture.open ?? []).flatMap(({ choices }) => choices)))];
  return [
    {
      about: open.map(({ globalId }) => globalId),
      ask: `What is the use of the building: ${uses.join(', ')}? ${counted(open.length, 'fixture')} ${open.length === 1 ? 'counts' : 'count'} by it.`,
      weight: openPipes(result, open),
      choices: uses,
      answer: { part: 'settings', key: 'use', field: null },
    },
  ];
}

/** Fixtures of one bathroom count less together than one by one, where somebody says which stand together. */
function roomQuestion({ findings, pipes }: Result): Question[] {
  return findings
    .filter(({ code }) => code === 'group-not-applied')
    .flatMap(({ about }): Question[] => {
      const [first] = about;
      if (first === undefined) return [];
      const ids = new Set(about);
      const shared = pipes.filter(
        ({ servesWater }) => (servesWater?.filter((id) => ids.has(id)).length ?? 0) >= leastOfGroup,
      );
      return [
        {
          about,
          ask: `Which of these ${about.length} fixtures stand in one bathroom? A closet, a lavatory and a bath in one room count less together; give each the name of its room.`,
          weight: shared.length,
          choices: [],
          answer: { part: 'fixtures', key: first, field: 'space' },
        },
      ];
    });
}

/** A closet, a lavatory and a bath or shower. */
const leastOfGroup = 3;
