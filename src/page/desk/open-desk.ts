import type { DeskParts } from '../../deliver/desk-html.ts';
import type { PageData } from '../../deliver/page-data.ts';
import { buildingOf } from '../building.ts';
import { openModel } from '../open-model.ts';
import { make } from '../panel/element.ts';
import { shown } from '../panel/names.ts';
import type { Language, PageState } from '../state.ts';
import { deskWords } from '../words/desk-words.ts';
import { deskWorker } from './desk-worker.ts';
import { type DropView, dropView } from './drop-view.ts';
import { type Dropped, droppedFiles, withDropped } from './dropped.ts';
import type { DeskAsk, DeskEdit, DeskOwn, SaveKind } from './messages.ts';
import { saveBar } from './save-bar.ts';
import { whatIfControls } from './what-if-controls.ts';

/** The empty page inside `host`. A model dropped on it is checked in a worker; then the page opens on the result. */
export function openDesk(host: HTMLElement, parts: DeskParts): void {
  const worker = deskWorker(parts);
  let language: Language = /^fr\b/i.test(navigator.language) ? 'fr' : 'en';
  let code = parts.standard;
  let own: DeskOwn = { answers: null, tables: null };
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
    view = dropView(parts, language, code, own, {
      check: (dropped) => void check(dropped),
      give: (dropped) => void take(dropped),
      leaveOut(part) {
        own = { ...own, [part]: null };
        empty();
      },
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

  /** Models start a check; without one, what came is kept for it. */
  const check = async (dropped: Dropped): Promise<void> => {
    if (dropped.models.length === 0) {
      await take(dropped);
      return;
    }
    const at = view ?? drop();
    const names = dropped.models.map(({ name }) => name);
    at.busy(names, 'unpacking');
    let asked: DeskAsk;
    try {
      own = await withDropped(own, dropped);
      const inputs = await Promise.all(
        dropped.models.map(async (file) => ({ name: file.name, bytes: new Uint8Array(await file.arrayBuffer()) })),
      );
      asked = { ask: 'check', inputs, code, own };
    } catch (reason) {
      at.refused(unreadable(names, reason), false);
      return;
    }
    // Cancelled while the browser was reading.
    if (view !== at) return;
    const end = await worker.ask(asked, (stage) => at.busy(names, stage));
    if (end?.say === 'page') open(end.data);
    else if (end?.say === 'refused') drop().refused(end.message, end.fault);
  };
  /** Answers or tables without a model: for the model that is open, else for the next one. */
  const take = async (dropped: Dropped): Promise<void> => {
    let given: DeskOwn;
    try {
      given = await withDropped(own, dropped);
    } catch (reason) {
      view?.refused(unreadable([dropped.answers?.name ?? dropped.tables?.name ?? ''], reason), false);
      return;
    }
    if (view === null) await recheck(code, given);
    else {
      own = given;
      empty();
    }
  };

  const open = (data: PageData, edits: readonly DeskEdit[] = [], state: Partial<PageState> = {}): void => {
    close();
    view = null;
    const note = make('span', { class: 'save-note', role: 'status' });
    const { model, models } = data.result;
    document.title = `${(models ?? [model]).map(({ file }) => shown(file)).join(', ')} · Drainwright`;
    const building = buildingOf(data);
    const wrong = data.result.findings.some(({ severity }) => severity === 'error');
    close = openModel(host, data, {
      language,
      ...(data.mend === null ? {} : { kept: { state, eye: null } }),
      bar(now) {
        language = now;
        note.textContent =
          edits.length === 0 ? '' : `${deskWords[now].whatIf.now} ${edits.map(({ words }) => words).join(' · ')}`;
        return saveBar(parts, now, { code, own }, note, {
          save: (what) => void save(what, note),
          another: () => empty(),
          chooseCode: (chosen) => void recheck(chosen, own),
          give: (dropped) => void take(dropped),
          leaveOut: (part) => void recheck(code, { ...own, [part]: null }),
          back: edits.length === 0 ? null : () => void suppose([], note),
          mend: !wrong || data.mend !== null || edits.length > 0 ? null : () => void mend(note),
        });
      },
      whatIf: (now, chosen) =>
        whatIfControls(building, now, chosen, (edit) => void suppose(withEdit(edits, edit), note)),
    });
  };
  /** The open building by another code, or with other answers or tables; where they are refused, all stays as it is. */
  const recheck = async (chosen: string, given: DeskOwn): Promise<void> => {
    const bar = host.querySelector<HTMLElement>('.save-bar');
    const note = bar?.querySelector<HTMLElement>('.save-note');
    if (bar == null || note == null) return;
    const controls = [...bar.querySelectorAll<HTMLButtonElement | HTMLSelectElement>('button, select, input')];
    note.textContent = deskWords[language].stages.sizing;
    bar.setAttribute('aria-busy', 'true');
    for (const control of controls) control.disabled = true;
    const end = await worker.ask({ ask: 'code', code: chosen, own: given });
    if (end?.say === 'page') {
      [code, own] = [chosen, given];
      open(end.data);
      host.querySelector<HTMLElement>('#code')?.focus();
    } else if (end?.say === 'refused') {
      bar.removeAttribute('aria-busy');
      for (const control of controls) control.disabled = false;
      const select = bar.querySelector<HTMLSelectElement>('#code');
      if (select !== null) select.value = code;
      note.textContent = end.message;
    }
  };
  /** The same model with its plan, told first. */
  const mend = async (note: HTMLElement): Promise<void> => {
    note.textContent = deskWords[language].mending;
    host.querySelector('.save-bar')?.setAttribute('aria-busy', 'true');
    const end = await worker.ask({ ask: 'mend' });
    if (end?.say === 'page') open(end.data, [], { tab: 'mend', colourBy: 'change' });
    else if (end?.say === 'refused') note.textContent = end.message;
    host.querySelector<HTMLElement>('#tab-mend')?.focus();
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
    const isBusy = host.querySelector('progress, .save-bar[aria-busy]') !== null;
    if (!isBusy && event.dataTransfer !== null) void droppedFiles(event.dataTransfer).then(check);
  });
  drop().idle();
}

const unreadable = (names: readonly string[], reason: unknown): string =>
  `${names.join(', ')}: cannot be read: ${reason instanceof Error ? reason.message : String(reason)}`;

/** One thing is supposed of one element once: a later word on the same takes the place of the earlier. */
function withEdit(edits: readonly DeskEdit[], edit: DeskEdit): readonly DeskEdit[] {
  const verb = ({ about, words }: DeskEdit): string => `${about} ${words.split(' ')[0]}`;
  return [...edits.filter((one) => verb(one) !== verb(edit)), edit];
}
