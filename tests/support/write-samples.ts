import { readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { ifcOfSample, ifcOfWorked, samples } from './samples.ts';
import { workedNames } from './worked-case.ts';

// `npm run samples`: writes the IFC files of sample-models/ and of its worked/ again from their notation. Run from the
// project's root.
const folder = 'sample-models';
for (const { name, options } of samples) {
  const text = ifcOfSample(readFileSync(join(folder, `${name}.piping`), 'utf8'), options);
  writeFileSync(join(folder, `${name}.ifc`), text);
  process.stdout.write(`${name}.ifc ${options.schema} ${options.unit} ${Math.round(text.length / 1024)} kB\n`);
}

const worked = workedNames().map((name) => {
  const text = ifcOfWorked(name);
  writeFileSync(join(folder, 'worked', `${name}.ifc`), text);
  return text.length;
});
const kilobytes = Math.round(worked.reduce((sum, length) => sum + length, 0) / 1024);
process.stdout.write(`worked/: ${worked.length} files, ${kilobytes} kB\n`);
