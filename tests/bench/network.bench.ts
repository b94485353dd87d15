import { readFileSync } from 'node:fs';
import * as WebIfc from 'web-ifc';
import { modelOf, openFiles } from '../../src/ifc/open.ts';
import { noAnswers } from '../../src/model/answers.ts';
import { identify } from '../../src/model/identify.ts';
import type { Model } from '../../src/model/model.ts';
import type { NamesTable } from '../../src/model/names-table.ts';
import { readNamesTable } from '../../src/model/read-names-table.ts';
import { buildNetwork } from '../../src/network/build-network.ts';
import { adjacency, agreement } from '../support/adjacency.ts';
import { withCrossings } from '../support/crossing-pipes.ts';
import { withGaps, withoutPorts } from '../support/model-twins.ts';
import { plainIdentities } from '../support/plain-identities.ts';
import { sampleModels, sharedModels } from '../support/real-models.ts';
import { tables } from '../support/run-sketch.ts';
import { freshRatio } from './measure.ts';
import { modelOfElements } from './models.ts';

// Joints by geometry against joints by ports, and the speed of reading and network against web-ifc opening the same bytes.
const names = readNamesTable(tables);
const read = (bytes: Uint8Array): Model => modelOf(openFiles([{ name: 'bench.ifc', bytes }], () => ''));

const gaps = [0, 0.002, 0.01, 0.025];
console.log('Joints by geometry against joints by ports: recall / precision, pipe ends cut back (mm)');
console.log(
  `${'model'.padEnd(22)} ${'pairs'.padEnd(6)} ${gaps.map((gap) => `${gap * 1000} mm`.padEnd(16)).join('')}crossings at 5 mm`,
);
const heating = sharedModels()?.find(({ name }) => name === 'heating-full-ports/hvac_heating.ifc.gz');
if (heating === undefined) console.log('heating-full-ports is not beside this checkout: left out');
for (const { name, path } of sampleModels()) twins(name, read(new Uint8Array(readFileSync(path))), false);
if (heating !== undefined) twins('heating-full-ports', read(heating.read()), true);

/** `plain`: as pure topology, every element taken for sanitary. */
function twins(name: string, model: Model, plain: boolean): void {
  const network = (one: Model) =>
    adjacency(
      buildNetwork(one, plain ? plainIdentities(one, 'sanitary') : identify(one, noAnswers, names).value).value,
    );
  const truth = network(model);
  const bare = withoutPorts(model);
  const told = (one: Model): string => {
    const { recall, precision } = agreement(network(one), truth);
    return `${recall.toFixed(4)} / ${precision.toFixed(4)}`;
  };
  const cells = gaps.map((gap) => told(withGaps(bare, () => gap)).padEnd(16)).join('');
  const crossed = withCrossings(bare, 0.005);
  const crossings = crossed.elements.length - bare.elements.length;
  console.log(`${name.padEnd(22)} ${String(truth.size).padEnd(6)} ${cells}${told(crossed)} (${crossings} pipes)`);
}

const api = new WebIfc.IfcAPI();
await api.Init(undefined, true);
api.SetLogLevel(WebIfc.LogLevel.LOG_LEVEL_OFF);

console.log('\nReading and network, warm, against web-ifc opening the same bytes (processor seconds, medians)');
console.log('elements  MB      ours    web-ifc  ratio (least to most)');
const points: { readonly elements: number; readonly seconds: number }[] = [];
for (const wanted of [1_000, 10_000, 100_000]) {
  const { bytes } = modelOfElements(wanted);
  // Names are read anew: a table that has read the model before only remembers, as long as its memory is large enough.
  const ours = {
    prepare: () => readNamesTable(tables),
    run: (fresh: NamesTable) => {
      const model = read(bytes);
      buildNetwork(model, identify(model, noAnswers, fresh).value);
    },
  };
  const elements = read(bytes).elements.length;
  const both = freshRatio(
    ours,
    () => api.CloseModel(api.OpenModel(bytes)),
    wanted > 50_000 ? 3 : 9,
    wanted > 50_000 ? 1 : 3,
  );
  points.push({ elements, seconds: both.ours });
  console.log(
    `${String(elements).padEnd(9)} ${(bytes.length / 1e6).toFixed(1).padEnd(7)} ${both.ours.toFixed(3).padEnd(7)} ` +
      `${both.theirs.toFixed(3).padEnd(8)} ${both.ratio.toFixed(2)} (${both.least.toFixed(2)} to ${both.most.toFixed(2)})`,
  );
}
// Linear within 15 %: no more than 1.15 times the time an element takes in the model before.
for (const [at, to] of points.slice(1).entries()) {
  const from = points[at]!;
  const exponent = Math.log(to.seconds / from.seconds) / Math.log(to.elements / from.elements);
  const each = to.seconds / to.elements / (from.seconds / from.elements);
  console.log(
    `growth from ${from.elements} to ${to.elements} elements: exponent ${exponent.toFixed(3)}, time for one element x ${each.toFixed(2)}`,
  );
}
