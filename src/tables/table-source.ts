/** Parsed JSON of the table files by relative path, such as `npc/branch.json`: from disk, or from a bundle in the page. */
export interface TableSource {
  read(path: string): unknown;
  /** Every path that `read` knows, in any order. */
  list(): readonly string[];
  /** What stands before the path when a fault is named; `tables` when absent. A local folder gives its own name. */
  readonly name?: string;
}

/** `tables/npc/branch.json`, as a person would look for it. */
export const placeOf = (source: TableSource, path: string): string => `${source.name ?? 'tables'}/${path}`;
