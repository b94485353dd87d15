import { readFileSync } from 'node:fs';
import { parseArgs } from 'node:util';
import { allMutants, filesUnder } from './all-mutants.ts';
import { bundle } from './bundle.ts';
import { equivalents } from './equivalents.ts';
import { ground } from './ground.ts';
import { keeping } from './kept.ts';
import type { Mutant } from './mutants-of.ts';
import { openResults } from './results.ts';
import { openTrials, type Suite } from './trials.ts';

// Switches one small fault on after another and asks for a test that fails. Lists the faults that no test notices.
//   npm run mutants                       each rule of a code left out, each printed limit moved, going on where a run stopped
//   --fine          each condition, comparison, lookup and sum as well, in every stage from loads to verdicts
//   npm run mutants -- src/codes/npc      those of one folder or file
//   --kind "not in the list"   of one kind: rules that are left out
//   --tests codes/npc   asks only tests whose path holds this
//   --minutes 10    stops after so many minutes of processor time; the next run goes on
//   --whole         tries every test that reaches a fault; else tests of rules, the likeliest, as many as a second holds
//   --afresh        asks again about those that a test is known to notice, that test first
const { values, positionals } = parseArgs({
  allowPositionals: true,
  options: {
    minutes: { type: 'string' },
    fine: { type: 'boolean' },
    afresh: { type: 'boolean' },
    whole: { type: 'boolean' },
    tests: { type: 'string' },
    kind: { type: 'string' },
    results: { type: 'string' },
  },
});

const isFine = values.fine === true || values.kind !== undefined;
const isRule = ({ file, what }: Mutant): boolean =>
  file.startsWith('src/codes/') && /^(not in the list|limit )/.test(what);

/** Calls of `__mutant` after which a fault that no test noticed counts as a survivor. */
const enough = 2e6;

const read = (file: string): string => readFileSync(file, 'utf8');
/** Tests that drive the built program, wait, or prepare a folder cannot run a thousand times in one process. */
const isPlain = (file: string): boolean =>
  !/^tests\/(cli|page|house|ifc|mutation)\//.test(file) && !/\b(async|beforeAll|afterAll|vi)\b/.test(read(file));
/** Tests of rules; the others run whole buildings many times over, for what they are about. */
const isQuick = (file: string): boolean => /^tests\/(codes|loads|roles|sizes|tables|verdicts)\//.test(file);

const { mutants, texts } = allMutants(read);
const changed = new Map([...keeping(read), ...texts]);
const excused = new Set(equivalents.flatMap(({ keys }) => keys));
const results = openResults(values.results);
const asked = mutants.flatMap((mutant, number) =>
  !excused.has(mutant.key) &&
  (positionals.length === 0 || positionals.some((place) => mutant.file.startsWith(place))) &&
  (isFine ? mutant.what.includes(values.kind ?? '') : isRule(mutant)) &&
  (values.afresh === true || results.killer(mutant.key) === null)
    ? [{ ...mutant, number }]
    : [],
);
const seconds = (): number => {
  const { user, system } = process.cpuUsage();
  return (user + system) / 1e6;
};
const say = console.log;
console.log = () => undefined;
say(`${mutants.length} mutants, ${excused.size} of them equivalent; asking about ${asked.length}.`);

const { record, fails } = ground(mutants.length);
const suites: Suite[] = [];
for (const file of filesUnder('tests', '.test.ts').filter(
  (name) => isPlain(name) && (values.whole === true || isQuick(name)) && name.includes(values.tests ?? ''),
)) {
  const body = await bundle(file, changed);
  const tests = results.recorded(body, () => record(body));
  for (const { name } of tests.filter(({ broken }) => broken)) say(`does not pass here, left out: ${file}: ${name}`);
  suites.push({ file, body, tests });
}
say(
  `${suites.length} test files, ${suites.reduce((sum, { tests }) => sum + tests.length, 0)} tests read; ${seconds().toFixed(0)} s.`,
);

const survivors: (Pick<Mutant, 'key' | 'file' | 'line'> & { readonly passed: number; readonly reaching: number })[] =
  [];
const trials = openTrials(suites, mutants);
const most = values.whole === true || !isFine ? Number.POSITIVE_INFINITY : enough;
let done = 0;
for (const { number, key, file, line } of asked) {
  if (values.minutes !== undefined && seconds() > 60 * Number(values.minutes)) break;
  const order = trials.orderFor(number, results.killer(key));
  let by: string | null = null;
  let calls = 0;
  let passed = 0;
  for (const trial of order) {
    if (calls > most) break;
    calls += trial.calls;
    passed++;
    if (!fails(trial.body, number, trial.test, trial.calls)) continue;
    by = trial.name;
    trials.noticed(number, trial);
    break;
  }
  results.add(key, by);
  if (by === null) survivors.push({ key, file, line, passed, reaching: order.length });
  done++;
  if (done % 100 === 0) say(`${done} of ${asked.length}, ${survivors.length} survive; ${seconds().toFixed(0)} s`);
}
for (const { file, line, key, passed, reaching } of survivors)
  say(`${file}:${line}: ${key.slice(file.length + 2)}   [${passed} of ${reaching} tests that reach it pass]`);
say(`${done} of ${asked.length} asked, ${survivors.length} survive; ${seconds().toFixed(0)} s of processor time.`);
