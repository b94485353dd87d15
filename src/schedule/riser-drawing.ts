import { fixtureSymbolPath } from './fixture-symbols.ts';
import type { Riser } from './riser.ts';
import type { Flat } from './riser-isometry.ts';
import { type LabelBox, lineHeight, type PlacedRiser, type RiserLabel } from './riser-labels.ts';
import type { RiserLine } from './riser-line.ts';
import { type RiserSymbol, symbolSize } from './riser-symbols.ts';
import { type SvgShape, shape, words } from './svg-shape.ts';

export interface RiserWords {
  readonly looks: Readonly<Record<'drain' | 'vent' | 'both' | 'undersized', string>>;
  readonly marks: Readonly<Record<Exclude<RiserSymbol['is'], 'fixture'>, string>>;
  kind(kind: string | null): string;
}

/**
 * The drawing of a riser in black; classes name what each thing is, so that a page may colour it. Undersized pipes are
 * drawn heavier besides: the drawing must speak on a photocopy.
 */
export function riserDrawing(
  riser: Riser,
  placed: PlacedRiser,
  names: RiserWords,
): {
  readonly shapes: readonly SvgShape[];
  readonly frame: LabelBox;
} {
  const legend = legendOf(riser, placed.frame, names);
  const shapes = [
    shape(
      'g',
      { class: 'floors', stroke: '#666666', 'stroke-width': 0.8 },
      ...riser.floors.map(({ at }) => floorMark(at)),
    ),
    shape(
      'g',
      { class: 'leaders', stroke: '#888888', 'stroke-width': 0.7, fill: 'none' },
      ...placed.labels.flatMap(({ leader }) => (leader === null ? [] : [shape('path', { d: pathOf(leader) })])),
    ),
    ...riser.lines.flatMap(lineShapes),
    ...riser.symbols.map(symbolShape),
    ...placed.labels.map(labelShape),
    ...legend.shapes,
  ];
  const { x, y, width, height } = placed.frame;
  return { shapes, frame: { x, y, width: Math.max(width, legend.width), height: height + legend.height } };
}

const pathOf = (points: readonly Flat[]): string =>
  points.map(([x, y], at) => `${at === 0 ? 'M' : 'L'}${short(x)} ${short(y)}`).join(' ');
const short = (value: number): number => Math.round(value * 10) / 10;

/** What a line is drawn over is interrupted beside it, as on a drawing by hand: the gap says which one is in front. */
function lineShapes({ section, pipe, look, verdict, width, points }: RiserLine): readonly SvgShape[] {
  const d = pathOf(points);
  const inner = pathOf(shortened(points, 7));
  const small = verdict === 'undersized';
  const weight = small ? width + 2.4 : width;
  const name = `riser-line ${look}${verdict === null ? '' : ` ${verdict}`}`;
  const data = pipe < 0 ? {} : { 'data-pipe': pipe };
  const base = {
    fill: 'none',
    stroke: '#000000',
    'stroke-width': weight,
    'stroke-linecap': 'round',
    'stroke-linejoin': 'round',
  };
  return [
    shape('path', { class: 'casing', d: inner, fill: 'none', stroke: '#ffffff', 'stroke-width': weight + 5 }),
    shape('path', {
      class: name,
      ...data,
      'data-section': section,
      d,
      ...base,
      ...(look === 'vent' ? { 'stroke-dasharray': '7 4', 'stroke-linecap': 'butt' } : {}),
    }),
    // A wet vent is a drain that also breathes: a whole line with the vent's dashes down its middle.
    ...(look === 'both'
      ? [
          shape('path', {
            class: 'breath',
            d,
            fill: 'none',
            stroke: '#ffffff',
            'stroke-width': Math.max(0.9, weight * 0.34),
            'stroke-dasharray': '6 4',
          }),
        ]
      : []),
    ...(pipe < 0
      ? []
      : [
          shape('path', {
            class: 'reach',
            'data-pipe': pipe,
            d,
            fill: 'none',
            stroke: '#000000',
            'stroke-opacity': 0,
            'stroke-width': 12,
          }),
        ]),
  ];
}

/** Without its two ends, so that a gap never cuts into what joins there; nothing where too little is left. */
function shortened(points: readonly Flat[], by: number): readonly Flat[] {
  const [first, last] = [points[0], points.at(-1)];
  if (first === undefined || last === undefined) return [];
  const pulled = (from: Flat, to: Flat): Flat | null => {
    const length = Math.hypot(to[0] - from[0], to[1] - from[1]);
    return length <= by
      ? null
      : [from[0] + ((to[0] - from[0]) * by) / length, from[1] + ((to[1] - from[1]) * by) / length];
  };
  if (points.length === 2) {
    const [a, b] = [pulled(first, last), pulled(last, first)];
    const long = Math.hypot(last[0] - first[0], last[1] - first[1]) > 2.5 * by;
    return a === null || b === null || !long ? [] : [a, b];
  }
  const head = pulled(first, points[1]!);
  const tail = pulled(last, points.at(-2)!);
  return [...(head === null ? [] : [head]), ...points.slice(1, -1), ...(tail === null ? [] : [tail])];
}

const floorMark = ([x, y]: Flat): SvgShape =>
  shape('path', {
    d: `M${short(x - 13)} ${short(y - 7.5)}L${short(x + 13)} ${short(y + 7.5)}M${short(x - 13)} ${short(y + 7.5)}L${short(x + 13)} ${short(y - 7.5)}`,
  });

