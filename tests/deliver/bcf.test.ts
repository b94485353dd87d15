import { unzipSync } from 'fflate';
import { describe, expect, test } from 'vitest';
import { bcf, type IssueFile } from '../../src/deliver/bcf.ts';
import type { Result } from '../../src/schedule/result.ts';
import { sampleOutcome } from '../support/sample-outcomes.ts';

// Shapes and order of elements: the published schemas markup.xsd and visinfo.xsd of BCF-XML 2.1 (buildingSMART).
const order: Readonly<Record<string, readonly string[]>> = {
  Markup: ['Header', 'Topic', 'Comment', 'Viewpoints'],
  File: ['Filename', 'Date', 'Reference'],
  Topic: ['ReferenceLink', 'Title', 'Priority', 'Index', 'Labels', 'CreationDate', 'CreationAuthor', 'Description'],
  Viewpoints: ['Viewpoint', 'Snapshot', 'Index'],
  VisualizationInfo: ['Components', 'OrthogonalCamera', 'PerspectiveCamera'],
  Components: ['Selection', 'Visibility', 'Coloring'],
  PerspectiveCamera: ['CameraViewPoint', 'CameraDirection', 'CameraUpVector', 'FieldOfView'],
  CameraViewPoint: ['X', 'Y', 'Z'],
};
const uuid = /^[a-f0-9]{8}-[a-f0-9]{4}-[a-f0-9]{4}-[a-f0-9]{4}-[a-f0-9]{12}$/;
const file = (name: string): IssueFile => ({
  name,
  project: '1Wk6xzvOInuAej1YpSwjux',
  written: '2024-01-01T00:00:00Z',
});

interface Node {
  readonly tag: string;
  readonly attributes: Readonly<Record<string, string>>;
  readonly children: Node[];
  text: string;
}

