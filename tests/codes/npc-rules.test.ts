import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { expect, test } from 'vitest';
import { openCode } from '../../src/tables/open-family.ts';
import { tables } from '../support/run-sketch.ts';

// Every rule of the National Plumbing Code that `tables/npc/rules.json` lists is applied, or said not to be.
const ids = [...openCode(tables, 'npc-2020').rules.values()];
const textOf = (folder: string, pattern: RegExp): string =>
  readdirSync(folder)
    .filter((name) => pattern.test(name))
    .map((name) => readFileSync(join(folder, name), 'utf8'))
    .join('\n');
const own = textOf(join(import.meta.dirname, '../../src/codes/npc'), /\.ts$/);
const tested = textOf(import.meta.dirname, /^(npc-.*|cleanouts|worked|vent-table-physics)\.test\.ts$/);

/** Rules that all codes share, or that say how others are read: the folder of `src` where each is applied. */
const elsewhere: Readonly<Record<string, string>> = {
  'NPC-R01': 'paths, vertical and level',
  'NPC-R02': 'paths, developed length',
  'NPC-R03': 'paths and roles, from fixture to vent',
  'NPC-R04': 'roles, drains',
  'NPC-R05': 'roles, vents',
  'NPC-R06': 'roles, floors',
  'NPC-R08': 'loads, rows of the fixture table',
  'NPC-R09': 'loads, by trap where no row fits',
  'NPC-R10': 'loads, flow that the user states',
  'NPC-R11': 'loads, fixtures on one trap',
  'NPC-R12': 'loads, sums',
  'NPC-R38': 'network, what is left out',
  'NPC-R49': 'sizes of wet vents: the load of the whole (R50)',
  'NPC-R52': 'sizes: every rule asks of every pipe',
  'NPC-R55': 'roles, extent of the branch',
  'NPC-R59': 'roles, circuit line; its limit is that of R60',
  'NPC-R62': 'roles, circuit line',
  'NPC-R64': 'sizes: R73',
  'NPC-R66': 'roles, circuit line; slopes R26',
  'NPC-R81': 'ventLength in src/codes/npc/vent-rules.ts',
  'NPC-R87': 'sizes: the largest demand governs',
};
/** What a model does not tell: listed by the `codes` command, said in every caution. */
const notApplied = ['NPC-R13'];

test('87 rules, each applied in the module of the code or elsewhere; what is not applied says so', () => {
  expect(ids).toHaveLength(87);
  const found = ids.flatMap(({ id }) => (own.includes(`'${id}`) || own.includes(id) || elsewhere[id] ? [] : [id]));
  expect(found).toEqual(notApplied);
  const unchecked = ids.flatMap(({ id, unchecked: what }) => (what === null ? [] : [id]));
  expect(unchecked).toEqual(expect.arrayContaining(notApplied));
});

test('each rule that is applied is named by a test', () => {
  const unnamed = ids.flatMap(({ id }) => {
    const short = id.replace('NPC-', '');
    return new RegExp(`\\b${short}\\b`).test(tested) || notApplied.includes(id) ? [] : [id];
  });
  expect(unnamed).toEqual([]);
});
