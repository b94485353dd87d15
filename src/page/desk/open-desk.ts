import type { DeskParts } from '../../deliver/desk-html.ts';
import type { PageData } from '../../deliver/page-data.ts';
import { buildingOf } from '../building.ts';
import { openPage } from '../open-page.ts';
import { make } from '../panel/element.ts';
import { shown } from '../panel/names.ts';
import type { Language } from '../state.ts';
import { deskWords } from '../words/desk-words.ts';
import { deskWorker } from './desk-worker.ts';
import { type DropView, dropView } from './drop-view.ts';
import type { DeskAsk, DeskEdit, SaveKind } from './messages.ts';
import { saveBar } from './save-bar.ts';
import { whatIfControls } from './what-if-controls.ts';

/** The empty page inside `host`. A model dropped on it is checked in a worker; then the page opens on the result. */
export function openDesk(host: HTMLElement, parts: DeskParts): void {
  const worker = deskWorker(parts);
  let language: Language = /^fr\b/i.test(navigator.language) ? 'fr' : 'en';
  let code = parts.standard;
  let view: DropView | null = null;
  let close = (): void => undefined;

  const empty = (note?: string): void => {
    close();
    close = () => undefined;
    worker.stop();
    history.replaceState(null, '', location.pathname + location.search);
    drop().idle(note);
  };
  const drop = (): DropView => {
    document.documentElement.lang = language;
    document.documentElement.dataset.theme = window.matchMedia('(prefers-color-scheme: dark)').matches
      ? 'dark'
      : 'light';
    document.title = 'Drainwright';
    view = dropView(parts, language, code, {
      check: (files) => void check(files),
      cancel: () => empty(deskWords[language].cancelled),
      chooseCode(chosen) {
        code = chosen;
      },
      otherLanguage() {
        language = language === 'en' ? 'fr' : 'en';
        empty();
      },
    });
    host.replaceChildren(view.root);
    return view;
  };

  const check = async (files: readonly File[]): Promise<void> => {
    const at = view;
    if (at === null) return;
    const names = files.map(({ name }) => name);
    at.busy(names, 'unpacking');
    let asked: DeskAsk;
    try {
      const inputs = await Promise.all(
        files.map(async (file) => ({ name: file.name, bytes: new Uint8Array(await file.arrayBuffer()) })),
      );
      asked = { ask: 'check', inputs, code };
    } catch (reason) {
      at.refused(
        `${names.join(', ')}: cannot be read: ${reason instanceof Error ? reason.message : String(reason)}`,
        false,
      );
      return;
    }
    // Cancelled while the browser was reading.
    if (view !== at) return;
    const end = await worker.ask(asked, (stage) => at.busy(names, stage));
    if (end?.say === 'page') open(end.data);
    else if (end?.say === 'refused') at.refused(end.message, end.fault);
  };

  const open = (data: PageData, edits: readonly DeskEdit[] = []): void => {
    close();
    view = null;
    const note = make('span', { class: 'save-note', role: 'status' });
    const { model, models } = data.result;
    document.title = `${(models ?? [model]).map(({ file }) => shown(file)).join(', ')} · Drainwright`;
    const building = buildingOf(data);
    close = openPage(host, building, {
      language,
      bar(now) {
        language = now;
        note.textContent =
          edits.length === 0 ? '' : `${deskWords[now].whatIf.now} ${edits.map(({ words }) => words).join(' · ')}`;
        return saveBar(parts, now, code, note, {
          save: (what) => void save(what, note),
          another: () => empty(),
          chooseCode: (chosen) => void recheck(chosen, note),
          back: edits.length === 0 ? null : () => void suppose([], note),
        });
      },
      whatIf: (now, chosen) =>
        whatIfControls(building, now, chosen, (edit) => void suppose(withEdit(edits, edit), note)),
    });
  };
  const recheck = async (chosen: string, note: HTMLElement): Promise<void> => {
    note.textContent = deskWords[language].stages.sizing;
    host.querySelector('.save-bar')?.setAttribute('aria-busy', 'true');
    for (const control of host.querySelectorAll<HTMLButtonElement | HTMLSelectElement>('.save-files button, #code'))
      control.disabled = true;
    const end = await worker.ask({ ask: 'code', code: chosen });
    if (end === null) return;
    if (end.say === 'page') {
      code = chosen;
      open(end.data);
      host.querySelector<HTMLElement>('#code')?.focus();
    } else if (end.say === 'refused') {
      for (const control of host.querySelectorAll<HTMLButtonElement>('.save-files button, #code'))
        control.disabled = false;
      const select = host.querySelector<HTMLSelectElement>('#code');
      if (select !== null) select.value = code;
      note.textContent = end.message;
    }
  };
  const suppose = async (edits: readonly DeskEdit[], note: HTMLElement): Promise<void> => {
    const end = await worker.ask({ ask: 'what-if', edits });
    if (end?.say === 'page') open(end.data, edits);
    else if (end?.say === 'refused') note.textContent = end.message;
    host.querySelector<HTMLElement>('#card-title')?.focus({ preventScroll: true });
  };
  const save = async (what: SaveKind, note: HTMLElement): Promise<void> => {
    const end = await worker.ask({ ask: 'save', what });
    if (end?.say === 'refused') note.textContent = end.message;
    if (end?.say !== 'file') return;
    const url = URL.createObjectURL(new Blob([new Uint8Array(end.bytes)], { type: 'application/octet-stream' }));
    make('a', { href: url, download: end.name }).click();
    // The browser reads the bytes after the click.
    window.setTimeout(() => URL.revokeObjectURL(url), 60_000);
    note.textContent = deskWords[language].saved(shown(end.name));
  };

  // A file dropped beside the mark must not take the browser away from the page.
  window.addEventListener('dragover', (event) => event.preventDefault());
  window.addEventListener('drop', (event) => {
    event.preventDefault();
    const files = [...(event.dataTransfer?.files ?? [])];
    const isIdle = view !== null && host.querySelector('progress') === null;
    if (isIdle && files.length > 0) void check(files);
  });
  drop().idle();
}

/** One thing is supposed of one element once: a later word on the same takes the place of the earlier. */
function withEdit(edits: readonly DeskEdit[], edit: DeskEdit): readonly DeskEdit[] {
  const verb = ({ about, words }: DeskEdit): string => `${about} ${words.split(' ')[0]}`;
  return [...edits.filter((one) => verb(one) !== verb(edit)), edit];
}
