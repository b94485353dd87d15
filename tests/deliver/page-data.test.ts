import { createHash } from 'node:crypto';
import fc from 'fast-check';
import { inflateSync } from 'fflate';
import { describe, expect, test } from 'vitest';
import { pageHtml } from '../../src/deliver/page-html.ts';
import { packNumbers, packPage, unpackNumbers, unpackPage } from '../../src/deliver/page-pack.ts';
import { communityHall } from '../support/community-hall.ts';
import { exampleData, examplePage } from '../support/example-page.ts';

const example = examplePage(communityHall);
const data = exampleData(example);

describe('page data', () => {
  test('a pipe stands where the model has it, in millimetres from the origin', () => {
    const { origin, pipes } = data.scene;
    const section = example.network.pipes.findIndex(
      ({ element }) => example.model.elements[element!]!.name === 'Line 3',
    );
    const start = pipes.points.slice(0, section).reduce((sum, count) => sum + count, 0);
    const first = example.network.pipes[section]!.points![0]!;
    const world = [pipes.x[start]!, pipes.y[start]!, pipes.z[start]!].map((mm, axis) => mm / 1000 + origin[axis]!);
    world.forEach((value, axis) => {
      expect(Math.abs(value - first[axis]!)).toBeLessThanOrEqual(0.0005);
    });
    expect(data.result.pipes[pipes.pipe[section]!]!.name).toBe('Line 3');
    expect(pipes.outer[section]).toBe(890); // 89 mm outside, in tenths of a millimetre
  });

  test('water and air of each fixture can be walked again', () => {
    const { paths, pipes } = data.scene;
    data.result.fixtures.forEach((_, row) => {
      const names: string[] = [];
      for (let at = paths.first[row]!; at >= 0; at = paths.next[at]!)
        names.push(data.result.pipes[pipes.pipe[at]!]!.globalId);
      expect(names).toEqual(example.result.fixtures[row]!.waterPath);
    });
    const air = paths.armCount.map((arm, row) => arm + paths.throughCount[row]! + paths.dryCount[row]!);
    expect([...air]).toEqual(example.result.fixtures.map(({ airPath }) => airPath!.length));
  });

  test('far from the origin of the world nothing is lost', () => {
    const far = 24_525_622.125;
    const moved = examplePage({
      ...communityHall,
      nodes: Object.fromEntries(
        Object.entries(communityHall.nodes).map(([name, [x, y, z]]) => [name, [x + far, y - far, z]]),
      ),
    });
    const { scene } = exampleData(moved);
    expect(Math.max(...scene.pipes.x.map(Math.abs))).toBeLessThan(20_000);
    expect([...scene.pipes.z]).toEqual([...data.scene.pipes.z]);
  });
});

describe('packing', () => {
  test('unpacked equals packed, every row and column', () => {
    expect(unpackPage(inflateSync(packPage(data)))).toEqual(data);
  });

  test('any whole numbers come back', () => {
    fc.assert(
      fc.property(fc.array(fc.integer({ min: -(2 ** 31), max: 2 ** 31 - 1 })), (numbers) => {
        const column = Int32Array.from(numbers);
        expect([...unpackNumbers(packNumbers(column), column.length)]).toEqual(numbers);
      }),
    );
  });

  test('names that could mislead an object do not', () => {
    const pipes = data.result.pipes.map((pipe) => ({ ...pipe, name: '__proto__', system: 'constructor' }));
    const odd = { ...data, result: { ...data.result, pipes } };
    expect(unpackPage(inflateSync(packPage(odd))).result.pipes).toEqual(pipes);
    expect(({} as { x?: unknown }).x).toBeUndefined();
  });
});

describe('the file', () => {
  const bundle = { js: "console.log('page')", css: 'body{margin:0}' };

  test('lets exactly its own script and style run', () => {
    const html = pageHtml(data, bundle);
    const digest = (text: string): string => `'sha256-${createHash('sha256').update(text).digest('base64')}'`;
    expect(html).toContain(`script-src ${digest(bundle.js)}; style-src ${digest(bundle.css)}`);
    expect(html).toContain("default-src 'none'");
    expect(html).not.toMatch(/unsafe|https?:/);
    expect(html).toContain(`<script>${bundle.js}</script>`);
  });

  test('a name that is markup is none in the title, and nowhere else', () => {
    const file = '</title><script>alert(1)</script>.ifc';
    const html = pageHtml({ ...data, result: { ...data.result, model: { ...data.result.model, file } } }, bundle);
    expect(html.match(/<script/g)).toHaveLength(2);
    expect(html).toContain('&#60;/title&#62;');
  });

  test('a bundle that would close its own tag is refused', () => {
    expect(() => pageHtml(data, { ...bundle, js: "'</script>'" })).toThrow('close its own tag');
  });

  test('equal input gives equal bytes', () => {
    expect(pageHtml(exampleData(examplePage(communityHall)), bundle)).toBe(pageHtml(data, bundle));
  });
});
