/** Rows of one kind as columns: for each key its distinct values, and for each row which of them (0: key absent). */
export interface PackedRows {
  readonly count: number;
  readonly keys: readonly { readonly key: string; readonly values: readonly unknown[]; readonly which: unknown }[];
}

/** Most values repeat (roles, storeys, trails), so each is written once; rows share it after unpacking. */
export function packRows(rows: readonly object[], column: (numbers: Int32Array) => unknown): PackedRows {
  const keys = [...new Set(rows.flatMap((row) => Object.keys(row)))];
  return {
    count: rows.length,
    keys: keys.map((key) => {
      const values: unknown[] = [];
      const known = new Map<unknown, number>();
      const which = Int32Array.from(rows, (row) => {
        const value: unknown = Object.getOwnPropertyDescriptor(row, key)?.value;
        if (value === undefined) return 0;
        // Objects are the same when they are written the same; the mark keeps them apart from texts.
        const name = typeof value === 'object' ? `{}${JSON.stringify(value)}` : value;
        const at = known.get(name) ?? values.push(value);
        known.set(name, at);
        return at;
      });
      return { key, values, which: column(which) };
    }),
  };
}

export function unpackRows<C, T>(packed: PackedRows, numbers: (column: C) => Int32Array): readonly T[] {
  const rows: Record<string, unknown>[] = Array.from({ length: packed.count }, () => ({}));
  for (const { key, values, which } of packed.keys) {
    const indices = numbers(which as C);
    for (let row = 0; row < packed.count; row++) {
      const at = indices[row]!;
      if (at > 0) rows[row]![key] = values[at - 1];
    }
  }
  return rows as T[];
}
