import type { SentenceFacts } from '../../findings/sentence-facts.ts';

/** What a French sentence is built from: besides numbers also roles and kinds by their French names. */
export interface FrenchFacts extends SentenceFacts {
  role(id: unknown): string;
  kind(id: unknown): string;
  /** Sizes as `4 po`. */
  size(text: string): string;
}

export const text = (given: FrenchFacts, key: string): string => {
  const value = given.facts[key];
  return value === null || value === undefined ? '?' : given.size(String(value));
};
