import { readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { ifcOfSample, samples } from './samples.ts';

// `npm run samples`: writes sample-models/*.ifc again from their notation. Run from the project's root.
const folder = 'sample-models';
for (const { name, options } of samples) {
  const text = ifcOfSample(readFileSync(join(folder, `${name}.piping`), 'utf8'), options);
  writeFileSync(join(folder, `${name}.ifc`), text);
  process.stdout.write(`${name}.ifc ${options.schema} ${options.unit} ${Math.round(text.length / 1024)} kB\n`);
}
