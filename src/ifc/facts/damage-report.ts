import { type Finding, type Facts as FindingFacts, finding } from '../../findings/finding.ts';
import { lineNumber, startOf } from '../lines/line-index.ts';
import type { Facts } from './read-facts.ts';
import type { Source } from './source.ts';

/** Places named in one finding. */
const listed = 10;

/** Findings on damaged records and texts of one file: one for each kind of damage, with how often and where first. */
export function damageFindings({ index, reader }: Source, file: string): Finding[] {
  const { damage, bytes, ids } = index;
  const { troubles, watch } = reader;
  const found: Finding[] = [];
  const damaged = (problem: string, offsets: readonly number[], more: FindingFacts = {}): void => {
    if (offsets.length === 0) return;
    const line = lineNumber(bytes, offsets[0]!);
    found.push(finding('file-damaged', [], { file, problem, count: offsets.length, line, ...more }));
  };
  const at = (record: number): number => startOf(index, record);
  const hashes = (stepIds: readonly number[]): readonly string[] => stepIds.slice(0, listed).map((id) => `#${id}`);

  if (damage.cutOff !== null) damaged('cut-off', [damage.cutOff.offset], { where: damage.cutOff.where });
  damaged('merged-lines', damage.merged);
  damaged('open-text', damage.openStrings);
  damaged('line-in-text', damage.oddStrings);
  damaged('unreadable', damage.unreadable);
  damaged('id-too-large', damage.idsTooLarge);
  const doubled = damage.doubledIds;
  damaged(
    'doubled-id',
    doubled.map((id) => at(index.find(id))),
    { ids: hashes(doubled) },
  );
  const { dangling, endlessPlacements, endlessShapes } = troubles;
  damaged(
    'dangling-reference',
    dangling.map(({ record }) => at(record)),
    { ids: hashes(dangling.map(({ id }) => id)) },
  );
  damaged('endless-placement', endlessPlacements.map(at), {
    ids: hashes(endlessPlacements.map((record) => ids[record]!)),
  });
  damaged('endless-shape', endlessShapes.map(at), { ids: hashes(endlessShapes.map((record) => ids[record]!)) });
  if (watch.tooDeep > 0) damaged('brackets-too-deep', [watch.firstTooDeep], { count: watch.tooDeep });
  const first = (): number => lineNumber(bytes, watch.first);
  if (watch.brokenEscapes > 0) {
    found.push(
      finding('text-damaged', [], { file, problem: 'broken-escape', count: watch.brokenEscapes, line: first() }),
    );
  }
  if (watch.notUtf8 > 0) {
    found.push(finding('text-damaged', [], { file, problem: 'not-utf8', count: watch.notUtf8, line: first() }));
  }
  return found;
}

const schemas = new Set(['IFC2X3', 'IFC4', 'IFC4X3', 'IFC4X3_ADD1', 'IFC4X3_ADD2']);
/** A pipe thinner or wider than this, in metres, is drawn in another unit than the file says. */
const thinnestPipe = 0.006;
const widestPipe = 20;

/** Plain sentences on what concerns the file as a whole. */
export function damageRemarks({ index, units, reader }: Source, { elements }: Facts): string[] {
  const { damage, schemas: named } = index;
  const remarks: string[] = [];
  if (damage.cutOff !== null) {
    remarks.push(`The file is cut off ${damage.cutOff.where}: what comes after is missing, and results may be wrong.`);
  }
  const [schema = ''] = named;
  if (!schemas.has(schema.toUpperCase())) {
    const family = /^IFC2X/i.test(schema) ? 'IFC2X3' : /^IFC4X/i.test(schema) ? 'IFC4X3' : 'IFC4';
    const what = /_RC\d|^IFC4X[12]/i.test(schema) ? 'a pre-release schema' : 'no schema of its own standing';
    remarks.push(`${schema} is ${what}: it is read as ${family}.`);
  }
  if (!units.length.isStated) remarks.push('The file states no length unit: its lengths are taken as metres.');
  const diameters = elements.flatMap(({ centreLine }) => centreLine?.outerDiameter ?? []).sort((a, b) => a - b);
  const median = diameters[Math.floor(diameters.length / 2)];
  if (median !== undefined && (median < thinnestPipe || median > widestPipe)) {
    const size = median < 1 ? `${Number((median * 1000).toPrecision(3))} mm` : `${Number(median.toPrecision(3))} m`;
    remarks.push(`Pipes are ${size} wide as the file states its unit (${units.length.name}): the unit looks wrong.`);
  }
  if (reader.watch.notUtf8 > 0)
    remarks.push('Some texts are not UTF-8, as the standard asks: they are read as Windows-1252.');
  if (damage.outsideData > 0)
    remarks.push(`${damage.outsideData} instances stand outside the data section; they are read all the same.`);
  return remarks;
}