/** Reads the small XML that we write: no namespaces, no mixed text; anything unclosed or unescaped fails. */
function read(bytes: Uint8Array): Node {
  const text = new TextDecoder('utf-8', { fatal: true }).decode(bytes);
  const root: Node = { tag: '', attributes: {}, children: [], text: '' };
  const open = [root];
  const unescaped = (part: string): string => part.replace(/&#(\d+);/g, (_, code) => String.fromCharCode(Number(code)));
  for (const [, close, tag, attributes, self, between] of text
    .replace(/^<\?xml[^>]*\?>\n/, '')
    .matchAll(/<(\/?)([A-Za-z]+)((?: [A-Za-z]+="[^"<]*")*)(\/?)>([^<]*)/g)) {
    const parent = open.at(-1)!;
    if (close === '/') {
      expect(open.pop()?.tag).toBe(tag);
      continue;
    }
    const pairs = [...attributes!.matchAll(/ ([A-Za-z]+)="([^"]*)"/g)].map(([, name, value]) => [name, value]);
    const node: Node = { tag: tag!, attributes: Object.fromEntries(pairs), children: [], text: unescaped(between!) };
    parent.children.push(node);
    if (self !== '/') open.push(node);
  }
  expect(open).toHaveLength(1);
  expect(text.replace(/&#\d+;/g, '')).not.toContain('&');
  return root.children[0]!;
}

const all = (node: Node, tag: string): readonly Node[] =>
  node.children.flatMap((child) => [...(child.tag === tag ? [child] : []), ...all(child, tag)]);
const one = (node: Node, tag: string): Node => {
  const found = all(node, tag);
  expect(found, tag).toHaveLength(1);
  return found[0]!;
};

function inOrder(node: Node): number {
  const wanted = order[node.tag];
  if (wanted !== undefined) {
    const places = node.children.map(({ tag }) => wanted.indexOf(tag));
    expect(places, `${node.tag}: ${node.children.map(({ tag }) => tag).join(', ')}`).toEqual(
      [...places].sort((a, b) => a - b),
    );
    expect(Math.min(0, ...places)).toBe(0);
  }
  return node.children.reduce((sum, child) => sum + inOrder(child), wanted === undefined ? 0 : 1);
}

interface Topic {
  readonly id: string;
  readonly markup: Node;
  readonly view: Node;
}

function topics(bytes: Uint8Array): readonly Topic[] {
  const entries = unzipSync(bytes);
  expect(
    one({ tag: '', attributes: {}, children: [read(entries['bcf.version']!)], text: '' }, 'Version'),
  ).toMatchObject({
    attributes: { VersionId: '2.1' },
  });
  const folders = Object.keys(entries).filter((name) => name.endsWith('/'));
  expect(Object.keys(entries)).toHaveLength(1 + 3 * folders.length);
  return folders.map((folder) => ({
    id: folder.slice(0, -1),
    markup: read(entries[`${folder}markup.bcf`]!),
    view: read(entries[`${folder}viewpoint.bcfv`]!),
  }));
}

describe('issues as a BCF archive', () => {
  // The hall's own heading: nine pipes of one wet vent are drawn 3 in and need 4 in. One cause, one topic; its note is none.
  const { outcome, result } = sampleOutcome('hall-wet-vented');
  const bytes = bcf(result, outcome.model, [file('hall-wet-vented.ifc')]);

  test('nine pipes with one cause are one topic that names, selects and colours them', () => {
    const [topic, ...others] = topics(bytes);
    expect(others).toEqual([]);
    const { id, markup, view } = topic!;
    expect(id).toMatch(uuid);
    expect(inOrder(markup) + inOrder(view)).toBe(8);
    expect(one(markup, 'Topic').attributes).toEqual({ Guid: id, TopicType: 'Error', TopicStatus: 'Open' });
    expect(one(markup, 'Title').text).toBe('Undersized: 9 wet vents, battery-1, drawn 3 in, needs 4 in');
    expect(one(markup, 'Description').text).toContain('2.5.8.1.');
    expect(one(markup, 'Description').text).toContain('authority having jurisdiction');
    expect(one(markup, 'CreationDate').text).toBe('2024-01-01T00:00:00Z');
    expect(one(markup, 'File').attributes).toEqual({ IfcProject: '1Wk6xzvOInuAej1YpSwjux' });
    const drawnSmall = result.pipes.filter(({ verdict }) => verdict === 'undersized').map(({ globalId }) => globalId);
    expect(drawnSmall).toHaveLength(9);
    const selected = one(view, 'Selection').children.map(({ attributes }) => attributes.IfcGuid);
    expect([...selected].sort()).toEqual([...drawnSmall].sort());
    expect(one(view, 'Color').children).toHaveLength(9);
  });

  test('the eye stands within ten metres of the pipes, in world metres, and looks at them', () => {
    const [{ view }] = topics(bytes) as [Topic];
    const vector = (tag: string): number[] => one(view, tag).children.map(({ text }) => Number(text));
    const [eye, toward, up] = [vector('CameraViewPoint'), vector('CameraDirection'), vector('CameraUpVector')];
    const dot = (a: readonly number[], b: readonly number[]): number => a.reduce((sum, x, at) => sum + x * b[at]!, 0);
    expect(dot(toward, toward)).toBeCloseTo(1, 3);
    expect(dot(up, toward)).toBeCloseTo(0, 3);
    expect(up[2]).toBeGreaterThan(0);
    const ids = new Set(one(view, 'Selection').children.map(({ attributes }) => attributes.IfcGuid));
    const points = outcome.model.elements.flatMap((element) =>
      ids.has(element.globalId) ? (element.centreLine?.points ?? []) : [],
    );
    expect(points.length).toBeGreaterThanOrEqual(18);
    for (const point of points) {
      const away = point.map((x, at) => x - eye[at]!);
      const distance = Math.hypot(...away);
      expect(distance).toBeLessThan(10);
      // Within the field of view of 60 degrees, 30 to each side.
      expect(dot(away, toward) / distance).toBeGreaterThan(Math.cos(Math.PI / 6));
    }
  });

  test('the same causes are the same topics, whatever the file is called and however the list is turned', () => {
    expect(bcf(result, outcome.model, [file('hall-wet-vented.ifc')])).toEqual(bytes);
    const turned: Result = { ...result, pipes: [...result.pipes].reverse(), findings: [...result.findings].reverse() };
    const again = topics(bcf(turned, outcome.model, [file('second.ifc')]));
    expect(again.map(({ id }) => id)).toEqual(topics(bytes).map(({ id }) => id));
  });

  test('errors one by one, many alike together, warnings by kind, notes not at all', () => {
    const about = result.fixtures.map(({ globalId }) => globalId);
    const finding = (code: string, severity: 'error' | 'warning' | 'note', id: string) => ({
      code,
      severity,
      about: [id],
      facts: {},
      clause: '2.5.1.1.(1)',
      sentence: `${id} <b>&\u0007 has no vent.`,
    });
    const made: Result = {
      ...result,
      pipes: [],
      findings: [
        finding('trap-arm-too-long', 'error', about[0]!),
        finding('trap-arm-too-long', 'error', about[1]!),
        ...Array.from({ length: 13 }, (_, at) => finding('unvented-trap', 'error', about[at % 10]!)),
        finding('open-end', 'warning', about[2]!),
        finding('open-end', 'warning', about[3]!),
        finding('oversized', 'note', about[4]!),
      ],
    };
    const found = topics(bcf(made, outcome.model, [file('hall-wet-vented.ifc')]));
    expect(found.map(({ markup }) => [one(markup, 'Labels').text, one(markup, 'Topic').attributes.TopicType])).toEqual([
      ['trap-arm-too-long', 'Error'],
      ['trap-arm-too-long', 'Error'],
      ['unvented-trap', 'Error'],
      ['open-end', 'Warning'],
    ]);
    expect(one(found[2]!.view, 'Selection').children).toHaveLength(10);
    expect(new Set(found.map(({ id }) => id)).size).toBe(4);
    expect(one(found[0]!.markup, 'Description').text).toContain('<b>&\\u{7} has no vent. (2.5.1.1.(1))');
  });

  test('a model without anything to settle gives an archive without topics', () => {
    const core = sampleOutcome('five-storey-core');
    expect(topics(bcf(core.result, core.outcome.model, [file('five-storey-core.ifc')]))).toEqual([]);
  });
});
