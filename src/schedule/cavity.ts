import { decimal } from './number-text.ts';
import { shownText, unbroken, wrapped } from './shown-text.ts';
import { type SvgShape, shape, svgText, words } from './svg-shape.ts';
import { listed } from './trade-words.ts';
import type { WeighAlternative, WeighBattery, WeighResult, WeighWall } from './weigh.ts';
import { englishWeigh } from './weigh-english.ts';
import type { WeighWords } from './weigh-words.ts';

/** A drawing and the room it takes, in its own units. */
export interface Drawing {
  readonly shapes: readonly SvgShape[];
  readonly width: number;
  readonly height: number;
}

/** Units of the drawing for a millimetre of the wall: 1 : 2 where a unit is a millimetre. */
const scale = 0.5;
const panel = { width: 320, gap: 20, margin: 20 };
const heights = { title: 46, heading: 26, note: 78, battery: 26 };
/** What is shown of a wall, millimetres: two studs and the bays beside them. */
const shown = { length: 560, firstStud: 60, spacing: 400, face: 38, board: 13 };
const ink = '#1b1b1b';
const fault = '#b00020';
const quiet = '#5a5a5a';

/** One SVG document: a cut through the wall at every battery, its readings side by side. Black on white, for print. */
export function cavitySvg({ batteries, model, models, code }: WeighResult): string {
  const drawings = batteries.map((battery) => cavityDrawing(battery, englishWeigh));
  const width = Math.max(2 * panel.margin + panel.width, ...drawings.map((one) => one.width));
  let y = heights.title;
  const placed = drawings.map(({ shapes, height }) => {
    const group = shape('g', { transform: `translate(0 ${round(y)})` }, ...shapes);
    y += height;
    return group;
  });
  const files = listed((models ?? [model]).map(({ file }) => shownText(file)));
  const title = `${files}, ${code.id}: cut through the wall`;
  const height = y + 30;
  return svgText(
    [
      shape('rect', { x: 0, y: 0, width, height, fill: '#ffffff' }),
      words({ x: panel.margin, y: 28, 'font-size': 15, 'font-weight': 'bold', fill: ink }, title),
      ...placed,
      ...scaleBar(panel.margin, height - 14),
    ],
    { x: 0, y: 0, width, height },
    title,
  );
}

/** A battery's wall, cut level, under each reading: studs, pipe and fitting to scale, and the room that is left. */
export function cavityDrawing(battery: WeighBattery, said: WeighWords): Drawing {
  const { alternatives } = battery;
  const deepest = Math.max(
    89,
    ...alternatives.flatMap(({ wall }) => (wall === null ? [] : [drawnDepth(wall), wall.depth * 1000])),
  );
  const wallHeight = (deepest + 2 * shown.board) * scale + 30;
  const name = shownText(said.battery(battery));
  const panels = alternatives.map((one, at) =>
    shape(
      'g',
      { transform: `translate(${panel.margin + at * (panel.width + panel.gap)} ${heights.battery})` },
      ...panelShapes(one, wallHeight, said),
    ),
  );
  return {
    shapes: [words({ x: panel.margin, y: 14, 'font-size': 12, 'font-weight': 'bold', fill: ink }, name), ...panels],
    width: 2 * panel.margin + alternatives.length * panel.width + (alternatives.length - 1) * panel.gap,
    height: heights.battery + heights.heading + wallHeight + heights.note,
  };
}

function panelShapes(one: WeighAlternative, wallHeight: number, said: WeighWords): SvgShape[] {
  const { reading, modelled, wall, holds, broken } = one;
  const heading = `${said.vented(reading)}${modelled ? `, ${said.asModelled}` : ''}`;
  const head = words({ x: 0, y: 14, 'font-size': 12, fill: ink }, heading);
  if (wall === null) {
    const why = holds ? said.noWidth : said.cannotBe(broken.map(said.obstacle).join('; ') || said.noPlace);
    return [head, ...note(shownText(why), heights.heading + 16, holds ? quiet : fault)];
  }
  const middle = heights.heading + wallHeight / 2;
  const fits = fitsDrawn(wall);
  return [
    head,
    ...wallShapes(wall, middle),
    ...pipeShapes(wall, middle, fits ? ink : fault, said),
    ...dimensions(wall, middle, fits),
    ...note(captionText(wall, said), heights.heading + wallHeight + 14, fits ? ink : fault),
  ];
}

