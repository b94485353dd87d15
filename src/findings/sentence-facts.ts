import type { Facts } from './finding.ts';

/** What a sentence is built from. Names and numbers come ready to print; `clause` carries its brackets or is empty. */
export interface SentenceFacts {
  readonly facts: Facts;
  /** Names of the elements the finding is about, the thing at fault first. */
  readonly about: readonly string[];
  readonly clause: string;
  readonly unit: string;
  length(metres: number): string;
  slope(value: number): string;
  number(value: number): string;
}

export const num = ({ facts }: SentenceFacts, key: string): number =>
  typeof facts[key] === 'number' ? (facts[key] as number) : 0;

export const has = ({ facts }: SentenceFacts, key: string): boolean => facts[key] !== undefined && facts[key] !== null;
