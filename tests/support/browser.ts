import { existsSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import { pathToFileURL } from 'node:url';
import { type Browser, type BrowserContextOptions, chromium, type Page } from 'playwright-core';
import { PNG } from 'pngjs';
import type { PageBundle } from '../../src/deliver/offline-html.ts';
import type { PageData } from '../../src/deliver/page-data.ts';
import { pageHtml } from '../../src/deliver/page-html.ts';

const places = [process.env.CHROMIUM ?? '', '/usr/bin/chromium', '/usr/bin/chromium-browser', '/usr/bin/google-chrome'];
export const chromiumPath = places.find((path) => path !== '' && existsSync(path));

/** A page opened from disk, and everything it should not have done. */
export interface OpenedPage {
  readonly page: Page;
  /** Requests other than for the file itself. */
  readonly requests: readonly string[];
  /** Console errors and warnings of the page, uncaught errors, dialogs. */
  readonly complaints: readonly string[];
  close(): Promise<void>;
}

type PageOptions = BrowserContextOptions & { readonly hash?: string };

export interface TestBrowser {
  open(data: PageData, options?: PageOptions): Promise<OpenedPage>;
  /** The same with a page that stands on the disk. */
  openFile(file: string, options?: PageOptions): Promise<OpenedPage>;
  close(): Promise<void>;
}

/** One browser without a graphics card for all page tests of a run. */
export async function testBrowser(): Promise<TestBrowser> {
  if (chromiumPath === undefined) throw new Error('no Chromium');
  const browser: Browser = await chromium.launch({
    executablePath: chromiumPath,
    args: ['--no-sandbox', '--disable-gpu', '--use-gl=angle', '--use-angle=swiftshader', '--enable-unsafe-swiftshader'],
  });
  const folder = mkdtempSync(join(tmpdir(), 'page-test-'));
  const bundle = await bundled();
  let count = 0;
  const opener: TestBrowser = {
    open(data, options) {
      const file = join(folder, `page-${count++}.html`);
      writeFileSync(file, pageHtml(data, bundle));
      return opener.openFile(file, options);
    },
    async openFile(file, { hash = '', ...options } = {}) {
      const url = pathToFileURL(file).href;
      const context = await browser.newContext({
        viewport: { width: 1100, height: 680 },
        locale: 'en-CA',
        colorScheme: 'light',
        reducedMotion: 'reduce',
        ...options,
      });
      const page = await context.newPage();
      // Two cores that draw in software and run other tests beside answer late, not wrongly.
      page.setDefaultTimeout(20_000);
      const requests: string[] = [];
      const complaints: string[] = [];
      page.on('request', (request) => {
        if (request.url().split('#')[0] !== url) requests.push(request.url());
      });
      page.on('console', (message) => {
        // What the software renderer says of its own speed is not the page's doing.
        const driver = /GL Driver Message/.test(message.text());
        if ((message.type() === 'error' || message.type() === 'warning') && !driver) complaints.push(message.text());
      });
      page.on('pageerror', (error) => complaints.push(String(error)));
      page.on('dialog', (dialog) => {
        complaints.push(`dialog ${dialog.message()}`);
        void dialog.dismiss();
      });
      await page.goto(`${url}${hash}`);
      await page.waitForSelector('html[data-ready=yes]', { timeout: 60_000 });
      return { page, requests, complaints, close: () => context.close() };
    },
    async close() {
      await browser.close();
      rmSync(folder, { recursive: true, force: true });
    },
  };
  return opener;
}

let made: Promise<PageBundle> | null = null;

/** The same bundle that `npm run build` writes. */
export function bundled(): Promise<PageBundle> {
  made ??= (async () => {
    const root = resolve(import.meta.dirname, '../..');
    const script = pathToFileURL(join(root, 'src/build/build-page.mjs')).href;
    const { bundlePage } = (await import(script)) as { bundlePage: (root: string) => Promise<PageBundle> };
    return bundlePage(root);
  })();
  return made;
}

/** The picture alone, without words and panels over it. */
export async function picture(page: Page): Promise<PNG> {
  const box = await page.locator('.picture').boundingBox();
  if (box === null) throw new Error('no picture on the page');
  await page.addStyleTag({ content: '' }).catch(() => undefined);
  return PNG.sync.read(await page.screenshot({ clip: box }));
}

/** Waits until the eye has come to rest and the still picture is drawn to its end. */
export async function settled(page: Page): Promise<void> {
  await page.waitForFunction(
    () => {
      const holder = window as unknown as { seen?: { frames: number; at: number } };
      const { frames } = (document.querySelector('.picture') as unknown as { stats: { frames: number } }).stats;
      if (holder.seen === undefined || holder.seen.frames !== frames) holder.seen = { frames, at: performance.now() };
      return performance.now() - holder.seen.at > 350;
    },
    undefined,
    { timeout: 20_000, polling: 50 },
  );
}
