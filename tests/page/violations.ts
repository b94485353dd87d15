import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import type { Page } from 'playwright-core';

/** What axe-core holds against the page as it stands, each with the element and why. */
export async function violations(page: Page): Promise<readonly string[]> {
  const axe = readFileSync(createRequire(import.meta.url).resolve('axe-core/axe.min.js'), 'utf8');
  await page.evaluate(axe);
  return page.evaluate(async () => {
    interface Found {
      readonly violations: { id: string; nodes: { html: string; failureSummary: string }[] }[];
      readonly passes: unknown[];
    }
    const tool = (window as unknown as { axe: { run(options: object): Promise<Found> } }).axe;
    const { violations: found, passes } = await tool.run({ resultTypes: ['violations'] });
    if (passes.length < 10) return ['axe looked at nothing'];
    return found.flatMap(({ id, nodes }) =>
      nodes.map(({ html, failureSummary }) => `${id}: ${html} ${failureSummary}`),
    );
  });
}
