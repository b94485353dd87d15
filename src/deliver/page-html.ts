import { offlineHtml, type PageBundle } from './offline-html.ts';
import type { PageData } from './page-data.ts';
import { packPage } from './page-pack.ts';

/** The page of one model as a file to open from disk. */
export function pageHtml(data: PageData, bundle: PageBundle): string {
  const { model, models } = data.result;
  return offlineHtml({
    ...bundle,
    title: `${(models ?? [model]).map(({ file }) => file).join(', ')} · Drainwright`,
    noScript:
      'This page draws the model with a script of its own. Allow scripts for this file to see it; nothing is sent anywhere.',
    data: { id: 'page-data', bytes: packPage(data) },
  });
}
