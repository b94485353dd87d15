import { InputError } from '../../src/findings/input-error.ts';
import type { Vec3 } from '../../src/geometry/vector.ts';
import type { PipeSize } from './pipe-sizes.ts';
import type { Sketch, SketchMedium, SketchPipe, SketchSystem } from './sketch.ts';
import { readFabric, readSpace, readWall } from './sketch-building.ts';
import { isPartWord, readFitting, readFixture } from './sketch-part-lines.ts';
import { readPath } from './sketch-path.ts';
import { type NameOf, readPoint, resolvePlaces } from './sketch-places.ts';
import { putNode, type Scope, type Sheet } from './sketch-sheet.ts';
import { Cursor, type Statement, statements } from './sketch-tokens.ts';

const media: Readonly<Record<string, SketchSystem>> = {
  drain: { medium: 'drain', name: 'Sanitary drainage', predefined: 'SEWAGE' },
  vent: { medium: 'vent', name: 'Sanitary vent', predefined: 'VENT' },
  rain: { medium: 'rain', name: 'Rainwater', predefined: 'RAINWATER' },
  supply: { medium: 'supply', name: 'Domestic cold water', predefined: 'DOMESTICCOLDWATER' },
};

export function readSketch(text: string): Sketch {
  const sheet: Sheet = {
    title: 'Sketch',
    material: 'PVC-DWV',
    storey: null,
    storeys: [],
    spaces: [],
    walls: [],
    slabs: [],
    roofs: [],
    systems: [],
    places: new Map(),
    nodeStoreys: new Map(),
    bare: new Set(),
    missing: new Set(),
    pipes: [],
    parts: [],
  };
  const blocks = new Map<string, readonly Statement[]>();
  const whole: Scope = { prefix: '', origin: [0, 0, 0], nameOf: (name) => name };
  const all = statements(text);
  for (let at = 0; at < all.length; at += 1) {
    const statement = all[at]!;
    if (statement.words[0] === 'typical') {
      const end = all.findIndex(({ words }, index) => index > at && words[0] === 'end');
      if (end < 0) throw new InputError(`line ${statement.line}`, '"typical" without "end"');
      blocks.set(
        new Cursor({ ...statement, words: statement.words.slice(1) }).name('name of the block'),
        all.slice(at + 1, end),
      );
      at = end;
    } else if (statement.words[0] === 'place') {
      const cursor = new Cursor(statement);
      cursor.need('place');
      const name = cursor.name('name of the block');
      const block = blocks.get(name) ?? cursor.fail(`no block "${name}" stands above`);
      cursor.need('as');
      const prefix = cursor.name('prefix');
      cursor.need('at');
      const scope: Scope = {
        prefix: `${prefix}.`,
        origin: readPoint(cursor),
        nameOf: scopedNames(block, `${prefix}.`, sheet),
      };
      cursor.end();
      for (const line of block) readLine(line, sheet, scope);
    } else readLine(statement, sheet, whole);
  }
  return closed(sheet);
}

/** Names that the block, or another one of the same prefix, places carry the prefix; all others are names of the sheet. */
function scopedNames(block: readonly Statement[], prefix: string, { places }: Sheet): NameOf {
  const own = new Set<string>();
  for (const { words } of block) {
    if (words[0] === 'node' || isPartWord(words[0])) own.add(words[1] ?? '');
    for (const [index, word] of words.entries()) if (words[index + 1] === '(') own.add(word);
  }
  return (name) => (own.has(name) || places.has(prefix + name) ? prefix + name : name);
}

function readLine(statement: Statement, sheet: Sheet, scope: Scope): void {
  const cursor = new Cursor(statement);
  const keyword = cursor.take('keyword');
  switch (keyword) {
    case 'model':
      sheet.title = cursor.text('title');
      break;
    case 'material':
      sheet.material = cursor.text('material');
      break;
    case 'storey': {
      const name = cursor.text('name of the storey');
      cursor.need('at');
      if (sheet.storeys.some((storey) => storey.name === name)) cursor.fail(`storey "${name}" stands above already`);
      sheet.storeys.push({ name, elevation: cursor.number('elevation') });
      sheet.storey = sheet.storeys.length - 1;
      break;
    }
    case 'on': {
      const name = cursor.text('name of the storey');
      const found = sheet.storeys.findIndex((storey) => storey.name === name);
      sheet.storey = found < 0 ? cursor.fail(`no storey "${name}" stands above`) : found;
      break;
    }
    case 'system': {
      const word = cursor.take('drain, vent, rain or supply');
      const system = media[word] ?? cursor.fail(`"${word}" is none of drain, vent, rain, supply`);
      const name = cursor.text('name of the system');
      sheet.systems.push({
        ...system,
        name,
        predefined: cursor.done ? system.predefined : cursor.take('type').toUpperCase(),
      });
      break;
    }
    case 'space':
      sheet.spaces.push(readSpace(cursor, sheet, scope));
      break;
    case 'wall':
      sheet.walls.push(readWall(cursor, sheet, scope));
      break;
    case 'slab':
      sheet.slabs.push(readFabric(cursor, sheet, scope));
      break;
    case 'roof':
      sheet.roofs.push(readFabric(cursor, sheet, scope));
      break;
    case 'node': {
      const name = scope.nameOf(cursor.name('name of the node'));
      putNode(sheet, cursor, scope, name);
      if (cursor.took('bare')) sheet.bare.add(name);
      else if (cursor.took('missing')) sheet.missing.add(name);
      break;
    }
    default:
      if (keyword in media || keyword === 'pipe') readPipes(cursor, keyword as SketchMedium, sheet, scope);
      else if (isPartWord(keyword)) readPart(cursor, keyword, sheet, scope);
      else cursor.fail(`"${keyword}" begins no line of the notation`);
  }
  cursor.end();
}

