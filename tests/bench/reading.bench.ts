import { spawnSync } from 'node:child_process';
import { statSync } from 'node:fs';
import * as WebIfc from 'web-ifc';
import { plumbingCode } from '../../src/codes/index.ts';
import { modelOf, openFiles } from '../../src/ifc/open.ts';
import { noAnswers } from '../../src/model/answers.ts';
import { identify } from '../../src/model/identify.ts';
import { readNamesTable } from '../../src/model/read-names-table.ts';
import { buildNetwork } from '../../src/network/build-network.ts';
import { buildingOutline } from '../../src/network/building-outline.ts';
import { runNetwork } from '../../src/pipeline.ts';
import { resultOf } from '../../src/schedule/result-of.ts';
import { readPipeDimensions } from '../../src/tables/read-pipe-dimensions.ts';
import { tables } from '../support/run-sketch.ts';
import { cpuSeconds, median, ratio } from './measure.ts';
import { modelOfSize } from './models.ts';

// `check` in this process, warm, against web-ifc only opening the same bytes. Goal: 0.6 or less at 10 and 60 MB.
const names = readNamesTable(tables);
const code = plumbingCode('npc-2020', { tables, dimensions: readPipeDimensions(tables) }, {}, 'bench');
const api = new WebIfc.IfcAPI();
await api.Init(undefined, true);
api.SetLogLevel(WebIfc.LogLevel.LOG_LEVEL_OFF);

const stages = ['index', 'model', 'identify', 'network', 'paths to verdicts', 'result'] as const;
function check(bytes: Uint8Array, lap: (stage: number, call: () => void) => void): void {
  let files!: ReturnType<typeof openFiles>;
  let model!: ReturnType<typeof modelOf>;
  let identities!: ReturnType<typeof identify>;
  let built!: ReturnType<typeof buildNetwork>;
  let outcome!: ReturnType<typeof runNetwork>;
  lap(0, () => {
    files = openFiles([{ name: 'bench.ifc', bytes }], () => '');
  });
  lap(1, () => {
    model = modelOf(files);
  });
  lap(2, () => {
    identities = identify(model, noAnswers, names);
  });
  lap(3, () => {
    built = buildNetwork(model, identities.value, {});
  });
  lap(4, () => {
    outcome = runNetwork({
      model,
      identities: identities.value,
      network: built.value,
      outline: buildingOutline(model),
      code,
      answers: noAnswers,
      findings: [],
    });
  });
  lap(5, () => {
    resultOf(outcome, 'bench');
  });
}
const straight = (_: number, call: () => void): void => call();

console.log('check, warm, against web-ifc opening the same bytes (processor seconds, medians; ratio pair by pair)');
console.log('MB     pipes  check   web-ifc  ratio (least to most)   shares');
for (const megabytes of [1, 10, 60]) {
  const { bytes, path, from } = modelOfSize(megabytes);
  const both = ratio(
    () => check(bytes, straight),
    () => api.CloseModel(api.OpenModel(bytes)),
    megabytes > 20 ? 5 : 9,
  );
  const laps: number[][] = stages.map(() => []);
  for (let round = 0; round < 5; round++) check(bytes, (stage, call) => laps[stage]!.push(cpuSeconds(call)));
  const times = laps.map(median);
  const total = times.reduce((a, b) => a + b, 0);
  const shares = stages.map((stage, at) => `${stage} ${Math.round((times[at]! / total) * 100)} %`).join(', ');
  const pipes = modelOf(openFiles([{ name: 'x.ifc', bytes }], () => '')).elements.filter(
    ({ kind }) => kind === 'segment',
  ).length;
  console.log(
    `${String(megabytes).padEnd(6)} ${String(pipes).padEnd(6)} ${both.ours.toFixed(3).padEnd(7)} ${both.theirs.toFixed(3).padEnd(8)} ` +
      `${both.ratio.toFixed(2)} (${both.least.toFixed(2)} to ${both.most.toFixed(2)})   ${shares}`,
  );
  console.log(`       ${from}; peak memory of \`check\` alone: ${peak(path)}`);
}

/** Peak resident memory of the built command, against the file and a bare Node process. */
function peak(path: string): string {
  const hook = 'process.on("exit",()=>console.error("peak "+process.resourceUsage().maxRSS))';
  const of = (args: readonly string[]): number => {
    const { stderr } = spawnSync(
      process.execPath,
      ['--import', `data:text/javascript,${encodeURIComponent(hook)}`, ...args],
      { encoding: 'utf8', maxBuffer: 1e9 },
    );
    return Number(/peak (\d+)/.exec(stderr)?.[1] ?? Number.NaN) / 1024;
  };
  const bare = of(['-e', '0']);
  const ours = of(['dist/cli/main.js', 'check', path]);
  const file = statSync(path).size / 1024 / 1024;
  return `${ours.toFixed(0)} MB for a file of ${file.toFixed(1)} MB (bare Node ${bare.toFixed(0)} MB): ${((ours - bare) / file).toFixed(1)} times the file`;
}
