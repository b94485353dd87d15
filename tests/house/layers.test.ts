import { readdirSync, readFileSync } from 'node:fs';
import { dirname, join, relative, resolve } from 'node:path';
import { expect, test } from 'vitest';

// The one-way flow: a folder may import itself and what stands here, nothing else.
const core = [
  'units',
  'hydraulics',
  'findings',
  'tables',
  'geometry',
  'model',
  'network',
  'paths',
  'codes',
  'loads',
  'roles',
  'sizes',
  'verdicts',
];
const upTo = (folder: string): string[] => core.slice(0, core.indexOf(folder));
const mayImport: Record<string, readonly string[]> = {
  units: [],
  hydraulics: [],
  findings: ['units'],
  tables: ['units', 'findings'],
  geometry: ['units'],
  model: ['units', 'findings', 'tables', 'geometry'],
  network: upTo('network'),
  paths: upTo('paths'),
  codes: upTo('codes'),
  loads: upTo('loads'),
  roles: upTo('roles'),
  sizes: upTo('sizes'),
  verdicts: upTo('verdicts'),
  'pipeline.ts': core,
  study: ['pipeline.ts', ...core],
  schedule: [...core, 'study'],
  deliver: [...core, 'study', 'schedule'],
  ifc: ['units', 'findings', 'tables', 'geometry', 'model'],
  page: [...core, 'study', 'schedule', 'deliver', 'ifc', 'pipeline.ts'],
  cli: [...core, 'study', 'schedule', 'deliver', 'ifc', 'pipeline.ts'],
  'index.ts': [...core, 'study', 'schedule', 'deliver', 'ifc', 'pipeline.ts'],
};
/** No file, clock, randomness, console or global of a host in the core. */
const impure =
  /\bprocess\.|\bconsole\.|\bDate\b|Math\.random|\bdocument\.|\bwindow\.|\bfetch\(|setTimeout|performance\./;
const allowedPackages: Record<string, readonly string[]> = {
  'ifc/shapes': ['web-ifc'],
  ifc: ['fflate'],
  deliver: ['fflate'],
  page: ['three', 'fflate'],
  cli: ['commander', 'fflate'],
};

const src = resolve(import.meta.dirname, '../../src');
const files = readdirSync(src, { recursive: true, encoding: 'utf8' }).filter((name) => name.endsWith('.ts'));
const folderOf = (path: string): string => path.split('/')[0] ?? path;
const imports = (text: string): string[] =>
  [...text.matchAll(/(?:^(?:import|export|\}).*\bfrom|^import|\bimport\s*\()\s*['"]([^'"\n]+)['"]/gm)].map(
    (match) => match[1] ?? '',
  );

test(`imports run one way (${files.length} files)`, () => {
  expect(files.length).toBeGreaterThan(10);
  const wrong: string[] = [];
  for (const file of files) {
    const folder = folderOf(file);
    const allowed = mayImport[folder];
    if (allowed === undefined) wrong.push(`${file}: no place in the map of folders`);
    for (const target of imports(readFileSync(join(src, file), 'utf8'))) {
      if (target.startsWith('.')) {
        const to = folderOf(relative(src, resolve(src, dirname(file), target)));
        if (to !== folder && to !== '..' && !allowed?.includes(to)) wrong.push(`${file} imports ${to}`);
        if (!target.endsWith('.ts') && !target.endsWith('.json')) wrong.push(`${file}: ${target} does not end in .ts`);
      } else if (target.startsWith('node:')) {
        if (!['cli'].includes(folder)) wrong.push(`${file} imports ${target}`);
      } else {
        const home = Object.keys(allowedPackages).find((key) => file.startsWith(`${key}/`));
        const name = target.split('/')[0] ?? target;
        if (home === undefined || !allowedPackages[home]?.includes(name)) wrong.push(`${file} imports ${target}`);
      }
    }
  }
  expect(wrong).toEqual([]);
});

test('the core touches no host', () => {
  const pure = files.filter((file) => [...core, 'study', 'schedule', 'pipeline.ts'].includes(folderOf(file)));
  expect(pure.length).toBeGreaterThan(10);
  const strip = (text: string): string =>
    text.replace(/\/\*[\s\S]*?\*\/|\/\/.*$/gm, '').replace(/'[^'\n]*'|"[^"\n]*"/g, "''");
  expect(pure.filter((file) => impure.test(strip(readFileSync(join(src, file), 'utf8'))))).toEqual([]);
});

test('no file imports itself by way of others', () => {
  const targets = new Map(
    files.map((file) => [
      file,
      imports(readFileSync(join(src, file), 'utf8'))
        .filter((target) => target.startsWith('.') && target.endsWith('.ts'))
        .map((target) => relative(src, resolve(src, dirname(file), target))),
    ]),
  );
  const done = new Set<string>();
  const circles: string[] = [];
  const follow = (file: string, way: readonly string[]): void => {
    if (way.includes(file)) circles.push([...way.slice(way.indexOf(file)), file].join(' → '));
    else if (!done.has(file)) {
      for (const target of targets.get(file) ?? []) follow(target, [...way, file]);
      done.add(file);
    }
  };
  for (const file of files) follow(file, []);
  expect(circles).toEqual([]);
});
