// Makes the pictures of README from the sample models, with the page that `view` writes: npm run build && npm run pictures.
// Needs a Chromium (CHROMIUM=/path, else /usr/bin/chromium); no graphics card.
import { spawnSync } from 'node:child_process';
import { mkdirSync, mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';
import { chromium } from 'playwright-core';

const root = fileURLToPath(new URL('../..', import.meta.url));
const pictures = join(root, 'sample-models/pictures');
const folder = mkdtempSync(join(tmpdir(), 'pictures-'));
mkdirSync(pictures, { recursive: true });

const pageOf = (name) => {
  const page = join(folder, `${name}.html`);
  const model = join(root, `sample-models/${name}.ifc`);
  const { status, stderr } = spawnSync(process.execPath, [join(root, 'dist/cli/main.js'), 'view', model, '-o', page], {
    encoding: 'utf8',
  });
  if (status !== 0) throw new Error(`view ${name}: ${stderr}`);
  return pathToFileURL(page).href;
};

const browser = await chromium.launch({
  executablePath: process.env.CHROMIUM ?? '/usr/bin/chromium',
  args: ['--no-sandbox', '--disable-gpu', '--use-gl=angle', '--use-angle=swiftshader', '--enable-unsafe-swiftshader'],
});

/** Opens a page, does what is asked, waits until the still picture is drawn to its end, and keeps it. */
async function take(file, url, { dark = false, act } = {}) {
  const page = await browser.newPage({
    viewport: { width: 1440, height: 900 },
    colorScheme: dark ? 'dark' : 'light',
    locale: 'en-CA',
    reducedMotion: 'reduce',
  });
  await page.goto(url);
  await page.waitForSelector('html[data-ready=yes]');
  await act?.(page);
  let frames = -1;
  for (let quiet = 0; quiet < 4; ) {
    await page.waitForTimeout(250);
    const now = await page.evaluate(() => document.querySelector('.picture').stats.frames);
    quiet = now === frames ? quiet + 1 : 0;
    frames = now;
  }
  // A busy machine leaves the edges of a still picture rough: it is asked again until they are smooth.
  for (let again = 0; again < 12; again++) {
    const rough = await page.evaluate(() => {
      const [picture, smooth] = ['.picture', '.smooth'].map((name) => document.querySelector(name));
      if (picture.clientWidth === 0 || smooth === null || !smooth.hidden) return false;
      picture.scene.setEye(picture.scene.eye);
      return true;
    });
    if (!rough) break;
    await page.waitForTimeout(1500);
  }
  await page.waitForTimeout(1500);
  await page.screenshot({ path: join(pictures, file) });
  await page.close();
  console.log(`sample-models/pictures/${file}`);
}

const hall = pageOf('hall-wet-vented');
const school = pageOf('school');
const firstFinding = (page) => page.locator('.finding-head').first().click();
await take('page.png', hall, { act: firstFinding });
await take('model.png', school);
await take('dark.png', school, { dark: true, act: firstFinding });
await take('riser.png', hall, { act: (page) => page.keyboard.press('r') });
await take('flush.png', hall, {
  act: async (page) => {
    await page.fill('#search', 'U2');
    await page.locator('.pipe-list .line', { hasText: 'urinal' }).first().click();
    await page.getByRole('button', { name: 'Follow the flush' }).click();
    await page.locator('#follow-step').fill('4');
  },
});
await browser.close();
rmSync(folder, { recursive: true });
