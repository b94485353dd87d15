import { createHash } from 'node:crypto';
import { describe, expect, test } from 'vitest';
import { modelOf, openFiles } from '../../src/ifc/open.ts';
import type { Model } from '../../src/model/model.ts';
import { buildNetwork } from '../../src/network/build-network.ts';
import type { Network } from '../../src/network/network.ts';
import { adjacency, agreement } from '../support/adjacency.ts';
import { joinsOf } from '../support/drawn.ts';
import { withGaps, withoutPorts } from '../support/model-twins.ts';
import { plainIdentities } from '../support/plain-identities.ts';
import { sharedModels } from '../support/real-models.ts';

/** Models of other people, not part of this project; they may lie beside a checkout. */
const shared = sharedModels();
const sha256 = (bytes: Uint8Array): string => createHash('sha256').update(bytes).digest('hex');

function read(name: string): Model {
  const file = shared!.find((it) => it.name === name);
  if (file === undefined) throw new Error(`no model ${name} in ../shared/models`);
  return modelOf(openFiles([{ name, bytes: file.read() }], sha256));
}

/** As if every element were sanitary: here it is the joints that count, not what they carry. */
const networkOf = (model: Model): Network => buildNetwork(model, plainIdentities(model, 'sanitary')).value;
const joins = (model: Model, network: Network): string[] => joinsOf({ model, identities: [] }, network);

if (shared === null) test.skip('models of other people: ../shared/models is not there', () => {});

describe.skipIf(shared === null)('joints of models by other people', () => {
  // Read off the file by hand: A (6 m) <- S <- {B (5 m) <- T <- {C (4 m) <- X; E (2 m) <- Y}; D (3 m) <- Z}.
  test('riolering-topology: three fixtures, two tees, one open end, no geometry', () => {
    const model = read('riolering-topology/RioleringTest.ifc');
    const network = networkOf(model);
    expect(joins(model, network)).toEqual(['A', 'A+B+D@S', 'B+C+E@T', 'C@X', 'D@Z', 'E@Y']);
    expect(network.pipes.map(({ element, length }) => [model.elements[element!]!.name, length])).toEqual([
      ['A', 6],
      ['B', 5],
      ['C', 4],
      ['D', 3],
      ['E', 2],
    ]);
    expect(network.pipes.map(({ portFlow }) => portFlow)).toEqual(Array(5).fill('forward'));
    expect(network.joints.map(({ at }) => at)).toEqual(Array(6).fill(null));
  });

  // Flow by the ports: 10 [8] 51 [54] 56; 212 [210] 56; 56 [60] 62; 56 [109] 111; 193 [191] 111. Lengths add to 71.34 m.
  test.each(['road-drainage-1/DrainageSystem-1-1.ifc', 'road-drainage-1/DrainageSystem-1-2.ifc'])(
    '%s: six pipes between seven manholes, two ways out of one',
    (name) => {
      const model = read(name);
      const network = networkOf(model);
      const truth = ['109+191@111', '109+210+54+60@56', '191@193', '210@212', '54+8@51', '60@62', '8@10'];
      expect(joins(model, network)).toEqual(truth);
      expect(network.pipes.reduce((sum, { length }) => sum + length, 0)).toBeCloseTo(71.34, 2);
      expect(network.pipes.every(({ portFlow }) => portFlow === 'forward')).toBe(true);
      const bare = withoutPorts(model);
      expect(joins(bare, networkOf(bare))).toEqual(truth);
    },
  );

  test('road-drainage-2: a culvert and two ditches meet in a node, three ends stay open', () => {
    const model = read('road-drainage-2/DrainageSystem-2.ifc');
    const truth = ['120', '120+204+206-213-219@DC122', '204', '206-213-219'];
    expect(joins(model, networkOf(model))).toEqual(truth);
  });

  // 16 pipes and 8 pipes laid at 2.5 m, 20 m apart; a manhole stands over the near end of each run.
  test('sewer-no-ports: tessellated pipes with sockets are two continuous runs', () => {
    const model = read('sewer-no-ports/Infra-Plumbing-ifc4x3.ifc');
    const network = networkOf(model);
    const meeting = network.joints.map(
      ({ pipes, elements }) => `${pipes.length}${elements.length > 0 ? ' manhole' : ''}`,
    );
    expect(meeting.sort()).toEqual(['1', '1', '1 manhole', '1 manhole', ...Array(22).fill('2')]);
    const run = network.pipes.reduce((sum, { length, reach }) => sum + length + reach[0] + reach[1], 0);
    // 24 pipes laid at 2.5 m, one spigot of 0.075 m at the end of each run, and the ways into the manholes.
    expect(run).toBeGreaterThan(60);
    expect(run).toBeLessThan(61.5);
  });

  test('utility-pipe-and-chamber: the pipe runs through under the chamber', () => {
    const model = read('utility-pipe-and-chamber/test_pipe_and_duct_bsp.ifc');
    expect(joins(model, networkOf(model))).toEqual(['Pipe1', 'Pipe1+Pipe2@Cylinder', 'Pipe2']);
  });

  // Truth is the file's own port relations between all that could carry water (boiler and radiators apart).
  test.each([{ gap: 0 }, { gap: 0.002 }, { gap: 0.01 }])(
    'heating-full-ports without its ports, $gap m cut off each pipe end: 0.995 of the joints, and of those found',
    ({ gap }) => {
      const model = read('heating-full-ports/hvac_heating.ifc.gz');
      const truth = adjacency(networkOf(model));
      expect(truth.size).toBeGreaterThan(200);
      const found = adjacency(networkOf(withGaps(withoutPorts(model), () => gap)));
      const { recall, precision } = agreement(found, truth);
      expect(recall).toBeGreaterThanOrEqual(0.995);
      expect(precision).toBeGreaterThanOrEqual(0.995);
    },
  );
});
