import { describe, expect, test } from 'vitest';
import { quickPlan } from '../../src/deliver/quick-plan.ts';
import { reportHtml } from '../../src/deliver/report-html.ts';
import { reportSource } from '../../src/deliver/report-source.ts';
import { sha256 } from '../../src/deliver/sha256.ts';
import { noAnswers } from '../../src/model/answers.ts';
import { run } from '../../src/pipeline.ts';
import { resultOf } from '../../src/schedule/result-of.ts';
import { modelOf } from '../support/model-of.ts';
import { codeOf, names } from '../support/run-sketch.ts';
import { sampleOutcome } from '../support/sample-outcomes.ts';
import { sketch } from '../support/sketch.ts';
import { sampleText } from '../support/study-samples.ts';

const reportOf = (outcome: Parameters<typeof reportSource>[0]): string =>
  reportHtml(reportSource(outcome, resultOf(outcome, '0.0.0'), quickPlan(outcome)));

/** Texts of the cells of each row of the table with this caption or heading before it. */
function rowsOf(report: string, id: string): string[][] {
  const section = new RegExp(`<section id="${id}">(.*?)</section>`, 's').exec(report)?.[1] ?? '';
  return [...section.matchAll(/<tr>(.*?)<\/tr>/gs)].map(([, row]) =>
    [...row!.matchAll(/<t[hd][^>]*>(.*?)<\/t[hd]>/gs)].map(([, cell]) =>
      cell!.replace(/<[^>]*>/g, '').replace(/&#(\d+);/g, (_, code: string) => String.fromCharCode(Number(code))),
    ),
  );
}

describe('the hall, wet vented: seven stall urinals and two lavatories drawn 3 in', () => {
  const report = reportOf(sampleOutcome('hall-wet-vented').outcome);

  test('nine pipes of one cause: 14 units wet vented, 3 in holds 12 and 4 in 36 (Table 2.5.8.1.)', () => {
    const [, row] = rowsOf(report, 'undersized');
    expect(row?.slice(0, 3)).toEqual(['9 wet vents', '3 in', '4 in']);
    expect(row?.[3]).toBe('Load that sizes a wet vent: 14 fixture units; 3 in holds 12, 4 in 36; 2.5.8.1.(1),(2)');
    expect(row?.[5]).toContain('LJ-CO1');
  });
  test('readings side by side: 4 in against 1½ in in the wall, studs 140 against 89', () => {
    const row = (label: string): string[] => rowsOf(report, 'batteries').find(([head]) => head === label) ?? [];
    expect(row('largest in the wall')).toEqual(['largest in the wall', '4 in', '1½ in', '1½ in']);
    expect(row('room it needs')[1]).toMatch(/38.×.140/);
    expect(row('room it needs')[2]).toMatch(/38.×.89/);
  });
  test('a cut through its wall, a plan, the take-off of 2 cleanouts (CO1 and CB of the sketch), a row for each pipe', () => {
    expect(report.match(/<svg /g)?.length).toBe(1);
    expect(report).toContain('9 pipes from 3 in to 4 in');
    expect(report).toContain('no error is left');
    expect(rowsOf(report, 'take-off').find(([item]) => item === 'cleanout')?.[6]).toBe('2');
    expect(rowsOf(report, 'pipes').length - 1).toBe(40);
  });
  test('water in its level drains for information: 4 in of 102.3 mm at 1:50, half full 4.20 l/s at 1.02 m/s by hand', () => {
    // Radius 25.575 mm, Manning n 0.012: 1.023 m/s over 41.1 cm2.
    const [head, ...rows] = rowsOf(report, 'water');
    expect(head?.[3]).toBe('Half full by Manning, n 0.012');
    const drain = rows.find((row) => row.at(-1)?.includes('BF-CB'));
    expect(drain?.slice(0, 4)).toEqual(['4 in', '102.3 mm', '2 % (1:50)', '4.2 l/s at 1.02 m/s']);
    // Pipes of one size and slope stand in one row; together they are all that have water to speak of.
    const told = rows.map((row) => Number(row.at(-1)?.split(':')[0])).reduce((sum, count) => sum + count, 0);
    const { pipes } = resultOf(sampleOutcome('hall-wet-vented').outcome, '0.0.0');
    expect(told).toBe(pipes.filter(({ hydraulics }) => hydraulics !== undefined).length);
    expect(rows.length).toBeLessThan(8);
    expect(report).toContain('none of them follows from it');
  });
  test('cautions at both ends, no date, the same bytes again', () => {
    expect(report.match(/class="caution"/g)?.length).toBe(2);
    expect(report).toContain('have a licensed person check every size');
    expect(reportOf(sampleOutcome('hall-wet-vented').outcome)).toBe(report);
  });
  test('no script, nothing fetched: the policy lets only this very style stand', () => {
    const style = /<style>(.*?)<\/style>/s.exec(report)![1]!;
    const hash = Buffer.from(sha256(style)).toString('base64');
    expect(report).toContain(`default-src 'none'; style-src 'sha256-${hash}'; base-uri 'none'; form-action 'none'`);
    expect(report).not.toMatch(/<script|<link|<img|<iframe|\shref="(?!#)|\ssrc=|\sstyle=|url\(/i);
  });
});

test('names are text, whatever they say', () => {
  const hostile = '</td><script>alert(1)</script>\u202E"\'&';
  const model = modelOf(sketch(sampleText('school')));
  const named = {
    ...model,
    elements: model.elements.map((element) => ({ ...element, name: `${hostile}${element.id}` })),
  };
  const report = reportOf(run(named, codeOf('npc-2020'), noAnswers, names));
  expect(report).not.toMatch(/<script|\u202E/);
  expect(report).toContain('&#60;script&#62;alert(1)');
  expect(report).toContain('\\u{202E}');
  const opened = [...report.matchAll(/<(\w+)(?=[\s>])/g)].length;
  const closed = [...report.matchAll(/<\/(\w+)>/g)].length;
  // All but the two `meta` kinds of element that stay open: charset, policy, viewport, referrer.
  expect(opened - closed).toBe(4);
});

test('every sample: a section each for what there is, and no empty one', () => {
  const seen = ['bathroom-group', 'dwelling', 'five-storey-core', 'hall-circuit-vented', 'school', 'sports-hall'].map(
    (name) => {
      const report = reportOf(sampleOutcome(name).outcome);
      for (const [, inside] of report.matchAll(/<section id="[\w-]+"><h2>[^<]*<\/h2>(.*?)<\/section>/gs))
        expect(inside!.length).toBeGreaterThan(20);
      for (const [, target] of report.matchAll(/href="#([\w-]+)"/g))
        expect(report).toContain(`<section id="${target}">`);
      return report;
    },
  );
  expect(seen.filter((report) => report.includes('id="undersized"')).length).toBe(1);
});

test('a model without drainage says so', () => {
  const { elements: _, ...rest } = modelOf(sketch(sampleText('dwelling')));
  const report = reportOf(run({ ...rest, elements: [] }, codeOf('npc-2020'), noAnswers, names));
  expect(report).toContain('Of 0 pipes');
  expect(report).not.toContain('id="take-off"');
});
