import { InputError } from '../findings/input-error.ts';
import type { DimensionSeries, PipeDimensions } from './pipe-dimensions.ts';
import { show } from './printed-value.ts';
import { at, fieldsOf, listAt, numberAt, oneOf, textAt, textsAt } from './read-json.ts';
import { trustWords } from './read-table.ts';
import { placeOf, type TableSource } from './table-source.ts';
import type { HoleRule, HoleRules, LayerKind, Stud, WallRules } from './wall-rules.ts';

const path = 'shared/walls.json';

/** `tables/shared/walls.json` as it holds for one family of plumbing codes. */
export function readWallRules(source: TableSource, family: string, dimensions: PipeDimensions): WallRules {
  const where = placeOf(source, path);
  const keys = ['studs', 'spacing', 'clearance', 'lining', 'holes', 'layers', 'materials'];
  const file = fieldsOf(source.read(path), where, keys, ['note']);
  return {
    studs: readStuds(file.studs, at(where, 'studs')),
    spacingMm: lengthAt(file.spacing, at(where, 'spacing')),
    clearanceMm: lengthAt(file.clearance, at(where, 'clearance')),
    liningMm: lengthAt(file.lining, at(where, 'lining')),
    holes: readHoles(file.holes, at(where, 'holes'), family),
    layerOf: readLayers(file.layers, at(where, 'layers')),
    pipeOf: readMaterials(file.materials, at(where, 'materials'), family, dimensions),
  };
}

function lengthAt(value: unknown, where: string): number {
  const fields = fieldsOf(value, where, ['source', 'trust', 'mm']);
  return positive(fields.mm, at(where, 'mm'));
}

function positive(value: unknown, where: string): number {
  const number = numberAt(value, where);
  if (number <= 0) throw new InputError(where, `is ${number}, expected a length above 0`);
  return number;
}

function readStuds(value: unknown, where: string): readonly Stud[] {
  const fields = fieldsOf(value, where, ['source', 'trust', 'rows']);
  let last = 0;
  return listAt(fields.rows, at(where, 'rows')).map((entry, index): Stud => {
    const spot = `${where}.rows[${index}]`;
    const row = fieldsOf(entry, spot, ['name', 'face', 'depth']);
    const depthMm = positive(row.depth, at(spot, 'depth'));
    if (depthMm <= last) throw new InputError(at(spot, 'depth'), 'depths do not rise');
    last = depthMm;
    return { name: textAt(row.name, at(spot, 'name')), faceMm: positive(row.face, at(spot, 'face')), depthMm };
  });
}

function readHoles(value: unknown, where: string, family: string): HoleRules | null {
  const sets = listAt(value, where).map((entry, index) => {
    const spot = `${where}[${index}]`;
    const fields = fieldsOf(entry, spot, ['families', 'document', 'stud', 'plate', 'note']);
    return {
      families: textsAt(fields.families, at(spot, 'families')),
      document: textAt(fields.document, at(spot, 'document')),
      stud: readHole(fields.stud, at(spot, 'stud')),
      plate: readHole(fields.plate, at(spot, 'plate')),
      note: textAt(fields.note, at(spot, 'note')),
    };
  });
  const found = sets.find(({ families }) => families.includes(family));
  if (found === undefined) return null;
  const { document, stud, plate, note } = found;
  return { document, stud, plate, note };
}

function readHole(value: unknown, where: string): HoleRule {
  const kept = ['loadbearingKeepsShare', 'loadbearingKeepsMm', 'otherKeepsShare', 'otherKeepsMm', 'edgesMm'];
  const fields = fieldsOf(value, where, ['clause', 'trust', 'source'], kept);
  const number = (key: string): number | null =>
    fields[key] === undefined ? null : numberAt(fields[key], at(where, key));
  const bearing = { share: number('loadbearingKeepsShare'), mm: number('loadbearingKeepsMm') };
  const other = { share: number('otherKeepsShare'), mm: number('otherKeepsMm') };
  const edges = number('edgesMm');
  return {
    clause: textAt(fields.clause, at(where, 'clause')),
    trust: oneOf(fields.trust, at(where, 'trust'), trustWords),
    mostMm: (depth, loadbearing) => {
      const { share, mm } = loadbearing ? bearing : other;
      const kept = Math.max(share === null ? 0 : depth * share, mm ?? 0, edges === null ? 0 : 2 * edges);
      return share === null && mm === null ? Number.POSITIVE_INFINITY : depth - kept;
    },
  };
}

const layerKinds: readonly LayerKind[] = ['steel', 'solid', 'framing', 'air'];

/** Steel before framing: `metal stud` is both. Whole words or beginnings of words, upper and lower case alike. */
function readLayers(value: unknown, where: string): WallRules['layerOf'] {
  const fields = fieldsOf(value, where, ['source', ...layerKinds]);
  const words = layerKinds.map((kind) => ({ kind, words: textsAt(fields[kind], at(where, kind)) }));
  return (name) => words.find((one) => one.words.some((word) => holdsWord(name, word)))?.kind ?? null;
}

function readMaterials(value: unknown, where: string, family: string, dimensions: PipeDimensions): WallRules['pipeOf'] {
  const regions = ['north-america', 'europe'] as const;
  const fields = fieldsOf(value, where, ['source', 'usual', 'europe', 'words']);
  const region = textsAt(fields.europe, at(where, 'europe')).includes(family) ? 'europe' : 'north-america';
  const named = (id: unknown, place: string): DimensionSeries => {
    const found = dimensions.find((series) => series.id === id);
    if (found === undefined) throw new InputError(place, `is ${show(id)}, which is no series of pipe dimensions`);
    return found;
  };
  const usual = named(fieldsOf(fields.usual, at(where, 'usual'), regions)[region], at(where, `usual.${region}`));
  const known = listAt(fields.words, at(where, 'words')).map((entry, index) => {
    const spot = `${where}.words[${index}]`;
    const row = fieldsOf(entry, spot, ['region', 'series', 'words']);
    return {
      region: oneOf(row.region, at(spot, 'region'), regions),
      series: named(row.series, at(spot, 'series')),
      words: textsAt(row.words, at(spot, 'words')),
    };
  });
  const here = known.filter((one) => one.region === region);
  return (material) => {
    const found =
      material === null ? undefined : here.find(({ words }) => words.some((word) => holdsWord(material, word)));
    return found === undefined ? { series: usual, assumed: true } : { series: found.series, assumed: false };
  };
}

/** The word stands in the text, not as the end of another word: `ht` is in `HT pipe` and not in `light`. */
function holdsWord(text: string, word: string): boolean {
  const low = text.toLowerCase();
  for (let found = low.indexOf(word); found >= 0; found = low.indexOf(word, found + 1)) {
    if (found === 0 || !/[\p{L}\p{N}]/u.test(low[found - 1]!)) return true;
  }
  return false;
}