/** Millimetres: the shallowest modelled cavity, or the stud that takes it, or the fitting itself. */
function drawnDepth({ modelled, stud, depth }: WeighWall): number {
  const cavities = modelled.flatMap(({ cavity }) => cavity ?? []);
  if (cavities.length > 0) return Math.min(...cavities) * 1000;
  const deep = /(\d+)\s*$/.exec(stud ?? '')?.[1];
  return deep === undefined ? depth * 1000 : Number(deep);
}

const fitsDrawn = (wall: WeighWall): boolean => wall.depth * 1000 <= drawnDepth(wall) + 0.05 && wall.fits !== false;
const hasStuds = ({ modelled }: WeighWall): boolean =>
  modelled.length === 0 || modelled.some(({ framing }) => framing !== null);
const studsAt = [shown.firstStud, shown.firstStud + shown.spacing];

function wallShapes(wall: WeighWall, middle: number): SvgShape[] {
  const depth = drawnDepth(wall) * scale;
  const [top, bottom] = [middle - depth / 2, middle + depth / 2];
  const length = shown.length * scale;
  const board = shown.board * scale;
  const boards = [top - board, bottom].map((y) =>
    shape('rect', {
      x: 0,
      y: round(y),
      width: length,
      height: board,
      fill: '#e4e4e4',
      stroke: ink,
      'stroke-width': 0.6,
    }),
  );
  const studs = !hasStuds(wall)
    ? []
    : studsAt.flatMap((at) => {
        const [x, face] = [at * scale, shown.face * scale];
        const cross = { stroke: quiet, 'stroke-width': 0.5 };
        return [
          shape('rect', {
            x,
            y: round(top),
            width: face,
            height: round(depth),
            fill: '#ffffff',
            stroke: ink,
            'stroke-width': 1,
          }),
          shape('line', { x1: x, y1: round(top), x2: x + face, y2: round(bottom), ...cross }),
          shape('line', { x1: x, y1: round(bottom), x2: x + face, y2: round(top), ...cross }),
        ];
      });
  return [...boards, ...studs];
}

/** The widest pipe, upright as a circle or along the wall as a band; beside an upright one the level pipe dashed. */
function pipeShapes(wall: WeighWall, middle: number, colour: string, said: WeighWords): SvgShape[] {
  const { bored, lies, outside, depth, size } = wall;
  const holes = bored === null || !hasStuds(wall) ? [] : studHoles(bored.hole * 1000, middle);
  const label = (x: number): SvgShape =>
    words({ x, y: round(middle + 3.5), 'font-size': 10, 'text-anchor': 'middle', fill: colour }, said.size(size.label));
  if (lies === 'along') {
    const hub = depth * 1000 * scale;
    return [
      ...holes,
      ...levelPipe(outside * 1000, middle, colour, false),
      shape('rect', {
        x: 112,
        y: round(middle - hub / 2),
        width: 56,
        height: round(hub),
        fill: '#ffffff',
        stroke: colour,
        'stroke-width': 1.4,
      }),
      label(140),
    ];
  }
  const cx = (shown.firstStud + shown.face / 2 + shown.spacing / 2) * scale;
  const circle = (metres: number, look: SvgShape['attributes']): SvgShape =>
    shape('circle', { cx, cy: round(middle), r: round(metres * 500 * scale), stroke: colour, ...look });
  return [
    ...holes,
    ...(bored === null ? [] : levelPipe(bored.outside * 1000, middle, quiet, true)),
    circle(depth, { fill: '#ffffff', 'stroke-width': 1, 'stroke-dasharray': '4 2' }),
    circle(outside, { fill: '#f2f2f2', 'stroke-width': 2 }),
    // A small pipe has its size beside it.
    outside * 1000 * scale >= leastForLabel
      ? label(cx)
      : words(
          { x: round(cx + depth * 500 * scale + 5), y: round(middle + 3.5), 'font-size': 10, fill: colour },
          size.label,
        ),
  ];
}

