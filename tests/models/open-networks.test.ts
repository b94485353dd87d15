import { createHash } from 'node:crypto';
import { describe, expect, test } from 'vitest';
import { modelOf, openFiles } from '../../src/ifc/open.ts';
import { noAnswers } from '../../src/model/answers.ts';
import { connectedPieces } from '../../src/paths/connected-pieces.ts';
import { run } from '../../src/pipeline.ts';
import type { Outcome } from '../../src/verdicts/outcome.ts';
import { sharedModels } from '../support/real-models.ts';
import { codeOf, names } from '../support/run-sketch.ts';

/** Models of other people, not part of this project; they may lie beside a checkout. */
const shared = sharedModels();

/** What a file holds, worked out by eye and by hand from its lines and its index. Absent: none. */
interface Expected {
  /** Elements by what becomes of them: in the network, or the reason they stay out. */
  readonly fates: Readonly<Record<string, number>>;
  readonly fixtures?: Readonly<Record<string, number>>;
  /** Joints by how many pipes meet, at what, and how geometry found them. */
  readonly joints?: Readonly<Record<string, number>>;
  readonly islands?: number;
  /** Name of the pipe by which the water leaves, and the ground. */
  readonly sewerEnd?: string;
}

// One line for each file of the folder: what is no sanitary drainage stays out, with its reason.
const expected: Readonly<Record<string, Expected>> = {
  // Washing machine, basin and closet over five pipes and two tees to the open end of A, all by ports.
  'riolering-topology/RioleringTest.ifc': {
    fates: { pipe: 5, fitting: 2, fixture: 3 },
    fixtures: { 'clothes-washer': 1, lavatory: 1, 'water-closet': 1 },
    joints: { '1 at fixture': 3, '3 at fitting': 2, '1': 1 },
    islands: 1,
    sewerEnd: 'A ports',
  },
  // Two runs of 16 and 8 pipes, spigot in socket, each from under a manhole to an open end; nothing drains into them.
  'sewer-no-ports/Infra-Plumbing-ifc4x3.ifc': {
    fates: { pipe: 24, terminal: 2 },
    joints: { '2 end-to-end': 22, '1 at chamber end-in-fitting': 2, '1': 2 },
    islands: 2,
  },
  // One upright vent of 2 in, told by a property of its own program; nothing stands at its ends.
  'vent-pipe-dwv/SingleBackslash.ifc': { fates: { pipe: 1 }, joints: { '1': 2 }, islands: 1 },
  // Nothing in the file says that its one pipe carries waste: a name of letters and digits, no system, no type.
  'sewer-polyline-sweep/MultiSegmentPipe.ifc': { fates: { 'no drainage': 1 } },
  'utility-pipe-and-chamber/test_pipe_and_duct_bsp.ifc': { fates: { 'no drainage': 2 } },
  // Rain from roads.
  'road-drainage-1/DrainageSystem-1-1.ifc': { fates: { rainwater: 13 } },
  'road-drainage-1/DrainageSystem-1-2.ifc': { fates: { rainwater: 13 } },
  'road-drainage-2/DrainageSystem-2.ifc': { fates: { rainwater: 4 } },
  // A tray and its cabin are one shower; the chimney drains nothing. No pipes.
  'fixtures-fzk-haus/AC11-FZK-Haus.ifc.gz': {
    fates: { fixture: 5, double: 1, equipment: 1 },
    fixtures: { shower: 1, bathtub: 1, lavatory: 2, 'water-closet': 1 },
  },
  // Toilet 4, sink B 2 and C 4 (lavatories), sink A 2 (kitchen islands), bath 2, shower stall 2. No geometry, no pipes.
  'fixtures-duplex-cobie/Duplex-Handover.ifc': {
    fates: { fixture: 16, electrical: 97, heating: 16, duct: 2, equipment: 2 },
    fixtures: { 'water-closet': 4, lavatory: 6, 'kitchen-sink': 2, bathtub: 2, shower: 2 },
  },
  'fixture-geometry/basin-advanced-brep.ifc': { fates: { fixture: 1 }, fixtures: { lavatory: 1 } },
  'fixture-geometry/basin-faceted-brep.ifc': { fates: { fixture: 1 }, fixtures: { lavatory: 1 } },
  'fixture-geometry/basin-tessellation.ifc': { fates: { fixture: 1 }, fixtures: { lavatory: 1 } },
  'fixture-geometry/bath-csg-solid.ifc': { fates: { fixture: 1 }, fixtures: { bathtub: 1 } },
  // Grab bars, mirrors, dispensers: "sanitary" by type, and no drain among them.
  'fixtures-office/Office_A_20110811.ifc.gz': { fates: { accessory: 28, electrical: 3 } },
  'heating-full-ports/hvac_heating.ifc.gz': { fates: { heating: 220 } },
  'revit-ports-cyrillic/HVAC-Mech.ifc': { fates: { duct: 9 } },
  'ducts-open-ends/MEP.ifc': { fates: { duct: 8 } },
  'imperial-ports/air-terminal-element.ifc': { fates: { duct: 2 } },
  'imperial-ports/air-terminal-library-object.ifc': { fates: {} },
  'duplex-electrical-imperial/Duplex_Electrical_20121207.ifc': {
    fates: { electrical: 93, duct: 2, heating: 2, equipment: 2 },
  },
  'duplex-architecture/Duplex_A_20110907.ifc.gz': { fates: {} },
  // Single fittings of no said medium.
  'revit-pipe-fittings/elbow-ports-by-relation.ifc': { fates: { 'no drainage': 1 } },
  'revit-pipe-fittings/elbow-ports-nested.ifc': { fates: { 'no drainage': 1 } },
  'revit-pipe-fittings/tee-advanced-brep.ifc': { fates: { 'no drainage': 1 } },
  'port-edge-cases/ports-without-owner.ifc': { fates: {} },
  'port-edge-cases/cable-three-ports.ifc': { fates: { cable: 1 } },
};

