import type { Html } from './html-element.ts';

export interface Section {
  /** Of the link in the list of contents. */
  readonly id: string;
  readonly title: string;
  readonly parts: readonly (Html | null)[];
}
