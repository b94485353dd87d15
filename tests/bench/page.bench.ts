import type { Page } from 'playwright-core';
import { pageHtml } from '../../src/deliver/page-html.ts';
import { bundled, chromiumPath, testBrowser } from '../support/browser.ts';
import { communityHall } from '../support/community-hall.ts';
import { exampleData, examplePage } from '../support/example-page.ts';
import { repeatedPage } from '../support/repeated-page.ts';
import { median } from './measure.ts';

// The page without a graphics card: bytes, time to the first picture, cost of turning the model. Rows are copies of one
// small building, so trails repeat more than in a real model; GlobalIds and places do not.

interface Turn {
  readonly frames: number;
  readonly milliseconds: number;
  readonly calls: number;
}

/** Turns the eye a little in every animation frame for a while. */
const turn = (page: Page, milliseconds: number): Promise<Turn> =>
  page.evaluate(async (length) => {
    const { scene, stats } = document.querySelector('.picture') as unknown as {
      scene: { eye: { yaw: number }; setEye(eye: object): void };
      stats: { frames: number; calls: number };
    };
    const began = performance.now();
    const first = stats.frames;
    while (performance.now() - began < length) {
      scene.setEye({ ...scene.eye, yaw: scene.eye.yaw + 0.03 });
      await new Promise((done) => requestAnimationFrame(done));
    }
    return { frames: stats.frames - first, milliseconds: performance.now() - began, calls: stats.calls };
  }, milliseconds);

if (chromiumPath === undefined) console.log('page: no Chromium is installed, nothing measured');
else {
  const hall = exampleData(examplePage(communityHall));
  const bundle = await bundled();
  const frame = bundle.js.length + bundle.css.length;
  console.log(`page: script and style ${(frame / 1000).toFixed(0)} kB`);
  const browser = await testBrowser();
  for (const wished of [1000, 10_000, 50_000]) {
    const data = repeatedPage(hall, Math.ceil(wished / hall.result.pipes.length));
    const pipes = data.result.pipes.length;
    const own = pageHtml(data, bundle).length - frame;
    const firsts: number[] = [];
    let turned: Turn | null = null;
    for (let round = 0; round < 3; round++) {
      const { page, close } = await browser.open(data, { viewport: { width: 1280, height: 800 } });
      await page.waitForFunction(
        () => {
          const { stats } = document.querySelector('.picture') as unknown as { stats: { frames: number } };
          return stats.frames > 0;
        },
        undefined,
        { timeout: 60_000 },
      );
      firsts.push(
        await page.evaluate(
          () => (document.querySelector('.picture') as unknown as { stats: { firstAt: number } }).stats.firstAt,
        ),
      );
      if (round === 2) {
        await page.waitForTimeout(2500);
        await turn(page, 500); // the choice of detail settles
        turned = await turn(page, 3000);
      }
      await close();
    }
    const rate = turned === null ? 0 : (turned.frames / turned.milliseconds) * 1000;
    console.log(
      `page: ${pipes} pipes: ${(((own / pipes) * 1000) / 1000).toFixed(1)} kB for each thousand pipes; first picture ${(median(firsts) / 1000).toFixed(2)} s after navigation; ${rate.toFixed(1)} frames a second while turning (1280 x 800, software), ${turned?.calls ?? 0} draw calls`,
    );
  }
  await browser.close();
}
