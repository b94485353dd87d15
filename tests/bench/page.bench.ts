import { readFileSync } from 'node:fs';
import type { Page } from 'playwright-core';
import { pageData } from '../../src/deliver/page-data.ts';
import { pageHtml } from '../../src/deliver/page-html.ts';
import { readModel } from '../../src/ifc/open.ts';
import { noAnswers } from '../../src/model/answers.ts';
import { readNamesTable } from '../../src/model/read-names-table.ts';
import { run } from '../../src/pipeline.ts';
import { resultOf } from '../../src/schedule/result-of.ts';
import { bundled, chromiumPath, testBrowser } from '../support/browser.ts';
import { communityHall } from '../support/community-hall.ts';
import { exampleData, examplePage } from '../support/example-page.ts';
import { repeatedPage } from '../support/repeated-page.ts';
import { codeOf, tables } from '../support/run-sketch.ts';
import { median } from './measure.ts';
import { modelOfSize } from './models.ts';

// The page without a graphics card: bytes beside the model's own, time to the first picture, cost of turning it. Rows of
// the large pages are copies of one small building, so trails repeat more than in a real model; GlobalIds and places do
// not. Bytes beside an IFC file are those of real runs. Frames of one run stand beside each other, so a busy machine
// shifts them all alike.

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
  const bytesBeside = (name: string, bytes: Uint8Array): void => {
    const model = readModel([{ name: `${name}.ifc`, bytes }], () => '');
    const outcome = run(model, codeOf('npc-2020'), noAnswers, readNamesTable(tables));
    const result = resultOf(outcome, '0');
    const source = { ...outcome, paths: { ...outcome.paths, traps: outcome.shown.roles.air } };
    const page = pageHtml(pageData(result, source), bundle).length - frame;
    const thousand = (page / result.pipes.length).toFixed(1);
    console.log(
      `page: ${name}: ${result.pipes.length} pipes, ${thousand} kB a thousand; ${((100 * page) / bytes.length).toFixed(1)} % of the IFC file's ${(bytes.length / 1e6).toFixed(2)} MB`,
    );
  };
  for (const name of ['hall-wet-vented', 'school'])
    bytesBeside(name, new Uint8Array(readFileSync(`sample-models/${name}.ifc`)));
  for (const megabytes of [1, 10]) {
    const { bytes, from } = modelOfSize(megabytes);
    bytesBeside(`${megabytes} MB of ${from}`, bytes);
  }
  const browser = await testBrowser();
  let first: number | null = null;
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
    first ??= rate;
    console.log(
      `page: ${pipes} pipes: ${(((own / pipes) * 1000) / 1000).toFixed(1)} kB for each thousand pipes; first picture ${(median(firsts) / 1000).toFixed(2)} s after navigation; ${rate.toFixed(1)} frames a second while turning (1280 x 800, software; ${(rate / first).toFixed(2)} of the first page's), ${turned?.calls ?? 0} draw calls`,
    );
  }
  await browser.close();
}
