/** Record by STEP id, the last one where an id stands more than once. */
export interface ById {
  /** -1 when no record has the id. */
  readonly find: (id: number) => number;
  /** Records that a later one with the same id replaces, in the order they were found out. */
  readonly doubled: readonly number[];
}

/** Ids of nearly all models fill their range well: one table then. Scattered ids take a table of hashes. */
export function findByLastId(ids: Uint32Array, maxId: number): ById {
  return maxId <= ids.length * 8 + 4096 ? denseTable(ids, maxId) : hashTable(ids);
}

function denseTable(ids: Uint32Array, maxId: number): ById {
  const recordPlusOne = new Uint32Array(maxId + 1);
  const doubled: number[] = [];
  for (let record = 0; record < ids.length; record++) {
    const id = ids[record] as number;
    const before = recordPlusOne[id] as number;
    if (before !== 0) doubled.push(before - 1);
    recordPlusOne[id] = record + 1;
  }
  return { find: (id) => (id <= maxId ? (recordPlusOne[id] as number) - 1 : -1), doubled };
}

function hashTable(ids: Uint32Array): ById {
  const bits = Math.max(4, 33 - Math.clz32(ids.length));
  const mask = 2 ** bits - 1;
  const recordPlusOne = new Uint32Array(2 ** bits);
  const doubled: number[] = [];
  const slotOf = (id: number): number => {
    let slot = Math.imul(id, 0x9e3779b1) >>> (32 - bits);
    for (;;) {
      const record = recordPlusOne[slot] as number;
      if (record === 0 || ids[record - 1] === id) return slot;
      slot = (slot + 1) & mask;
    }
  };
  for (let record = 0; record < ids.length; record++) {
    const slot = slotOf(ids[record] as number);
    const before = recordPlusOne[slot] as number;
    if (before !== 0) doubled.push(before - 1);
    recordPlusOne[slot] = record + 1;
  }
  return { find: (id) => (recordPlusOne[slotOf(id)] as number) - 1, doubled };
}
