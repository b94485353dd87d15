import type { Verdict } from '../../schedule/result.ts';
import type { Desk } from './desk.ts';
import { make, modelText } from './element.ts';
import { fixtureName, pipeName } from './names.ts';

/** Colour is never alone: each verdict and severity has its own mark. */
export const verdictMarks: Readonly<Record<Verdict, string>> = {
  undersized: '▲',
  unknown: '?',
  oversized: '▽',
  agrees: '●',
};
export const severityMarks = { error: '▲', warning: '◆', note: '○' } as const;

export const verdictMark = (verdict: Verdict): HTMLElement =>
  make('span', { class: `mark mark-${verdict}`, 'aria-hidden': 'true' }, verdictMarks[verdict]);

export function pipeButton(desk: Desk, row: number): HTMLElement {
  const verdict = desk.building.result.pipes[row]?.verdict ?? 'unknown';
  return make(
    'button',
    { type: 'button', class: 'link', onclick: () => desk.choosePipe(row) },
    verdictMark(verdict),
    modelText(pipeName(desk.building, desk.words, row)),
  );
}

export function fixtureButton(desk: Desk, row: number): HTMLElement {
  return make(
    'button',
    { type: 'button', class: 'link', onclick: () => desk.chooseFixture(row) },
    modelText(fixtureName(desk.building, desk.words, row)),
  );
}

export function copyButton(desk: Desk, text: string, label: string): HTMLElement {
  const button: HTMLElement = make(
    'button',
    {
      type: 'button',
      class: 'copy',
      'aria-label': `${desk.words.page.copy}: ${label}`,
      onclick: () => {
        copyText(text);
        button.textContent = desk.words.page.copied;
        desk.announce(desk.words.page.copied);
        window.setTimeout(() => {
          button.textContent = desk.words.page.copy;
        }, 1500);
      },
    },
    desk.words.page.copy,
  );
  return button;
}

/** A page opened from disk may not be allowed the clipboard; the old way still works there. */
export function copyText(text: string): void {
  const old = (): void => {
    const field = make('textarea', { class: 'offscreen', 'aria-hidden': 'true' });
    field.value = text;
    document.body.append(field);
    field.select();
    document.execCommand('copy');
    field.remove();
  };
  if (navigator.clipboard === undefined) old();
  else navigator.clipboard.writeText(text).catch(old);
}
