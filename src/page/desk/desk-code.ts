import { plumbingCode } from '../../codes/index.ts';
import type { PlumbingCode } from '../../codes/plumbing-code.ts';
import type { DeskParts } from '../../deliver/desk-html.ts';
import { InputError } from '../../findings/input-error.ts';
import { type Answers, noAnswers } from '../../model/answers.ts';
import { readAnswers } from '../../model/read-answers.ts';
import { jsonOf } from '../../tables/read-json.ts';
import { readPipeDimensions } from '../../tables/read-pipe-dimensions.ts';
import type { TableSource } from '../../tables/table-source.ts';
import type { DeskOwn, OwnTables } from './messages.ts';

/** A plumbing code ready to size with, and what the reader of the page knows beside the model. */
export interface DeskCode {
  readonly code: PlumbingCode;
  readonly answers: Answers;
  /** What messages about the answers call them. */
  readonly answersName: string;
  readonly tables: TableSource;
  /** Another code with the same tables and settings. */
  other(id: string): PlumbingCode;
}

/** As the command line makes it of `--code`, `--answers` and `--tables`. Throws an InputError for what is wrong in them. */
export function deskCode(id: string, own: DeskOwn, parts: DeskParts): DeskCode {
  const answersName = own.answers?.name ?? 'answers';
  const answers = own.answers === null ? noAnswers : readAnswers(own.answers.text, own.answers.name);
  const tables = tablesOf(parts);
  const sources = {
    tables,
    dimensions: readPipeDimensions(tables),
    ...(own.tables === null ? {} : { local: localTables(own.tables) }),
  };
  const other = (code: string): PlumbingCode => plumbingCode(code, sources, answers.settings, answersName);
  return { code: other(id), answers, answersName, tables, other };
}

function tablesOf({ tables }: DeskParts): TableSource {
  const paths = Object.keys(tables).sort();
  return {
    list: () => paths,
    read(path) {
      if (!Object.hasOwn(tables, path)) throw new Error(`the page holds no table ${path}`);
      return tables[path];
    },
  };
}

function localTables({ name, files }: OwnTables): TableSource {
  const texts = new Map(files);
  const paths = [...texts.keys()].sort();
  if (paths.length === 0) throw new InputError(name, 'holds no table files; expected such as npc/branch.json');
  return {
    name,
    list: () => paths,
    read: (path) => jsonOf(texts.get(path) ?? '', `${name}/${path}`),
  };
}
