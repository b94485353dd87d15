// The main job on a sample model: the check as text, the sizes in a copy of the model, the page.
import { spawnSync } from 'node:child_process';
import { mkdirSync } from 'node:fs';
import { fileURLToPath } from 'node:url';

const root = fileURLToPath(new URL('../..', import.meta.url));
const model = 'sample-models/hall-wet-vented.ifc';
const sized = 'out/hall-wet-vented-sized.ifc';
const page = 'out/hall-wet-vented.html';

const run = (...args) => {
  console.log(`\n$ drainwright ${args.join(' ')}\n`);
  const { status } = spawnSync(process.execPath, ['dist/cli/main.js', ...args], { cwd: root, stdio: 'inherit' });
  return status;
};

mkdirSync(new URL('../../out', import.meta.url), { recursive: true });
// The sample is drawn one size too small, so that the check ends with 1: errors were found.
const codes = [run('check', model), run('size', model, '-o', sized), run('view', model, '-o', page)];
console.log(`\nThe sized model is in ${root}${sized}\nThe page is in       ${root}${page} (open it in a browser)`);
process.exitCode = codes[0] === 1 && codes[1] === 0 && codes[2] === 0 ? 0 : 1;
