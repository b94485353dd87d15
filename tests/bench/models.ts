import { spawnSync } from 'node:child_process';
import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { repeatedSketch } from '../support/repeated-sketch.ts';
import { sketch } from '../support/sketch.ts';
import { type IfcOptions, ifcOf } from '../support/write-ifc.ts';

const folder = 'out/bench/models';
const school = 'sample-models/school.piping';
/** `BENCH_MODELS=schools` takes our own writer also where the shared generator stands. */
const generator = process.env.BENCH_MODELS === 'schools' ? '' : '../shared/tools/gen-plumbing-ifc.mjs';

/**
 * A model of about so many megabytes, kept between runs: half building fabric from the shared generator where that stands
 * beside the project, else the school sample repeated by our own writer.
 */
export function modelOfSize(
  megabytes: number,
  options: { readonly ports: boolean } = { ports: true },
): { path: string; bytes: Uint8Array; from: string } {
  mkdirSync(folder, { recursive: true });
  const shared = existsSync(generator);
  const path = join(folder, `${shared ? 'generated' : 'schools'}-${megabytes}${options.ports ? '' : '-no-ports'}.ifc`);
  if (!existsSync(path)) {
    if (shared) {
      const ports = options.ports ? 'native' : 'none';
      spawnSync(
        process.execPath,
        [
          generator,
          '--out',
          path,
          '--size-mb',
          String(megabytes),
          '--schema',
          'IFC4',
          '--ballast',
          '0.5',
          '--ports',
          ports,
        ],
        { stdio: 'ignore' },
      );
    } else {
      writeFileSync(path, schools(megabytes, { ports: options.ports }));
    }
  }
  return { path, bytes: new Uint8Array(readFileSync(path)), from: shared ? 'shared generator' : 'our writer' };
}

/** About so many elements of distribution, by our own writer: schools side by side. Kept between runs. */
export function modelOfElements(elements: number): { path: string; bytes: Uint8Array } {
  mkdirSync(folder, { recursive: true });
  const path = join(folder, `schools-of-${elements}.ifc`);
  if (!existsSync(path)) {
    const one = sketch(readFileSync(school, 'utf8'));
    const each = ifcOf(one).match(/^#\d+=IFC(?:PIPE|SANITARY|WASTE|STACK|FLOW)\w*\(/gm)!.length;
    writeFileSync(path, ifcOf(repeatedSketch(one, Math.max(1, Math.round(elements / each)))));
  }
  return { path, bytes: new Uint8Array(readFileSync(path)) };
}

/** As many schools side by side as make the size. */
function schools(megabytes: number, options: Partial<IfcOptions>): string {
  const one = sketch(readFileSync(school, 'utf8'));
  const few = 8;
  const each = ifcOf(repeatedSketch(one, few), options).length / few;
  return ifcOf(repeatedSketch(one, Math.max(1, Math.round((megabytes * 1e6) / each))), options);
}
