import { decimal, oneSize, shortLoad } from '../format.ts';
import type { Follow } from '../state.ts';
import { named } from '../words/words.ts';
import type { Desk } from './desk.ts';
import { make, makeSvg, modelText } from './element.ts';
import { capital, fixtureName } from './names.ts';

/** The ride along a way: a slider, what one passes, and a profile of load and size from trap to sewer or to the sky. */
export function followDock(desk: Desk, follow: Follow): HTMLElement {
  const { building, words, store } = desk;
  const air = building.air(follow.fixture);
  const sections = follow.what === 'water' ? building.water(follow.fixture) : [...air.arm, ...air.through, ...air.dry];
  const name = fixtureName(building, words, follow.fixture);
  const step = Math.min(follow.step, Math.max(0, sections.length - 1));
  const slider = make('input', {
    type: 'range',
    id: 'follow-step',
    min: 0,
    max: Math.max(0, sections.length - 1),
    value: step,
    'aria-label': words.follow.step,
    'aria-valuetext': stepText(desk, follow, sections, step),
    oninput: () => store.set({ follow: { ...follow, step: Number(slider.value) } }),
  });
  const pipe = building.data.scene.pipes.pipe[sections[step] ?? -1] ?? -1;
  return make(
    'section',
    {
      class: `dock dock-${follow.what}`,
      'aria-label': follow.what === 'water' ? words.follow.water(name) : words.follow.air(name),
    },
    make(
      'header',
      {},
      make('h2', {}, modelText(follow.what === 'water' ? words.follow.water(name) : words.follow.air(name))),
      make('button', { type: 'button', class: 'tool', onclick: () => store.set({ follow: null }) }, words.page.close),
    ),
    follow.what === 'air' && !air.vented && make('p', { class: 'stopped' }, `▲ ${words.follow.stopped}`),
    follow.what === 'water' ? profile(desk, sections, step) : airStrip(desk, follow, step),
    slider,
    make(
      'p',
      { class: 'dock-step' },
      stepText(desk, follow, sections, step),
      pipe >= 0 &&
        make('button', { type: 'button', class: 'link', onclick: () => desk.choosePipe(pipe) }, words.pipe.one),
    ),
  );
}

export function stepText({ building, words }: Desk, follow: Follow, sections: readonly number[], step: number): string {
  const section = sections[step];
  const state = section === undefined ? undefined : building.state(section);
  const air = building.air(follow.fixture);
  const part =
    follow.what === 'water'
      ? null
      : step < air.arm.length
        ? words.follow.parts.arm
        : step < air.arm.length + air.through.length
          ? words.follow.parts.through
          : words.follow.parts.dry;
  if (state === undefined) return part ?? '';
  const load = follow.what === 'water' ? state.load : (state.ventLoad ?? state.load);
  return [
    capital(named(words.roles, state.role)),
    part,
    shortLoad(words, load, building.result.code.unit),
    oneSize(words, state.modelled, ''),
    state.verdict === 'undersized' ? `▲ ${oneSize(words, state.required?.most, '')}` : null,
  ]
    .filter((text) => text != null && text !== '')
    .join(' · ');
}

const width = 600;
const height = 92;

/** Load as a staircase along the way; under it the pipe: as wide as it must be, outlined as wide as it is drawn. */
function profile(desk: Desk, sections: readonly number[], step: number): SVGSVGElement {
  const { building, words } = desk;
  const lengths = sections.map((section) => Math.max(0.15, building.state(section)?.length ?? 0.15));
  const total = lengths.reduce((sum, length) => sum + length, 0) || 1;
  const loads = sections.map((section) => building.state(section)?.load.most ?? 0);
  const top = Math.max(1, ...loads);
  const widest = Math.max(
    0.02,
    ...sections.map((section) => Math.max(building.needRadius[section]!, building.radius[section]!)),
  );
  const parts: SVGElement[] = [];
  const base = 46;
  const middle = 72;
  let x = 0;
  let stairs = `M0 ${base}`;
  sections.forEach((section, place) => {
    const w = (lengths[place]! / total) * width;
    const y = base - (loads[place]! / top) * 38;
    stairs += ` L${fix(x)} ${fix(y)} L${fix(x + w)} ${fix(y)}`;
    const need = (building.needRadius[section]! / widest) * 17;
    const drawn = (building.radius[section]! / widest) * 17;
    const small = building.state(section)?.verdict === 'undersized';
    parts.push(
      makeSvg('rect', {
        class: small ? 'need small' : 'need',
        x: fix(x),
        y: fix(middle - need),
        width: fix(w + 0.5),
        height: fix(2 * need),
      }),
      makeSvg('path', {
        class: 'drawn',
        d: `M${fix(x)} ${fix(middle - drawn)}h${fix(w)} M${fix(x)} ${fix(middle + drawn)}h${fix(w)}`,
      }),
    );
    if (place === step)
      parts.push(makeSvg('line', { class: 'here', x1: fix(x + w), y1: 2, x2: fix(x + w), y2: height - 2 }));
    x += w;
  });
  stairs += ` L${width} ${base} Z`;
  return makeSvg(
    'svg',
    {
      class: 'profile',
      viewBox: `0 0 ${width} ${height}`,
      role: 'img',
      preserveAspectRatio: 'none',
      'aria-label': words.follow.profile,
    },
    makeSvg('path', { class: 'stairs', d: stairs }),
    ...parts,
    makeSvg(
      'text',
      { class: 'top', x: width - 4, y: 10 },
      `${decimal(words, top, 2)} ${words.shortUnit(building.result.code.unit)}`,
    ),
  );
}

/** Three kinds of pipe on the way of the air, in their share of its length. */
function airStrip({ building, words }: Desk, follow: Follow, step: number): HTMLElement {
  const air = building.air(follow.fixture);
  let place = 0;
  const part = (kind: 'arm' | 'through' | 'dry', sections: readonly number[]): HTMLElement | null => {
    if (sections.length === 0) return null;
    const length = sections.reduce((sum, section) => sum + (building.state(section)?.length ?? 0.1), 0);
    const here = step >= place && step < place + sections.length;
    place += sections.length;
    const box = make('div', { class: `air-${kind}${here ? ' here' : ''}` }, words.follow.parts[kind]);
    box.style.flexGrow = String(Math.max(1, length));
    return box;
  };
  return make(
    'div',
    { class: 'air-strip' },
    part('arm', air.arm),
    part('through', air.through),
    part('dry', air.dry),
    make('div', { class: air.vented ? 'air-end' : 'air-end stopped' }, air.vented ? words.follow.reaches : '▲'),
  );
}

const fix = (value: number): string => String(Math.round(value * 10) / 10);