function symbolShape(symbol: RiserSymbol): SvgShape {
  const [x, y] = symbol.at;
  const marks: Readonly<Record<Exclude<RiserSymbol['is'], 'fixture'>, string>> = {
    cleanout: 'M-5 0L5 0M0 0m-5 0a5 5 0 1 0 10 0a5 5 0 1 0-10 0M0 -5L0 5',
    'open-air': 'M0 0L0 -8M-4 -4L0 -9L4 -4M-6 -12L6 -12',
    'admittance-valve': 'M0 0L0 -5M0 -10m-5 0a5 5 0 1 0 10 0a5 5 0 1 0-10 0M-3 -10L3 -10',
    sewer: 'M0 0m-6 0a6 6 0 1 0 12 0a6 6 0 1 0-12 0M-4 -4L4 4M-4 4L4 -4',
    'no-air': 'M-7 -7L7 7M-7 7L7 -7',
  };
  const line = {
    fill: 'none',
    stroke: '#000000',
    'stroke-width': 1.1,
    'stroke-linecap': 'round',
    'stroke-linejoin': 'round',
  };
  if (symbol.is !== 'fixture')
    return shape(
      'g',
      { class: `riser-mark ${symbol.is}`, transform: `translate(${short(x)} ${short(y)})` },
      shape('path', { d: marks[symbol.is], ...line, ...(symbol.is === 'no-air' ? { 'stroke-width': 2.4 } : {}) }),
    );
  const grow = symbolSize / 24;
  return shape(
    'g',
    {
      class: 'riser-fixture',
      'data-fixture': symbol.fixture,
      transform: `translate(${short(x - symbolSize / 2)} ${short(y - symbolSize)}) scale(${Math.round(grow * 1000) / 1000})`,
    },
    shape('rect', { class: 'reach', width: 24, height: 24, fill: '#ffffff', 'fill-opacity': 0.85, rx: 3 }),
    shape('path', { d: fixtureSymbolPath(symbol.kind), ...line }),
  );
}

function labelShape({ texts, box, run, floor }: RiserLabel): SvgShape {
  const name = floor === null ? `riser-label${run?.undersized === true ? ' undersized' : ''}` : 'riser-label floor';
  return shape(
    'g',
    { class: name, ...(run === null || run.pipe < 0 ? {} : { 'data-pipe': run.pipe }) },
    ...texts.map((text, at) =>
      words(
        {
          x: short(box.x + 3),
          y: short(box.y + 10 + at * lineHeight),
          fill: '#000000',
          ...(run?.undersized === true ? { 'font-weight': 700 } : {}),
          ...(run?.role != null && at === 0 ? { 'font-style': 'italic' } : {}),
        },
        text,
      ),
    ),
  );
}

const column = 190;

/** What the lines and symbols mean, below the drawing: only those that occur. */
function legendOf(
  riser: Riser,
  frame: LabelBox,
  names: RiserWords,
): { readonly shapes: readonly SvgShape[]; readonly width: number; readonly height: number } {
  const looks = (['drain', 'both', 'vent'] as const).filter((look) => riser.lines.some((line) => line.look === look));
  const entries: { readonly text: string; draw(at: Flat): readonly SvgShape[] }[] = looks.map((look) => ({
    text: names.looks[look],
    draw: ([x, y]) =>
      lineShapes({
        section: -1 as RiserLine['section'],
        pipe: -1,
        look,
        verdict: null,
        width: 2.4,
        points: [
          [x, y],
          [x + 30, y],
        ],
      }).slice(1),
  }));
  if (riser.lines.some(({ verdict }) => verdict === 'undersized'))
    entries.push({
      text: names.looks.undersized,
      draw: ([x, y]) =>
        lineShapes({
          section: -1 as RiserLine['section'],
          pipe: -1,
          look: 'drain',
          verdict: 'undersized',
          width: 2.4,
          points: [
            [x, y],
            [x + 30, y],
          ],
        }).slice(1),
    });
  const kinds = [...new Set(riser.symbols.filter(({ is }) => is === 'fixture').map(({ kind }) => kind))].sort((a, b) =>
    (a ?? '~') < (b ?? '~') ? -1 : 1,
  );
  for (const kind of kinds)
    entries.push({
      text: names.kind(kind),
      draw: ([x, y]) => [symbolShape({ is: 'fixture', kind, fixture: -1, at: [x + 15, y + symbolSize / 2] })],
    });
  for (const is of ['cleanout', 'open-air', 'admittance-valve', 'sewer', 'no-air'] as const)
    if (riser.symbols.some((symbol) => symbol.is === is))
      entries.push({
        text: names.marks[is],
        draw: ([x, y]) => [
          symbolShape({
            is,
            kind: null,
            fixture: -1,
            at: [x + 15, y + (is === 'sewer' || is === 'no-air' || is === 'cleanout' ? 0 : 6)],
          }),
        ],
      });
  const columns = Math.max(2, Math.floor(frame.width / column));
  const rows = Math.ceil(entries.length / columns);
  const top = frame.y + frame.height + 6;
  const shapes = entries.flatMap(({ text, draw }, at) => {
    const x = frame.x + 20 + Math.floor(at / rows) * column;
    const y = top + 14 + (at % rows) * 28;
    return [...draw([x, y]), words({ class: 'legend-text', x: x + 40, y: y + 3.5, fill: '#000000' }, text)];
  });
  const line = shape('path', {
    class: 'legend-line',
    d: `M${frame.x + 16} ${top - 6}h${Math.max(frame.width, columns * column) - 32}`,
    stroke: '#999999',
    'stroke-width': 0.6,
  });
  return {
    shapes: [line, shape('g', { class: 'riser-legend' }, ...shapes)],
    width: columns * column,
    height: rows * 28 + 24,
  };
}
