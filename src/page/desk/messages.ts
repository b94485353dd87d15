import type { DeskParts } from '../../deliver/desk-html.ts';
import type { PageData } from '../../deliver/page-data.ts';
import type { ModelInput } from '../../ifc/open.ts';

/** What the page asks of the worker. Each `check`, `code` and `save` gets one answer; `begin` comes first and gets none. */
export type DeskAsk =
  | { readonly ask: 'begin'; readonly parts: DeskParts }
  /** Reads the files as one building and checks it. */
  | { readonly ask: 'check'; readonly inputs: readonly ModelInput[]; readonly code: string; readonly own: DeskOwn }
  /** Checks the building that was read last by another code, or with other answers or tables. */
  | { readonly ask: 'code'; readonly code: string; readonly own: DeskOwn }
  /** The last check with some changes, one after the other; with none, as it is. What is saved stays the check itself. */
  | { readonly ask: 'what-if'; readonly edits: readonly DeskEdit[] }
  /** The last check with the least change that mends it. */
  | { readonly ask: 'mend' }
  | { readonly ask: 'save'; readonly what: SaveKind };

/** What is changed, by GlobalId, and to what in the words of `explain --if`: `size 4 in`, `kind urinal`. */
export interface DeskEdit {
  readonly about: string;
  readonly words: string;
}

/** What the reader of the page gives beside the model. */
export interface DeskOwn {
  /** The text of an answers file. */
  readonly answers: { readonly name: string; readonly text: string } | null;
  readonly tables: OwnTables | null;
}

/** A folder of local tables, laid over those of the page: texts by path, such as `npc/branch.json`. */
export interface OwnTables {
  readonly name: string;
  readonly files: readonly (readonly [path: string, text: string])[];
}

export type SaveKind = 'ifc' | 'bcf' | 'csv' | 'html' | 'json' | 'answers';

/** Steps of a check, in the order in which they come. */
export const stages = ['unpacking', 'reading', 'sizing', 'drawing'] as const;
export type Stage = (typeof stages)[number];

export type DeskAnswer =
  | { readonly say: 'stage'; readonly stage: Stage }
  | { readonly say: 'page'; readonly data: PageData }
  | { readonly say: 'file'; readonly name: string; readonly bytes: Uint8Array }
  /** `fault`: ours, not the file's; the message then holds what to report. */
  | { readonly say: 'refused'; readonly message: string; readonly fault: boolean };
