import { readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { describe, expect, test } from 'vitest';
import { runSketch } from '../support/run-sketch.ts';

// Every value is worked by hand from the National Plumbing Code's tables; the working stands at the head of each
// .piping file, with its clauses. A line: pipe, role, load through it (a dry vent: the load it vents), size.
const worked: Readonly<Record<string, { readonly pipes: readonly string[]; readonly errors: readonly string[] }>> = {
  'hall-wet-vented': {
    pipes: [
      'LJ-CO1 wet-vent 14, 4 in',
      'J6-J7 wet-vent 14, 4 in',
      'J7-K1 branch 16, 4 in',
      'JW-JD branch 20, 4 in',
      'BF-CB building-drain 20, 4 in',
      'LJ-VT1 continuous-vent 16, 1½ in',
      'WV-JW fixture-drain 4, 3 in',
    ],
    // The whole wet vent, drawn 3 in.
    errors: ['LJ-CO1', 'CO1-LF', 'LF-J1', 'J1-J2', 'J2-J3', 'J3-J4', 'J4-J5', 'J5-J6', 'J6-J7'].map(
      (pipe) => `undersized ${pipe}`,
    ),
  },
  'hall-circuit-vented': {
    pipes: [
      'CV-J2 circuit-vented-branch 4, 3 in',
      'J7-RV circuit-vented-branch 16, 3 in',
      'CO1-CV circuit-vent 2, 1½ in',
      'LJ-VJ circuit-vent 16, 1½ in',
      'RV-RT relief-vent 0, 1½ in',
      'VJ-VT1 branch-vent 16, 1½ in',
      'JW-JD branch 20, 3 in',
    ],
    errors: [],
  },
  'bathroom-group': {
    pipes: [
      'BJ-WJ wet-vent 2.5, 2 in',
      'WJ-ST branch 6, 3 in',
      'ST-CO1 stack 6, 3 in',
      'SF-CB building-drain 6, 3 in',
      'LT-SV continuous-vent 6, 1½ in',
    ],
    errors: [],
  },
  dwelling: {
    pipes: [
      'BJ-WJ wet-vent 2.5, 2 in',
      'PF-QJ wet-vent 1, 2 in',
      'S2-S1 stack 6, 3 in',
      'CO1-SF stack 11, 3 in',
      'KW-KF stack 3.5, 2 in',
      'KE-KB building-drain 3.5, 3 in',
      'FT-FJ fixture-drain 3, 3 in',
      'KB-CB building-drain 17.5, 3 in',
      'CJ-CT individual-vent 2, 1½ in',
    ],
    errors: [],
  },
  'five-storey-core': {
    pipes: [
      'A3.LF-A3.WJ wet-vent 2, 2 in',
      'A3.WJ-A3.MJ branch 10, 3 in',
      'A3.MJ-A3.SA branch 12, 3 in',
      'A3.SA-A2.SA stack 36, 3 in',
      'A2.SA-A1.SA stack 48, 4 in',
      'CO1-FA stack 60, 4 in',
      'B2.SB-OB stack 40, 4 in',
      'OB-OC stack 40, 4 in',
      'FB-CB building-drain 100, 4 in',
      'A3.AV-A3.VA branch-vent 12, 1½ in',
      'VF-V0 vent-stack 60, 3 in',
      'B5.VB-HV vent-stack 100, 3 in',
      'HV-HB stack-vent 100, 3 in',
      'HB-VT vent-header 100, 3 in',
    ],
    errors: [],
  },
  'sports-hall': {
    pipes: ['J5-J6 wet-vent 7.5, 3 in', 'J6-JD branch 9, 3 in', 'BF-CB building-drain 9, 3 in'],
    // No error but the architect's question: fittings of 3 in are 100.6 mm wide (ASTM D2665), the studs 89 mm deep.
    errors: ['J1-J2', 'J2-J3', 'J3-J4', 'J4-J5', 'J5-J6', 'J6-JD', 'JD-BF'].map((pipe) => `fit-in-wall ${pipe}`),
  },
  school: {
    pipes: [
      'S2.J8-S2.RV circuit-vented-branch 24, 3 in',
      'S2.CV-S2.CT circuit-vent 24, 2 in',
      'S2.RV-S2.VJ relief-vent 0, 1½ in',
      'S2.Q1-S2.Q2 branch 12, 3 in',
      'S2.Q2-S2.Q3 branch 24, 4 in',
      'S2.Q5-S2.SC branch 40, 4 in',
      'S2.P1-S2.N1 dual-vent 12, 1½ in',
      'S4.SC-S3.SU stack 64, 4 in',
      'CO1-F stack 256, 4 in',
      'MJ-CB building-drain 259, 4 in',
      'R6-SV branch-vent 256, 3 in',
      'S4.J7-S4.J8 wet-vent 21, 4 in',
    ],
    // Storey 4 has no relief vent: a wet vent of 3 in from the circuit vent's foot to the last urinal, and what follows.
    errors: ['CV-J2', 'J2-J3', 'J3-J4', 'J4-J5', 'J5-J6', 'J6-J7', 'J7-J8', 'J8-RV', 'RV-D', 'D-D0', 'D0-SU'].map(
      (pipe) => `undersized ${pipe.replace(/\w+/g, 'S4.$&')}`,
    ),
  },
};

const vents = /vent$|vent-stack|vent-header/;

describe.each(Object.entries(worked))('%s', (name, { pipes, errors }) => {
  const text = readFileSync(resolve(import.meta.dirname, `../../sample-models/${name}.piping`), 'utf8');

  test.each([
    { ports: true, sizes: true },
    { ports: false, sizes: false },
  ])('roles, loads and sizes as worked by hand, and no fault but the intended one: %o', (options) => {
    const run = runSketch(text, options);
    const found = pipes.map((line) => {
      const pipe = run.pipe(line.split(' ')[0]!);
      const load = (vents.test(pipe.role) ? pipe.ventLoad : pipe.load)?.most;
      return `${pipe.name} ${pipe.role} ${load}, ${run.size(pipe.name!)}`;
    });
    expect(found).toEqual(pipes);
    const named = new Map(run.result.pipes.map((pipe) => [pipe.globalId, pipe.name]));
    const wrong = run.result.findings
      .filter(({ severity }) => severity !== 'note')
      .map(({ code, about }) => `${code} ${named.get(about[0]!)}`);
    expect(wrong.sort()).toEqual([...errors].sort());
  });
});
