import { InputError } from '../findings/input-error.ts';
import type { NominalSize, SizeSeries } from '../units/nominal-size.ts';
import { type CodeFile, readCodeFile } from './code-file.ts';
import type { Dimension } from './column-unit.ts';
import { type Overlay, overList, overTable, readOverlay } from './edition-overlay.ts';
import { type FixtureKinds, readKinds } from './fixture-kinds.ts';
import { type LoneNumbers, readNumbers } from './numbers.ts';
import { show } from './printed-value.ts';
import { readTable } from './read-table.ts';
import { type RuleEntry, readRules } from './rule-list.ts';
import { readSettings, type SettingEntry } from './settings-file.ts';
import type { Cell, Table } from './table.ts';
import { placeOf, type TableSource } from './table-source.ts';
import { readVerifyList, type VerifyEntry } from './verify-list.ts';

/** One edition of a family of codes, read and checked whole: what its rules are made from. */
export interface Family {
  readonly id: string;
  readonly edition: string;
  /** `npc-2020`. */
  readonly code: string;
  readonly title: string;
  readonly unit: string;
  readonly unitShort: string;
  readonly series: SizeSeries;
  /** In the order of the book. */
  readonly tables: readonly Table[];
  readonly numbers: LoneNumbers;
  readonly rules: ReadonlyMap<string, RuleEntry>;
  readonly settings: readonly SettingEntry[];
  readonly kinds: FixtureKinds;
  /** What to look at first with the printed code, most doubtful first. */
  readonly verify: readonly VerifyEntry[];
  readonly words: Readonly<Record<string, string>>;
  /** What the user laid over ours, as `npc/branch.json`; empty when nothing. In the order of the book. */
  readonly localTables: readonly string[];
  /** A table the family has not is our own fault and throws. */
  table(id: string): Table;
  number(id: string, dimension: Dimension): Cell<number>;
  size(id: string): Cell<NominalSize>;
  rule(id: string): RuleEntry;
}

/** `npc-2020` and the like; an unknown one is wrong usage and names those that exist. */
export function openCode(source: TableSource, code: string, local?: TableSource): Family {
  const dash = code.lastIndexOf('-');
  return openFamily(source, code.slice(0, Math.max(dash, 0)), code.slice(dash + 1), local);
}

export function openFamily(source: TableSource, family: string, edition: string, local?: TableSource): Family {
  const codePath = `${family}/code.json`;
  const known = familiesOf(source);
  if (!known.includes(family)) throw unknownCode(source, `${family}-${edition}`);
  const code = readCodeFile(source.read(codePath), placeOf(source, codePath));
  if (!code.editions.includes(edition)) throw unknownCode(source, `${family}-${edition}`);
  const series = code.series;
  const overlays = overlaysFor(source, code, edition, local);
  const laid = new Set<string>();
  const laidOver = (path: string): Laid => {
    const own = local?.list().includes(path) === true;
    if (own) laid.add(path);
    const from = own && local !== undefined ? local : source;
    return { json: from.read(path), where: placeOf(from, path), local: own };
  };
  const tables = code.tables.map((id) =>
    openTable(laidOver(`${family}/${id}.json`), id, series, overlays, source, family),
  );
  const listOf = (list: 'numbers' | 'rules', path: string): { readonly json: unknown; readonly where: string } => {
    const { json, where } = laidOver(path);
    return { json: overlays.reduce((file: unknown, overlay) => overList(file, list, where, overlay), json), where };
  };
  const limits = listOf('numbers', `${family}/limits.json`);
  const numbers = readNumbers(limits.json, 'limits', limits.where, series);
  const ruleFile = listOf('rules', `${family}/rules.json`);
  const rules = readRules(ruleFile.json, ruleFile.where);
  const settings = readSettings(source.read(`${family}/settings.json`), placeOf(source, `${family}/settings.json`));
  const kinds = readKinds(source.read(`${family}/kinds.json`), placeOf(source, `${family}/kinds.json`), tables, series);
  const verify = readVerifyList(
    source.read(`${family}/verify.json`),
    placeOf(source, `${family}/verify.json`),
    edition,
    {
      tables,
      rules: new Set(rules.keys()),
      numbers: new Set(numbers.all.map(({ id }) => id)),
    },
  );
  const overlayPath = `${family}/editions/${edition}.json`;
  if (local?.list().includes(overlayPath)) laid.add(overlayPath);
  refuseStrangers(local, family, code, laid);
  const words = Object.assign({}, code.words, ...overlays.map((overlay) => overlay.words)) as Record<string, string>;
  return {
    id: family,
    edition,
    code: `${family}-${edition}`,
    title: code.title,
    unit: code.unit,
    unitShort: code.unitShort,
    series,
    tables,
    numbers,
    rules,
    settings,
    kinds,
    verify,
    words,
    localTables: [...laid],
    table: (id) => {
      const found = tables.find((table) => table.id === id || table.id === `${id} (local)`);
      if (found === undefined) throw new Error(`${family}-${edition} has no table ${id}`);
      return found;
    },
    number: numbers.number,
    size: numbers.size,
    rule: (id) => {
      const found = rules.get(id);
      if (found === undefined) throw new Error(`${family}-${edition} has no rule ${id}`);
      return found;
    },
  };
}

