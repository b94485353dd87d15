import { createHash } from 'node:crypto';
import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { join } from 'node:path';
import type { Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import type { PageData } from '../../src/deliver/page-data.ts';
import { indexLines } from '../../src/ifc/lines/index-lines.ts';
import { appendSets } from '../../src/ifc/write/append-sets.ts';
import type { PropertySetToWrite } from '../../src/model/property-set.ts';
import { chromiumPath, type OpenedPage, picture, settled, type TestBrowser, testBrowser } from '../support/browser.ts';
import { communityHall } from '../support/community-hall.ts';
import { exampleData, examplePage } from '../support/example-page.ts';

if (chromiumPath === undefined)
  console.log('Page tests are skipped: no Chromium is installed (set CHROMIUM to its path).');

const hall = exampleData(examplePage(communityHall));
const idOf = (name: string): string =>
  [...hall.result.pipes, ...hall.result.fixtures].find((row) => row.name === name)!.globalId;

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

  describe('one visit', () => {
    let visit: OpenedPage;
    let page: Page;
    beforeAll(async () => {
      visit = await open(hall);
      page = visit.page;
      await settled(page);
    });

    test('leads with what is too small and what was understood', async () => {
      expect(await page.locator('.headline').textContent()).toBe('9 pipes are too small, for 2 causes');
      expect(await page.locator('.understood').textContent()).toContain('7 urinals');
      expect(await page.locator('.headline-also').textContent()).toBe('1 trap has no way to the open air');
    });

    test('undersized runs are the strongest pixels, the rest steps back', async () => {
      const image = await picture(page);
      let [strong, strongHot] = [0, 0];
      for (let at = 0; at < image.data.length; at += 4) {
        const [r, g, b] = [image.data[at]!, image.data[at + 1]!, image.data[at + 2]!];
        const chroma = Math.max(r, g, b) - Math.min(r, g, b);
        if (chroma < 150) continue;
        strong++;
        if (r > 180 && r > 2 * g && r > 2 * b) strongHot++;
      }
      expect(strong).toBeGreaterThan(800);
      expect(strongHot / strong).toBeGreaterThan(0.97);
    });

    test('a finding brings its pipe: framed, chosen, with its trail as an argument', async () => {
      await page.locator('.finding-head').first().click();
      await settled(page);
      expect(await page.locator('#card-title').textContent()).toBe('Line 1');
      expect(await page.locator('.banner').textContent()).toContain('3 in drawn, 4 in needed');
      const governs = page.locator('.argument > .steps .governs');
      expect(await governs.textContent()).toContain('load 14 FU');
      expect(await governs.textContent()).toContain('2.5.8.1.');
      expect(await page.locator('.argument').textContent()).toContain('Why not 3 in');
      expect(page.url()).toContain(`#pipe=${idOf('Line 1')}`);
      const seen = await page.evaluate(
        (names) => {
          const { scene } = document.querySelector('.picture') as unknown as {
            scene: { middleOf(row: number): number[]; project(at: number[]): { x: number; y: number } | null };
          };
          return names.map((row) => scene.project(scene.middleOf(row)));
        },
        [...hall.result.pipes.keys()].filter((row) => /^Line/.test(hall.result.pipes[row]!.name!)),
      );
      const box = (await page.locator('.picture').boundingBox())!;
      expect(seen).toHaveLength(8);
      for (const spot of seen) {
        expect(spot!.x).toBeGreaterThan(0);
        expect(spot!.x).toBeLessThan(box.width);
        expect(spot!.y).toBeGreaterThan(0);
        expect(spot!.y).toBeLessThan(box.height);
      }
      const xs = seen.map((spot) => spot!.x);
      expect(Math.max(...xs) - Math.min(...xs)).toBeGreaterThan(box.width * 0.4);
    });

    test('a press on a pipe in the picture chooses it', async () => {
      await page.keyboard.press('Escape');
      const row = hall.result.pipes.findIndex(({ name }) => name === 'Building drain');
      const spot = await page.evaluate((of) => {
        const { scene } = document.querySelector('.picture') as unknown as {
          scene: { middleOf(row: number): number[]; project(at: number[]): { x: number; y: number }; fit(): void };
        };
        scene.fit();
        return of;
      }, row);
      await settled(page);
      const at = await page.evaluate((of) => {
        const { scene } = document.querySelector('.picture') as unknown as {
          scene: { middleOf(row: number): number[]; project(at: number[]): { x: number; y: number } };
        };
        return scene.project(scene.middleOf(of));
      }, spot);
      await page.locator('.picture').click({ position: at });
      expect(await page.locator('#card-title').textContent()).toBe('Building drain');
    });

    test.each([
      ['verdict', ['Too small9', 'Cannot be judged1', 'Larger than needed1', 'Agrees25']],
      ['role', ['Fixture drain13', 'Branch3', 'Stack2', 'Building drain1', 'Building sewer1', 'Wet vent10']],
      ['system', ['Sanitary30', 'Vent6']],
      ['size', ['1½ in5', '2 in12', '3 in14', '4 in4', 'no size drawn1']],
      ['storey', ['Upper floor14', 'Ground floor20', 'no storey2']],
      ['load', ['0 FU1', 'up to 3 FU13', 'up to 12 FU7', 'up to 48 FU15']],
    ])('colours by %s, and the legend names each', async (by, expected) => {
      await page.selectOption('#colour-by', by);
      const lines = await page.locator('.legend li').allTextContents();
      const plain = lines.map((line) => line.replace(/^[▲?▽●]/, ''));
      expect(plain.slice(0, expected.length)).toEqual(expected);
      await settled(page);
      const seen = await page.evaluate(() =>
        [...document.querySelectorAll('.swatch line:last-child')].map(
          (line) => `${line.getAttribute('stroke')} ${line.getAttribute('stroke-dasharray')}`,
        ),
      );
      expect(new Set(seen).size).toBe(seen.length);
    });

    test('a line of the legend switches its pipes off', async () => {
      await page.selectOption('#colour-by', 'verdict');
      await page.locator('.legend label', { hasText: 'Too small' }).click();
      await settled(page);
      const image = await picture(page);
      let hot = 0;
      for (let at = 0; at < image.data.length; at += 4)
        if (image.data[at]! > 200 && image.data[at + 1]! < 90 && image.data[at + 2]! < 60) hot++;
      expect(hot).toBeLessThan(60); // the triangle of the legend itself
      await page.locator('.legend label', { hasText: 'Too small' }).click();
    });

    test('search finds by name, clause, GlobalId and verdict', async () => {
      for (const [asked, least] of [
        ['urinal', 7],
        ['2.5.8.1', 8],
        [idOf('Gully branch'), 1],
        ['too small', 9],
      ] as const) {
        await page.fill('#search', asked);
        expect(await page.locator('.pipe-list .line').count()).toBeGreaterThanOrEqual(least);
      }
      await page.fill('#search', 'no such thing');
      expect(await page.locator('.panel-body').textContent()).toContain('Nothing has that');
      await page.fill('#search', '');
    });

    test('findings are grouped as asked, pipes sorted as asked', async () => {
      await page.selectOption('#findings-by', 'place');
      expect((await page.locator('.finding-code').allTextContents()).map((text) => text.replace(/^[▲◆○]/, ''))).toEqual(
        ['Battery B18', 'Stack Stack low3', 'Elsewhere2'],
      );
      await page.selectOption('#findings-by', 'storey');
      expect(await page.locator('.finding-code').count()).toBe(3);
      await page.selectOption('#findings-by', 'cause');
      await page.locator('#tab-pipes').click();
      await page.selectOption('#pipes-by', 'load');
      expect(await page.locator('.pipe-list .line-name').first().textContent()).toBe('Stack low');
      await page.selectOption('#pipes-by', 'name');
      expect((await page.locator('.pipe-list .line-name').allTextContents()).slice(0, 2)).toEqual(['Arm 1', 'Arm 2']);
      await page.selectOption('#pipes-by', 'verdict');
      await page.locator('#tab-findings').click();
    });

    test('the air of an unvented trap stops where the fault is', async () => {
      await page.fill('#search', 'floor drain');
      await page.locator('.pipe-list .line').first().click();
      await page.getByRole('button', { name: 'Follow the air' }).click();
      expect(await page.locator('.dock').textContent()).toContain('The air stops here');
      await page.locator('.label-undersized', { hasText: 'The air stops here' }).waitFor();
      await page.keyboard.press('Escape');
      await page.keyboard.press('Escape');
      await page.fill('#search', '');
    });

    test('following the flush, the load grows downstream', async () => {
      await page.fill('#search', 'urinal 3');
      await page.locator('.pipe-list .line').first().click();
      await page.getByRole('button', { name: 'Follow the flush' }).click();
      const loads: number[] = [];
      const slider = page.locator('#follow-step');
      const last = Number(await slider.getAttribute('max'));
      for (let step = 0; step <= last; step++) {
        await slider.fill(String(step));
        loads.push(Number(/([\d.]+) FU/.exec((await page.locator('.dock-step').textContent())!)![1]));
      }
      expect(loads).toEqual([2, 8, 10, 12, 14, 16, 24.5, 24.5, 24.5]);
      await page.keyboard.press('Escape');
      await page.keyboard.press('Escape');
      await page.fill('#search', '');
    });

    test('readings of a battery stand side by side', async () => {
      await page.locator('#tab-batteries').click();
      const rows = await page.locator('.readings tbody tr').allTextContents();
      expect(rows).toHaveLength(3);
      expect(rows[0]).toMatch(/Wet vent.*as read.*holds/);
      expect(rows[1]).toMatch(/Circuit vent.*does not hold.*2\.5\.3\.1\./);
      await page.locator('#tab-model').click();
      expect(await page.locator('.model-card').textContent()).toContain('ab'.repeat(32));
      await page.locator('#tab-findings').click();
    });

    test('the riser shows the same choice, its words lie on no pipe and on no other words', async () => {
      await page.locator('.finding-head').first().click();
      await page.keyboard.press('r');
      expect(await page.locator('.riser-label.chosen').count()).toBeGreaterThan(0);
      const faults = await page.evaluate(() => {
        const drawing = document.querySelector<SVGSVGElement>('.riser-drawing')!;
        const boxes = [...drawing.querySelectorAll<SVGGElement>('.riser-label')].map((label) => label.getBBox());
        const lines = [...drawing.querySelectorAll<SVGPathElement>('.riser-line')].slice(0, -4); // the legend's own
        const found: string[] = [];
        boxes.forEach((a, at) => {
          for (const b of boxes.slice(at + 1))
            if (a.x < b.x + b.width && b.x < a.x + a.width && a.y < b.y + b.height && b.y < a.y + a.height)
              found.push(`labels ${JSON.stringify(a)} ${JSON.stringify(b)}`);
          for (const line of lines) {
            const length = line.getTotalLength();
            for (let along = 0; along <= length; along += 1) {
              const p = line.getPointAtLength(along);
              if (p.x > a.x && p.x < a.x + a.width && p.y > a.y && p.y < a.y + a.height) {
                found.push(`line through label at ${p.x} ${p.y}`);
                break;
              }
            }
          }
        });
        return { labels: boxes.length, lines: lines.length, found };
      });
      expect(faults.labels).toBeGreaterThan(20);
      expect(faults.lines).toBeGreaterThan(30);
      expect(faults.found).toEqual([]);
      await page.keyboard.press('r');
      await page.keyboard.press('Escape');
    });

    test('nothing was asked of any network, and nothing complained', () => {
      expect(visit.requests).toEqual([]);
      expect(visit.complaints).toEqual([]);
    });
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
    await page.locator('.proof-answer.other').waitFor();
    expect(requests).toEqual([]);
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
    await page.getByRole('button', { name: 'English' }).click();
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
    await page.evaluate(readFileSync(createRequire(import.meta.url).resolve('axe-core/axe.min.js'), 'utf8'));
    const run = async (): Promise<readonly string[]> =>
      page.evaluate(async () => {
        const { axe } = window as unknown as {
          axe: {
            run(options: object): Promise<{
              violations: { id: string; nodes: { html: string; failureSummary: string }[] }[];
              passes: unknown[];
            }>;
          };
        };
        const { violations, passes } = await axe.run({ resultTypes: ['violations'] });
        if (passes.length < 10) return ['axe looked at nothing'];
        return violations.flatMap(({ id, nodes }) =>
          nodes.map(({ html, failureSummary }) => `${id}: ${html} ${failureSummary}`),
        );
      });
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
