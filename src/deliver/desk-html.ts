import { deflateSync } from 'fflate';
import { offlineHtml, type PageBundle } from './offline-html.ts';

/** What the empty page carries: the worker's script, and what it checks models with. */
export interface DeskParts {
  /** Of the program: results and sized copies name it. */
  readonly version: string;
  /** Parsed JSON of every table file by its path in `tables/`. */
  readonly tables: Readonly<Record<string, unknown>>;
  /** By family, then edition. */
  readonly codes: readonly DeskCode[];
  /** Id of the code that is chosen at first. */
  readonly standard: string;
  /** The script of the worker in which models are read and sized. */
  readonly worker: string;
}

export interface DeskCode {
  readonly id: string;
  readonly title: string;
  readonly edition: string;
}

/** The empty page: a model that is dropped on it is checked in the browser, in a worker made from the file itself. */
export function deskHtml(parts: DeskParts, bundle: PageBundle): string {
  return offlineHtml({
    ...bundle,
    title: 'Drainwright',
    noScript:
      'This page checks models with a script of its own. Allow scripts for this file to use it; nothing is sent anywhere.',
    data: { id: 'desk-parts', bytes: deflateSync(new TextEncoder().encode(JSON.stringify(parts)), { level: 9 }) },
    allow: ['worker-src blob:'],
  });
}