function readPart(cursor: Cursor, keyword: string, sheet: Sheet, scope: Scope): void {
  const name = scope.nameOf(cursor.name(`name of the ${keyword}`));
  putNode(sheet, cursor, scope, name);
  if (sheet.parts.some((part) => part.name === name)) cursor.fail(`${name} is a part already`);
  if (!sheet.nodeStoreys.has(name)) sheet.nodeStoreys.set(name, sheet.storey);
  sheet.parts.push(readFixture(cursor, keyword, name) ?? readFitting(cursor, keyword, name));
}

/** `drain Branch 3 in: A > B > C`: a pipe for each step, or with `whole` one solid that runs past the nodes between. */
function readPipes(cursor: Cursor, medium: SketchMedium, sheet: Sheet, scope: Scope): void {
  const title = cursor.atSize ? null : scope.prefix + cursor.name('name of the pipe');
  const size: PipeSize = cursor.size('size');
  let material = sheet.material;
  let whole = false;
  let states: number | null = null;
  let sized: SketchPipe['sized'] = 'plainly';
  let twice = false;
  let turned = false;
  while (!cursor.took(':')) {
    if (cursor.took('whole')) whole = true;
    else if (cursor.took('material')) material = cursor.text('material');
    else if (cursor.took('states')) states = cursor.slope('stated slope');
    else if (cursor.took('unsized')) sized = 'nowhere';
    else if (cursor.took('name-sized')) sized = 'by name';
    else if (cursor.took('twice')) twice = true;
    else if (cursor.took('turned')) turned = true;
    else cursor.fail(`":" expected before the nodes, found "${cursor.peek() ?? 'the end of the line'}"`);
  }
  const path = readPath(cursor, sheet, scope);
  const legs = whole ? [path] : path.slice(1).map((node, index) => [path[index]!, node]);
  for (const [index, nodes] of legs.entries()) {
    const numbered = legs.length === 1 ? title : `${title}.${index + 1}`;
    const name = title === null ? `${nodes[0]}-${nodes.at(-1)}` : numbered!;
    const drawn = { name, medium, size, material, nodes, storey: sheet.storey, states, sized, twice, turned };
    sheet.pipes.push({ ...drawn, line: cursor.line });
  }
}

function closed(sheet: Sheet): Sketch {
  const used = new Map<string, number>();
  for (const { name, line, nodes } of sheet.pipes) {
    if (used.has(name) || sheet.places.has(name)) throw new InputError(`line ${line}`, `the name ${name} is taken`);
    used.set(name, line);
    for (const node of nodes)
      if (!sheet.places.has(node)) throw new InputError(`line ${line}`, `no line says where ${node} lies`);
  }
  for (const { name, line } of sheet.parts)
    if (!sheet.places.has(name)) throw new InputError(`line ${line}`, `no line says where ${name} lies`);
  const at = resolvePlaces(sheet.places);
  const node = (name: string, point: Vec3) => ({
    name,
    at: point,
    storey: sheet.nodeStoreys.get(name) ?? null,
    bare: sheet.bare.has(name),
    missing: sheet.missing.has(name),
  });
  const drawn = new Set(sheet.pipes.map(({ medium }) => medium));
  const named = new Set(sheet.systems.map(({ medium }) => medium));
  const others = Object.values(media).filter(({ medium }) => drawn.has(medium) && !named.has(medium));
  return {
    title: sheet.title,
    storeys: sheet.storeys,
    spaces: sheet.spaces,
    walls: sheet.walls,
    slabs: sheet.slabs,
    roofs: sheet.roofs,
    systems: [...sheet.systems, ...others],
    nodes: new Map([...at].map(([name, point]) => [name, node(name, point)])),
    pipes: sheet.pipes.map(({ line: _, ...pipe }) => pipe),
    parts: sheet.parts,
  };
}
