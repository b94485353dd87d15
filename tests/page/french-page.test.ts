import { readdirSync, readFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import type { Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { pageDataOf } from '../../src/deliver/page-data-of.ts';
import { english } from '../../src/page/words/english.ts';
import { french } from '../../src/page/words/french.ts';
import { chromiumPath, type TestBrowser, testBrowser } from '../support/browser.ts';
import { sampleOutcome } from '../support/sample-outcomes.ts';
import { samples } from '../support/samples.ts';

if (chromiumPath === undefined)
  console.log('The tests of the French page are skipped: no Chromium is installed (set CHROMIUM to its path).');

const tables = resolve(import.meta.dirname, '../../tables');
const families = readdirSync(tables).filter((name) => readdirSync(join(tables, name)).includes('rules.json'));
/** A figure that could not be read is named by its table's file. */
const tableIds = families.flatMap((name) => readdirSync(join(tables, name)).map((file) => file.replace('.json', '')));
const rules = families.flatMap(
  (name) =>
    (JSON.parse(readFileSync(join(tables, name, 'rules.json'), 'utf8')) as { rules: { id: string; title: string }[] })
      .rules,
);

test('every rule of every code has its name in French', () => {
  expect(rules.length).toBeGreaterThan(280);
  expect(rules.filter(({ id }) => !Object.hasOwn(french.rules, id)).map(({ id }) => id)).toEqual([]);
});

/** Ids such as `sewerFloor` are of no language. */
const wordsOf = (text: string): string[] =>
  text
    .replace(/\b[a-z]+[A-Z]\w*/g, ' ')
    .toLowerCase()
    .match(/[a-zà-ÿœ]{3,}/g) ?? [];

/** Ids such as `sewerFloor` are of no language. */
const settingId = /\b[a-z]+[A-Z]\w*/g;

/** Every text of a table of words; what a function makes of odd arguments counts too. */
function texts(value: unknown): string[] {
  if (typeof value === 'string') return [value];
  if (typeof value === 'function') return texts(value('1', '2', '3'));
  if (typeof value !== 'object' || value === null) return [];
  return Object.values(value).flatMap(texts);
}

/** Words that only English has: of the page's English words, titles of rules and sentences, those that no French text has. */
function englishOnly(sentences: readonly string[]): ReadonlySet<string> {
  const ours = [...texts(english), ...rules.map(({ title }) => title), ...sentences].flatMap(wordsOf);
  const theirs = new Set(texts(french).flatMap(wordsOf));
  return new Set([...ours, 'the', 'and', 'not', 'with'].filter((word) => !theirs.has(word) && !bothHave.has(word)));
}

/** Alike in both languages, or no language at all: names of IFC, of the table's cells, of settings. */
const bothHave = new Set(
  'pset type name nominaldiameter pipesegmenttypecommon outerdiameter length drainwright ifc possible long plan air part place double local vertical npc mode siphon large sort add'.split(
    ' ',
  ),
);

/** All that the page can say: every tab, every grouping, every card, the riser. Names that the model gives are left out. */
const said = (page: Page): Promise<readonly string[]> =>
  page.evaluate(() => {
    const out = new Set<string>();
    const foreign = 'code, h1, #page [lang], kbd, .line-name, .floor-name';
    const take = (): void => {
      for (const details of document.querySelectorAll('details')) details.open = true;
      const walker = document.createTreeWalker(document.getElementById('page')!, NodeFilter.SHOW_TEXT);
      for (let at = walker.nextNode(); at !== null; at = walker.nextNode())
        if (at.parentElement?.closest(foreign) === null) out.add(at.textContent ?? '');
      for (const name of ['aria-label', 'title', 'placeholder'])
        for (const at of document.querySelectorAll(`#page [${name}]`))
          if (at.closest('[lang]:not(html)') === null) out.add(at.getAttribute(name) ?? '');
    };
    const press = (selector: string): void => document.querySelector<HTMLElement>(selector)?.click();
    for (const tab of ['findings', 'questions', 'batteries', 'pipes', 'model']) {
      press(`#tab-${tab}`);
      take();
    }
    press('#tab-findings');
    for (const by of ['place', 'storey']) {
      const select = document.querySelector<HTMLSelectElement>('#findings-by');
      if (select === null) continue;
      select.value = by;
      select.dispatchEvent(new Event('change'));
      take();
    }
    press('#tab-pipes');
    const lines = document.querySelectorAll('.pipe-list .line').length;
    // Of a tower's hundreds of alike pipes every third is enough.
    for (let line = 0; line < lines; line += lines > 120 ? 3 : 1) {
      document.querySelectorAll<HTMLElement>('.pipe-list .line')[line]!.click();
      take();
      press('.back');
    }
    press('[data-view=riser]');
    take();
    return [...out];
  });

describe.skipIf(chromiumPath === undefined)('the page in French', () => {
  let browser: TestBrowser;
  beforeAll(async () => {
    browser = await testBrowser();
  });
  afterAll(async () => {
    await browser?.close();
  });

  test.each(samples)('$name: no English word is left', async ({ name }) => {
    const { outcome, result } = sampleOutcome(name);
    const { page, complaints, close } = await browser.open(pageDataOf(outcome, result, []), {
      locale: 'fr-CA',
      hash: '#view=riser',
    });
    const found = await said(page);
    await close();
    expect(found.length).toBeGreaterThan(100);
    const given = [
      ...[...result.pipes, ...result.fixtures].flatMap((row) => [
        row.name,
        row.storey,
        'system' in row ? row.system : null,
      ]),
      ...[...outcome.model.storeys, ...outcome.model.walls, ...outcome.model.slabs].map((part) => part.name),
      ...outcome.model.spaces.flatMap((space) => [space.name, space.longName]),
      ...outcome.model.elements.map((element) => element.name),
      ...outcome.model.systems.map((system) => system.name),
      result.model.file,
      ...tableIds,
    ];
    const names = [...new Set(given)].filter((one) => one !== null && one !== '').sort((a, b) => b!.length - a!.length);
    const foreign = englishOnly([
      ...result.findings.map(({ sentence }) => sentence),
      ...result.pipes.flatMap(({ reason }) => reason ?? []),
    ]);
    const left = found.flatMap((text) => {
      const own = names.reduce<string>((rest, one) => rest.replaceAll(one!, ' '), text.replace(settingId, ' '));
      const words = wordsOf(own).filter((word) => foreign.has(word));
      return words.length === 0 ? [] : [`${words.join(' ')}: ${text.slice(0, 200)}`];
    });
    expect(left).toEqual([]);
    expect(complaints).toEqual([]);
  });
});
