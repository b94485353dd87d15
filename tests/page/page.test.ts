import { createHash } from 'node:crypto';
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { type PageData, pageData } from '../../src/deliver/page-data.ts';
import { indexLines } from '../../src/ifc/lines/index-lines.ts';
import { appendSets } from '../../src/ifc/write/append-sets.ts';
import type { PropertySetToWrite } from '../../src/model/property-set.ts';
import { weighResult } from '../../src/schedule/weigh-result.ts';
import { weighEach } from '../../src/study/weigh.ts';
import { chromiumPath, type OpenedPage, settled, type TestBrowser, testBrowser } from '../support/browser.ts';
import { sampleOutcome } from '../support/sample-outcomes.ts';
import { hall, idOf } from './hall.ts';
import { oneVisit } from './one-visit.ts';
import { violations } from './violations.ts';

if (chromiumPath === undefined)
  console.log('Page tests are skipped: no Chromium is installed (set CHROMIUM to its path).');

describe.skipIf(chromiumPath === undefined)('the page in Chromium', () => {
  let browser: TestBrowser;
  const opened: OpenedPage[] = [];
  const open = async (data: PageData, options: Parameters<TestBrowser['open']>[1] = {}): Promise<OpenedPage> => {
    const page = await browser.open(data, options);
    opened.push(page);
    return page;
  };
  beforeAll(async () => {
    browser = await testBrowser();
  });
  afterAll(async () => {
    await browser?.close();
  });

  oneVisit(open);

  test('a real battery, weighed: wet vent 4 in, circuit vent 3 in under the floor; axe agrees', async () => {
    const { outcome, result } = sampleOutcome('hall-wet-vented');
    const source = { ...outcome, paths: { ...outcome.paths, traps: outcome.shown.roles.air } };
    const weighed = weighResult(outcome, result, weighEach(outcome, outcome.shown.roles.batteries)).batteries;
    const { page, close, complaints } = await open(pageData(result, source, { weighed }));
    expect(await page.locator('.headline').textContent()).toBe('9 pipes are too small, for 1 cause');
    await page.locator('#tab-batteries').click();
    const row = (label: string): Promise<string[]> =>
      page.locator('.side tbody tr', { hasText: label }).locator('td').allTextContents();
    // National Plumbing Code 2020: 14 fixture units wet vented are 4 in (Table 2.5.8.1.), 16 circuit vented 3 in
    // (Table 2.4.10.6.-B); see the sample's own heading.
    expect((await row('Under the floor')).slice(0, 2)).toEqual(['4 in', '3 in']);
    await page.locator('.weighed summary').click();
    expect(await page.locator('.cut svg path, .cut svg rect').count()).toBeGreaterThan(5);
    expect(await violations(page)).toEqual([]);
    expect(complaints).toEqual([]);
    await close();
  });

  test('tells whether a file is the one it was made from, also with our sets written into it', async () => {
    const name = 'bathroom-group.ifc';
    const bytes = readFileSync(join(import.meta.dirname, '../../sample-models', name));
    const digest = (of: Uint8Array): Uint8Array => createHash('sha256').update(of).digest();
    const index = indexLines(bytes);
    const sets: PropertySetToWrite[] = [
      {
        name: 'Drainwright_Model',
        on: 'building',
        properties: [{ name: 'Program', value: { as: 'label', value: 'Drainwright' } }],
      },
    ];
    const written = Buffer.concat([...appendSets(index, sets, { name, digest, version: '0.1.0' })]);
    expect(written.length).toBeGreaterThan(bytes.length);
    const sha256 = createHash('sha256').update(bytes).digest('hex');
    const { page, close, requests } = await open({
      ...hall,
      result: { ...hall.result, model: { ...hall.result.model, sha256 } },
    });
    await page.locator('#tab-model').click();
    const answer = page.locator('.proof-answer');
    const drop = (buffer: Buffer): Promise<void> =>
      page.setInputFiles('#proof', { name, mimeType: 'text/plain', buffer });
    await drop(bytes);
    await page.locator('.proof-answer.same').waitFor();
    await drop(Buffer.concat([bytes.subarray(0, 5000), Buffer.from(' '), bytes.subarray(5000)]));
    await page.locator('.proof-answer.other').waitFor();
    await drop(written);
    await page.locator('.proof-answer.same').waitFor();
    expect(await answer.textContent()).toBe(`${name} is the very file that this page was made from.`);
    await drop(Buffer.from('no IFC at all'));
    await page.locator('.proof-answer.other', { hasText: 'could not be read' }).waitFor();
    // The page shows another building than the file: not one of its pipes is in it, and the page says which.
    await drop(Buffer.concat([bytes.subarray(0, 5000), Buffer.from(' '), bytes.subarray(5000)]));
    await page.locator('.proof-answer.other li', { hasText: 'of this page are not in it: ' }).waitFor();
    expect(requests).toEqual([]);
    await close();
  });

  test('alike storeys of a riser are drawn once, until somebody asks for one of them', async () => {
    const { outcome, result } = sampleOutcome('school');
    const source = { ...outcome, paths: { ...outcome.paths, traps: outcome.shown.roles.air } };
    const { page, close, complaints } = await open(pageData(result, source), { hash: '#view=riser' });
    const labels = page.locator('.riser-drawing .riser-label.floor');
    const fold = page.locator('#riser-fold');
    // The school's own heading: storeys 2 and 3 are drawn alike.
    expect(await labels.allTextContents()).toContain('Storey 3: as Storey 2');
    expect(await labels.allTextContents()).toContain('Storey 2 (×2: Storey 3)');
    await fold.click();
    expect(await fold.getAttribute('aria-pressed')).toBe('false');
    expect(await labels.allTextContents()).toContain('Storey 3');
    await fold.click();
    await page.fill('#search', 'S3.J2-S3.J3');
    await page.locator('.pipe-list .line').first().click();
    expect(await fold.getAttribute('aria-pressed')).toBe('false');
    expect(await page.locator('.riser-drawing .reach.chosen').count()).toBeGreaterThan(0);
    expect(await violations(page)).toEqual([]);
    expect(complaints).toEqual([]);
    await close();
  });

  test('a link opens the page at its pipe, its view and its colours', async () => {
    const { page, close } = await open(hall, { hash: `#pipe=${idOf('Stack low')}&colour=role` });
    expect(await page.locator('#card-title').textContent()).toBe('Stack low');
    expect(await page.inputValue('#colour-by')).toBe('role');
    await page.evaluate((id) => {
      location.hash = `#${id}`;
    }, idOf('Urinal 2'));
    await page.locator('#card-title', { hasText: 'Urinal 2' }).waitFor();
    await close();
  });

  test('by keyboard alone: a finding, its trail, the tabs, the picture, the way out', async () => {
    const { page, close } = await open(hall);
    await settled(page);
    const reached: string[] = [];
    for (let press = 0; press < 45; press++) {
      await page.keyboard.press('Tab');
      reached.push(
        await page.evaluate(() => {
          const at = document.activeElement as HTMLElement;
          return at.id || at.className || at.textContent || at.tagName;
        }),
      );
    }
    for (const wanted of [
      'skip',
      'view',
      'search',
      'count',
      'tab-findings',
      'chip',
      'finding-head',
      'picture',
      'colour-by',
      'storey',
    ])
      expect(
        reached.some((name) => name.split(' ').includes(wanted)),
        `${wanted} among ${reached.join(', ')}`,
      ).toBe(true);
    await page.locator('.finding-head').first().focus();
    await page.keyboard.press('Enter');
    expect(await page.evaluate(() => document.activeElement?.id)).toBe('card-title');
    await page.keyboard.press('n');
    expect(await page.locator('#card-title').textContent()).toBe('Line 2');
    await page.keyboard.press('p');
    expect(await page.locator('#card-title').textContent()).toBe('Line 1');
    await page.keyboard.press('Escape');
    await page.locator('#tab-findings').focus();
    await page.keyboard.press('ArrowRight');
    expect(await page.evaluate(() => document.activeElement?.id)).toBe('tab-questions');
    const eye = (): Promise<number> =>
      page.evaluate(
        () => (document.querySelector('.picture') as unknown as { scene: { eye: { yaw: number } } }).scene.eye.yaw,
      );
    const before = await eye();
    await page.locator('.picture').focus();
    await page.keyboard.press('ArrowLeft');
    expect(await eye()).not.toBe(before);
    await close();
  });

  test('in French, sizes and words included', async () => {
    const { page, close, complaints } = await open(hall, { locale: 'fr-CA' });
    expect(await page.evaluate(() => document.documentElement.lang)).toBe('fr');
    expect(await page.locator('.headline').textContent()).toBe('9 tuyaux sont trop petits, pour 2 causes');
    await page.locator('.finding-head').first().click();
    const card = (await page.locator('.card').textContent())!;
    expect(card).toContain('3 po dessiné, 4 po exigé');
    expect(card).toContain('Ventilation interne');
    expect(card).not.toMatch(/\b(Too small|wet vent|drawn|needed|Why)\b/);
    expect(card).toContain('débite 4,2 l/s à 1,02 m/s selon Manning (n 0,012)');
    expect(card).toContain('dès qu’il est rempli à 18 %, soit 18 mm de hauteur');
    await page.getByRole('button', { name: 'English' }).click();
    // The same sentences as in `explain`, beside the size and never for it.
    expect(await page.locator('.card').textContent()).toContain(
      'For information, not for its size: half full, a bore of 102.3 mm at 2 % (1:50) carries 4.2 l/s at 1.02 m/s by Manning (n 0.012)',
    );
    expect(await page.locator('#card-title').textContent()).toBe('Line 1');
    expect(await page.locator('.banner').textContent()).toContain('3 in drawn');
    expect(complaints).toEqual([]);
    await close();
  });

  test.each([
    ['light', 1280, 'model'],
    ['dark', 1280, 'model'],
    ['light', 420, 'model'],
    ['dark', 1280, 'riser'],
  ] as const)('axe finds no violation (%s, %i px wide, %s)', async (colorScheme, width, view) => {
    const { page, close } = await open(hall, { colorScheme, viewport: { width, height: 800 }, hash: `#view=${view}` });
    const run = (): Promise<readonly string[]> => violations(page);
    expect(await run()).toEqual([]);
    await page.locator('.finding-head').first().click();
    expect(await run()).toEqual([]);
    for (const tab of width === 1280 && view === 'model' ? ['batteries', 'pipes', 'model'] : []) {
      await page.keyboard.press('Escape');
      await page.locator(`#tab-${tab}`).click();
      expect(await run(), tab).toEqual([]);
    }
    await close();
  });

  test('hostile names are shown as text and do nothing', async () => {
    const names = [
      '</script><img src=x onerror=alert(1)>',
      '<!--<script>alert(2)',
      '"><svg onload=alert(3)>',
      '\u202Egnp.exe\u2066 \u200Fשלום',
      `long ${'x'.repeat(10_000)}`,
      'javascript:alert(4)',
      `\u2028\u2029\`$${''}{alert(5)}\``,
      '',
    ];
    const pipes = hall.result.pipes.map((pipe, row) => ({
      ...pipe,
      name: names[row % names.length]!,
      system: names[2]!,
    }));
    const findings = hall.result.findings.map((finding) => ({
      ...finding,
      sentence: `${names[0]} ${names[3]} ${finding.sentence}`,
    }));
    const odd: PageData = {
      ...hall,
      result: { ...hall.result, pipes, findings, model: { ...hall.result.model, file: names[0]! } },
      scene: { ...hall.scene, storeys: hall.scene.storeys.map((storey) => ({ ...storey, name: names[2]! })) },
    };
    const { page, complaints, requests, close } = await open(odd);
    expect(await page.locator('h1').textContent()).toBe(names[0]);
    await page.locator('#tab-pipes').click();
    const shown = await page.locator('.pipe-list .line-name').allTextContents();
    expect(shown).toContain(names[0]);
    expect(shown).toContain(names[2]);
    expect(shown.some((name) => name.includes('\\u{202E}gnp.exe'))).toBe(true);
    expect(Math.max(...shown.map((name) => name.length))).toBeLessThan(200);
    expect(await page.locator('img, .panel svg[onload]').count()).toBe(0);
    await page.locator('.pipe-list .line').first().click();
    await page.keyboard.press('r');
    expect(await page.evaluate(() => document.body.scrollWidth <= window.innerWidth)).toBe(true);
    expect([...complaints, ...requests]).toEqual([]);
    await close();
  });

  test('without WebGL everything but the picture is there', async () => {
    const { page, close, complaints } = await open(hall, {});
    await page.context().addInitScript(() => {
      HTMLCanvasElement.prototype.getContext = () => null;
    });
    await page.reload();
    await page.waitForSelector('html[data-ready=yes]');
    expect(await page.locator('.picture-note').textContent()).toContain('cannot draw the model');
    await page.locator('.finding-head').first().click();
    expect(await page.locator('#card-title').textContent()).toBe('Line 1');
    expect(complaints).toEqual([]);
    await close();
  });
});
