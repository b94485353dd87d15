/** What no mutant reaches is worked out once for all runs: places in the text, and what stands there instead. */
const keeps: Readonly<Record<string, readonly (readonly [string, string])[]>> = {
  'tests/support/run-sketch.ts': [
    ['readPipeDimensions(tables)', "__kept(__tables, 'dimensions', () => readPipeDimensions(tables))"],
    ['readNamesTable(tables)', "__kept(__tables, 'names', () => readNamesTable(tables))"],
    [
      'modelOf(sketch(text), { ports: options.ports ?? true, sizes: options.sizes ?? true })',
      `__kept(__tables, JSON.stringify([text, options.ports, options.sizes]), () =>
        modelOf(sketch(text), { ports: options.ports ?? true, sizes: options.sizes ?? true }))`,
    ],
    // A code holds rules, and rules are what changes: in the first pass every test must be seen to make its own.
    ['codes.get(key) ??', '(__recording() ? undefined : codes.get(key)) ??'],
  ],
  'src/tables/open-family.ts': [
    [
      'return openFamily(source, code.slice(0, Math.max(dash, 0)), code.slice(dash + 1), local);',
      `const open = () => openFamily(source, code.slice(0, Math.max(dash, 0)), code.slice(dash + 1), local);
  return source.name === 'tables' && local === undefined ? __kept(__tables, code, open) : open();`,
    ],
  ],
  'src/pipeline.ts': [
    [
      'identify(model, answers, names)',
      "__kept(model, 'identify' + __word(answers), () => identify(model, answers, names))",
    ],
    [
      "buildNetwork(model, identities, typeof maxGap === 'number' ? { maxGap, leaveOut } : { leaveOut })",
      `__kept(identities, 'network' + __word(answers), () =>
        buildNetwork(model, identities, typeof maxGap === 'number' ? { maxGap, leaveOut } : { leaveOut }))`,
    ],
    [
      'cutAtOutline(outline, identities, built.value, code.sewerBegins)',
      `__kept(built.value, 'cut' + code.sewerBegins, () => cutAtOutline(outline, identities, built.value, code.sewerBegins))`,
    ],
    [
      'findPaths(model, identities, network, answers)',
      `__kept(network, 'paths' + __word(answers), () => findPaths(model, identities, network, answers))`,
    ],
  ],
};

/** The sources that keep what they worked out, changed so; a place that is no longer there is a fault of this list. */
export function keeping(read: (file: string) => string): Map<string, string> {
  return new Map(
    Object.entries(keeps).map(([file, places]) => [
      file,
      places.reduce((text, [from, to]) => {
        if (!text.includes(from)) throw new Error(`tests/mutation/kept.ts: ${file} has no ${from}`);
        return text.replace(from, () => to);
      }, read(file)),
    ]),
  );
}
