import type { Page } from 'playwright-core';
import { beforeAll, describe, expect, test } from 'vitest';
import { type OpenedPage, picture, settled } from '../support/browser.ts';
import { hall, idOf, type Opener } from './hall.ts';

/** What one reader does on one page, step after step; each step leaves the page as it found it. */
export function oneVisit(open: Opener): void {
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

    test('back from the riser the picture is as it was, labels and all', async () => {
      const before = await picture(page);
      await page.keyboard.press('r');
      await page.locator('.riser-drawing').waitFor({ state: 'visible' });
      await page.keyboard.press('r');
      await page.locator('.picture').waitFor({ state: 'visible' });
      await settled(page);
      const after = await picture(page);
      expect([after.width, after.height]).toEqual([before.width, before.height]);
      let other = 0;
      for (let at = 0; at < after.data.length; at += 4)
        if ([0, 1, 2].some((part) => Math.abs(after.data[at + part]! - before.data[at + part]!) > 40)) other++;
      expect(other / (after.width * after.height)).toBeLessThan(0.001);
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
}
