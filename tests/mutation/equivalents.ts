/** Mutants that change nothing that anyone could see, and why. */
export const equivalents: readonly { readonly why: string; readonly keys: readonly string[] }[] = [];
