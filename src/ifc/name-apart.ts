/** The name itself, or with the first number that makes it one of its own: `model.ifc`, `model (2).ifc`. */
export function nameApart(name: string, taken: ReadonlySet<string>): string {
  if (!taken.has(name)) return name;
  const [, stem = name, ending = ''] = /^(.*?)((?:\.[A-Za-z0-9]+)*)$/.exec(name) ?? [];
  for (let number = 2; ; number++) {
    const other = `${stem} (${number})${ending}`;
    if (!taken.has(other)) return other;
  }
}
