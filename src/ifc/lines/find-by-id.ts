/** Record by STEP id, the last one where an id stands more than once. */
export class ById {
  /** Records that a later one with the same id replaces, in the order they were found out. */
  readonly doubled: readonly number[];
  private readonly ids: Uint32Array;
  /** Record + 1 by id where ids fill their range well, else by hash; 0 for none. */
  private readonly table: Uint32Array;
  /** 0 where the table goes by id. */
  private readonly bits: number;

  constructor(ids: Uint32Array, maxId: number) {
    this.ids = ids;
    const isDense = maxId <= ids.length * 8 + 4096;
    this.bits = isDense ? 0 : Math.max(4, 33 - Math.clz32(ids.length));
    this.table = new Uint32Array(isDense ? maxId + 1 : 2 ** this.bits);
    const doubled: number[] = [];
    for (let record = 0; record < ids.length; record++) {
      const id = ids[record]!;
      const slot = isDense ? id : this.slotOf(id);
      const before = this.table[slot]!;
      if (before !== 0) doubled.push(before - 1);
      this.table[slot] = record + 1;
    }
    this.doubled = doubled;
  }

  /** -1 when no record has the id. */
  find(id: number): number {
    if (this.bits !== 0) return this.table[this.slotOf(id)]! - 1;
    return id < this.table.length ? this.table[id]! - 1 : -1;
  }

  /** Where the id stands, or would: the first free slot from its hash on. */
  private slotOf(id: number): number {
    const { ids, table, bits } = this;
    let slot = Math.imul(id, 0x9e3779b1) >>> (32 - bits);
    for (;;) {
      const record = table[slot]!;
      if (record === 0 || ids[record - 1] === id) return slot;
      slot = (slot + 1) & (table.length - 1);
    }
  }
}
