import type { DeskParts } from '../../deliver/desk-html.ts';
import type { PageData } from '../../deliver/page-data.ts';
import type { ModelInput } from '../../ifc/open.ts';

/** What the page asks of the worker. Each `check`, `code` and `save` gets one answer; `begin` comes first and gets none. */
export type DeskAsk =
  | { readonly ask: 'begin'; readonly parts: DeskParts }
  /** Reads the files as one building and checks it. */
  | { readonly ask: 'check'; readonly inputs: readonly ModelInput[]; readonly code: string }
  /** Checks the building that was read last by another code. */
  | { readonly ask: 'code'; readonly code: string }
  | { readonly ask: 'save'; readonly what: SaveKind };

export type SaveKind = 'ifc' | 'csv' | 'json';

/** Steps of a check, in the order in which they come. */
export const stages = ['unpacking', 'reading', 'sizing', 'drawing'] as const;
export type Stage = (typeof stages)[number];

export type DeskAnswer =
  | { readonly say: 'stage'; readonly stage: Stage }
  | { readonly say: 'page'; readonly data: PageData }
  | { readonly say: 'file'; readonly name: string; readonly bytes: Uint8Array }
  /** `fault`: ours, not the file's; the message then holds what to report. */
  | { readonly say: 'refused'; readonly message: string; readonly fault: boolean };
