import type { Desk } from './desk.ts';
import { make } from './element.ts';

/** Puts the first `most` items into a host, and a button after them that brings the next ones in its own place. */
export function fill(
  desk: Desk,
  host: HTMLElement,
  items: readonly (() => HTMLElement)[],
  most: number,
  wrap: (more: HTMLElement) => HTMLElement,
  from = 0,
): void {
  host.append(...items.slice(from, from + most).map((item) => item()));
  const left = items.length - from - most;
  if (left <= 0) return;
  const last: HTMLElement = wrap(
    make(
      'button',
      {
        type: 'button',
        class: 'link',
        onclick: () => {
          last.remove();
          const next = host.children.length;
          fill(desk, host, items, most, wrap, from + most);
          host.children[next]?.querySelector<HTMLElement>('button')?.focus({ preventScroll: true });
        },
      },
      desk.words.page.more(Math.min(left, most)),
    ),
  );
  host.append(last);
}