const counted = (list: readonly string[]): Record<string, number> => {
  const counts: Record<string, number> = {};
  for (const one of list) counts[one] = (counts[one] ?? 0) + 1;
  return counts;
};

function seen({ model, identities, network, paths }: Outcome): Required<Expected> {
  const { fates } = network;
  return {
    fates: counted(fates.map(({ use, reason }) => (use === 'left-out' ? (reason ?? use) : use))),
    fixtures: counted(identities.flatMap(({ kind }, id) => (fates[id]!.use === 'fixture' ? [kind ?? 'unknown'] : []))),
    joints: counted(
      network.joints.map(({ pipes, elements, inferred }) => {
        const [element] = elements;
        const at = element === undefined ? '' : ` at ${identities[element]!.part}`;
        return `${pipes.length}${at}${inferred === null ? '' : ` ${inferred.how}`}`;
      }),
    ),
    islands: connectedPieces(network).length,
    sewerEnd: paths.systems
      .map(({ sewerEnd, how }) => {
        const { element } = network.pipes[network.joints[sewerEnd]!.pipes[0]!]!;
        return `${model.elements[element!]!.name} ${how}`;
      })
      .join(),
  };
}

if (shared === null) test.skip('models of other people: ../shared/models is not there', () => {});

describe.skipIf(shared === null)('networks of models by other people', () => {
  test('every model of the folder has its expected network', () => {
    expect(Object.keys(expected).sort()).toEqual(shared!.map(({ name }) => name));
  });

  test.each(Object.entries(expected))(
    '%s',
    (name, { fates, fixtures = {}, joints = {}, islands = 0, sewerEnd = '' }) => {
      const file = shared!.find((one) => one.name === name)!;
      const model = modelOf(
        openFiles([{ name, bytes: file.read() }], (bytes) => createHash('sha256').update(bytes).digest('hex')),
      );
      const found = seen(run(model, codeOf('npc-2020'), noAnswers, names));
      expect(found).toEqual({ fates, fixtures, joints, islands, sewerEnd });
    },
  );
});
