import { extractPropertiesOnDemand, IfcParser } from '@ifc-lite/parser';
import { beforeAll, describe, expect, test, vi } from 'vitest';
import { IFCRELDEFINESBYPROPERTIES, IfcAPI, LogLevel } from 'web-ifc';
import { indexLines } from '../../../src/ifc/lines/index-lines.ts';
import type { LineIndex } from '../../../src/ifc/lines/line-index.ts';
import { appendSets } from '../../../src/ifc/write/append-sets.ts';
import type { PropertySetToWrite } from '../../../src/model/property-set.ts';
import { type ModelFile, sampleModels, sharedModels } from '../../support/real-models.ts';
import { bytesOf, sha256, smallIfc } from '../../support/small-ifc.ts';

// What we write is read again by two readers that are not ours: web-ifc and @ifc-lite/parser.
const api = new IfcAPI();
beforeAll(async () => {
  await api.Init(undefined, true);
  api.SetLogLevel(LogLevel.LOG_LEVEL_OFF);
  // The second reader tells its stages on the console.
  for (const level of ['log', 'warn'] as const) vi.spyOn(console, level).mockImplementation(() => undefined);
});

/** Terminals, segments, fittings and the like of any schema: what a property set of ours may stand on. */
const carriers =
  /^IFC(?:FLOW|PIPE|DUCT|CABLECARRIER|SANITARY|WASTE|STACK|DISTRIBUTIONCHAMBER|DISTRIBUTIONFLOW|AIR|VALVE|BUILDINGELEMENTPROXY)\w*$/;
const setsFor = (index: LineIndex): PropertySetToWrite[] => {
  const types = index.types.filter((type) => carriers.test(type) && !type.endsWith('TYPE'));
  const ids = types.flatMap((type) => [...index.recordsOf(type)].map((record) => index.ids[record] ?? 0));
  return ids
    .sort((a, b) => a - b)
    .map((id) => ({
      name: 'Drainwright_Pipe',
      on: id,
      properties: [
        { name: 'Role', value: { as: 'label', value: `wet vent of #${id}, 1½ in` } },
        { name: 'Load', value: { as: 'real', value: id / 2 } },
        { name: 'Undersized', value: { as: 'integer', value: id } },
        { name: 'RequiredNominalDiameter', value: { as: 'positive-length', value: 0.1 } },
      ],
    }));
};

const small: ModelFile[] = (['IFC2X3', 'IFC4', 'IFC4X3_ADD2'] as const).flatMap((schema) =>
  [true, false].map((owner) => ({
    name: `small ${schema} with${owner ? '' : 'out'} owner`,
    path: '',
    read: () => bytesOf(smallIfc({ schema, owner })),
  })),
);
const shared = sharedModels();
const models = [...small, ...sampleModels(), ...(shared ?? [])];

const missing = shared === null ? ', without the shared ones: their folder is not here' : '';
describe(`${models.length} models${missing}`, () => {
  const written: string[] = [];
  for (const model of models) {
    test(model.name, async () => {
      const bytes = model.read();
      const index = indexLines(bytes);
      const sets = setsFor(index);
      const pieces = appendSets(index, sets, { name: model.name, digest: sha256, version: '1.2.3' });
      const out = new Uint8Array(Buffer.concat(pieces));
      const kept = [pieces[0], pieces.at(-1)].map((piece) => piece?.length ?? 0);
      expect(Buffer.concat([out.subarray(0, kept[0]), out.subarray(out.length - (kept[1] ?? 0))]).equals(bytes)).toBe(
        true,
      );
      const again = appendSets(indexLines(out), sets, { name: model.name, digest: sha256, version: '1.2.3' });
      expect(Buffer.concat(again).equals(out)).toBe(true);

      const expected = sets.map(({ on }) => [on, [`wet vent of #${on}, 1½ in`, Number(on) / 2, Number(on), 0.1]]);
      expect(readByWebIfc(out)).toEqual(expected);
      expect(await readByIfcLite(out, sets)).toEqual(expected);
      if (sets.length > 0) written.push(model.name);
    });
  }

  test('most models had something to write on', () => {
    expect(written.length).toBeGreaterThanOrEqual(shared === null ? 6 : 25);
  });
});

const byElement = (a: readonly unknown[], b: readonly unknown[]): number => Number(a[0]) - Number(b[0]);

function readByWebIfc(bytes: Uint8Array): unknown[] {
  const model = api.OpenModel(bytes);
  expect(model).toBeGreaterThanOrEqual(0);
  try {
    const found: unknown[] = [];
    const relations = api.GetLineIDsWithType(model, IFCRELDEFINESBYPROPERTIES);
    for (let at = 0; at < relations.size(); at++) {
      const relation = api.GetLine(model, relations.get(at));
      const set = api.GetLine(model, relation.RelatingPropertyDefinition.value);
      if (set?.Name?.value !== 'Drainwright_Pipe') continue;
      const values = set.HasProperties.map(
        ({ value }: { value: number }) => api.GetLine(model, value).NominalValue.value,
      );
      found.push([relation.RelatedObjects[0].value, values]);
    }
    return found.sort((a, b) => byElement(a as unknown[], b as unknown[]));
  } finally {
    api.CloseModel(model);
  }
}

async function readByIfcLite(bytes: Uint8Array, sets: readonly PropertySetToWrite[]): Promise<unknown[]> {
  const store = await new IfcParser().parseColumnar(bytes.slice().buffer);
  return sets.map(({ on }) => {
    const set = extractPropertiesOnDemand(store, Number(on)).find(({ name }) => name === 'Drainwright_Pipe');
    return [on, set?.properties.map(({ value }) => value)];
  });
}