/** Units of the drawing that a size needs to stand inside its circle. */
const leastForLabel = 36;

/** What a level pipe takes out of the studs. */
function studHoles(holeMm: number, middle: number): SvgShape[] {
  const half = (holeMm * scale) / 2;
  return studsAt.map((at) =>
    shape('rect', {
      x: at * scale,
      y: round(middle - half),
      width: shown.face * scale,
      height: round(2 * half),
      fill: '#ffffff',
      stroke: ink,
      'stroke-width': 0.8,
    }),
  );
}

function levelPipe(outerMm: number, middle: number, colour: string, behind: boolean): SvgShape[] {
  const half = (outerMm * scale) / 2;
  const line = { stroke: colour, 'stroke-width': behind ? 0.8 : 1.6, ...(behind ? { 'stroke-dasharray': '5 3' } : {}) };
  const length = shown.length * scale;
  const body = behind
    ? []
    : [
        shape('rect', {
          x: 0,
          y: round(middle - half),
          width: length,
          height: round(2 * half),
          fill: '#f2f2f2',
          stroke: 'none',
        }),
      ];
  return [
    ...body,
    ...[middle - half, middle + half].map((y) =>
      shape('line', { x1: 0, y1: round(y), x2: length, y2: round(y), ...line }),
    ),
  ];
}

/** Depth of the cavity to the right; what is left on either side of the fitting, or how much it lacks. */
function dimensions(wall: WeighWall, middle: number, fits: boolean): SvgShape[] {
  const depth = drawnDepth(wall);
  const x = shown.length * scale + 10;
  const [top, bottom] = [middle - (depth * scale) / 2, middle + (depth * scale) / 2];
  const tick = (y: number): SvgShape =>
    shape('line', { x1: x - 3, y1: round(y + 3), x2: x + 3, y2: round(y - 3), stroke: ink, 'stroke-width': 1 });
  return [
    shape('line', { x1: x, y1: round(top), x2: x, y2: round(bottom), stroke: ink, 'stroke-width': 0.7 }),
    tick(top),
    tick(bottom),
    words({ x: x + 6, y: round(middle + 4), 'font-size': 10, fill: fits ? ink : fault }, decimal(depth, 0)),
  ];
}

function captionText(wall: WeighWall, said: WeighWords): string {
  const { depth, judgedBy, size, laidAs, bored, stud, modelled } = wall;
  const room = drawnDepth(wall) - depth * 1000;
  return said.cut({
    size: said.size(size.label),
    laidAs: laidAs === undefined ? null : said.size(laidAs.label),
    judgedBy,
    depth: depth * 1000,
    room: room < -0.05 ? room : Math.max(0, room),
    isModelled: modelled.length > 0,
    stud: joined(stud),
    level:
      bored === null
        ? null
        : {
            size: said.size(bored.size.label),
            hole: bored.hole * 1000,
            stud: joined(bored.stud.other),
            loadbearing: joined(bored.stud.loadbearing),
          },
  });
}

const joined = (stud: string | null): string | null => (stud === null ? null : unbroken(stud));

const columns = 58;
const note = (text: string, y: number, fill: string): SvgShape[] =>
  wrapped(text, columns).map((line, at) => words({ x: 0, y: y + at * 13, 'font-size': 10, fill }, line));

function scaleBar(x: number, y: number): SvgShape[] {
  const length = 100 * scale;
  return [
    shape('line', { x1: x, y1: y, x2: x + length, y2: y, stroke: ink, 'stroke-width': 2 }),
    words(
      { x: x + length + 8, y: y + 3, 'font-size': 10, fill: quiet },
      '100 mm. Circle: pipe; dashed circle: its fitting; dashed band: a level pipe above or below, and its holes in the studs.',
    ),
  ];
}

const round = (value: number): number => Math.round(value * 100) / 100;
