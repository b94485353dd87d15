/** The user handed us something unusable. Thrown at the edges; the command line prints it without a stack. */
export class InputError extends Error {
  /** Where a person would look for the fault: `tables/npc/branch.json: rows[3].maxLoad`, `hall.ifc: #1204`. */
  readonly where: string;
  /** Exit code 2 (wrong usage) or 3 (a file that cannot be used). */
  readonly exit: 2 | 3;

  constructor(where: string, problem: string, options?: ErrorOptions & { readonly exit?: 2 | 3 }) {
    super(`${where}: ${problem}`, options);
    this.name = 'InputError';
    this.where = where;
    this.exit = options?.exit ?? 3;
  }
}
