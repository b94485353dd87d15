import { InputError } from '../findings/input-error.ts';
import type { Settings } from '../model/answers.ts';
import { openCode } from '../tables/open-family.ts';
import type { PipeDimensions } from '../tables/pipe-dimensions.ts';
import { readWallRules } from '../tables/read-wall-rules.ts';
import type { TableSource } from '../tables/table-source.ts';
import type { NominalSize } from '../units/nominal-size.ts';
import { cleanoutRules } from './cleanouts.ts';
import { codeSettings } from './code-settings.ts';
import { en12056 } from './en12056/en12056.ts';
import { ipc } from './ipc/ipc.ts';
import { npc } from './npc/npc.ts';
import type { CodeRules, PlumbingCode } from './plumbing-code.ts';
import type { Tools } from './tools.ts';
import { upc } from './upc/upc.ts';

/** The rule module of each family; its tables stand in `tables/<family>/`. */
const modules: Readonly<Record<string, (tools: Tools) => CodeRules>> = { npc, ipc, upc, en12056 };

export interface CodeSources {
  readonly tables: TableSource;
  readonly dimensions: PipeDimensions;
  readonly local?: TableSource;
}

/** One code ready to size with. An unknown code is wrong usage; a setting that it does not know is refused with its place. */
export function plumbingCode(
  id: string,
  { tables, dimensions, local }: CodeSources,
  settings: Settings,
  where: string,
): PlumbingCode {
  const family = openCode(tables, id, local);
  const bind = modules[family.id];
  if (bind === undefined) {
    throw new InputError(`code ${id}`, `has tables but no rules yet; built are ${Object.keys(modules).join(', ')}`, {
      exit: 2,
    });
  }
  const chosen = codeSettings(family, settings, where);
  const omit = new Set((Array.isArray(chosen.omitSizes) ? chosen.omitSizes : []) as NominalSize[]);
  return {
    id: family.code,
    family: family.id,
    title: family.title,
    edition: family.edition,
    unit: family.unit,
    series: family.series,
    dimensions,
    walls: readWallRules(tables, family.id, dimensions),
    cleanouts: cleanoutRules(family),
    omitSizes: omit,
    settings: chosen,
    localTables: family.localTables,
    unchecked: [...family.rules.values()].flatMap(({ unchecked }) => unchecked ?? []),
    ruleTitle: (rule) => family.rules.get(rule.replace(/^([A-Z]+-R\d+).*$/, '$1'))?.title ?? rule,
    ...bind({ family, omit, settings: chosen }),
  };
}