/** Families with a `code.json`, by name. */
export const familiesOf = (source: TableSource): readonly string[] =>
  source
    .list()
    .flatMap((path) => /^([^/]+)\/code\.json$/.exec(path)?.[1] ?? [])
    .sort();

/** Every code that can be opened, by family and then edition. */
export const codesOf = (source: TableSource): readonly string[] =>
  familiesOf(source).flatMap((family) => {
    const path = `${family}/code.json`;
    return readCodeFile(source.read(path), placeOf(source, path)).editions.map((edition) => `${family}-${edition}`);
  });

interface Laid {
  readonly json: unknown;
  readonly where: string;
  readonly local: boolean;
}

function openTable(
  laid: Laid,
  id: string,
  series: SizeSeries,
  overlays: readonly Overlay[],
  source: TableSource,
  family: string,
): Table {
  if (!laid.local) {
    const over = overlays.filter(({ tables }) => tables[id] !== undefined);
    const json = overlays.reduce(
      (file: unknown, overlay) => overTable(file, id, laid.where, series, overlay),
      laid.json,
    );
    const where = [...over.map((overlay) => overlay.where).reverse(), laid.where].join(' over ');
    return readTable(json, over.some(({ local }) => local) ? `${id} (local)` : id, where, series);
  }
  const table = readTable(laid.json, `${id} (local)`, laid.where, series);
  const ours = readTable(source.read(`${family}/${id}.json`), id, placeOf(source, `${family}/${id}.json`), series);
  for (const column of ours.columns) {
    const same = table.columns.find((one) => one.id === column.id);
    if (same?.dimension !== column.dimension)
      throw new InputError(
        `${laid.where}: columns.${column.id}`,
        `expected a ${column.dimension}, as in our own table`,
      );
  }
  return table;
}

function overlaysFor(source: TableSource, code: CodeFile, edition: string, local?: TableSource): readonly Overlay[] {
  const path = `${code.family}/editions/${edition}.json`;
  const from = (where: TableSource, isLocal: boolean): Overlay[] =>
    where.list().includes(path) ? [readOverlay(where.read(path), placeOf(where, path), isLocal)] : [];
  const ours = edition === code.base ? [] : from(source, false);
  if (edition !== code.base && ours.length === 0)
    throw new InputError(placeOf(source, path), 'missing: the edition is listed in code.json but says nothing');
  return [...ours, ...(local === undefined ? [] : from(local, true))].map((overlay) => {
    if (overlay.edition !== edition)
      throw new InputError(`${overlay.where}: edition`, `is ${show(overlay.edition)}, expected ${show(edition)}`);
    for (const id of Object.keys(overlay.tables))
      if (!code.tables.includes(id))
        throw new InputError(
          `${overlay.where}: tables.${id}`,
          `is no table of ${code.family}: ${code.tables.join(', ')}`,
        );
    return overlay;
  });
}

/** A file that nobody reads would leave the user believing that it counts. */
function refuseStrangers(
  local: TableSource | undefined,
  family: string,
  code: CodeFile,
  laid: ReadonlySet<string>,
): void {
  if (local === undefined) return;
  const editions = code.editions.map((edition) => `${family}/editions/${edition}.json`);
  for (const path of local.list())
    if (path.startsWith(`${family}/`) && !laid.has(path) && !editions.includes(path))
      throw new InputError(
        placeOf(local, path),
        `is no table of ${family} that can be laid over; expected ${code.tables.join(', ')}, limits or rules`,
      );
}

const unknownCode = (source: TableSource, code: string): InputError =>
  new InputError(`code ${code}`, `is not known; expected one of ${codesOf(source).join(', ')}`, { exit: 2 });
