import { expect, test } from 'vitest';
import { cavityDrawing, cavitySvg } from '../../src/schedule/cavity.ts';
import type { SvgShape } from '../../src/schedule/svg-shape.ts';
import { englishWeigh } from '../../src/schedule/weigh-english.ts';
import { sampleText, weighSketch } from '../support/weigh-sketch.ts';

const flat = (shapes: readonly SvgShape[]): SvgShape[] => shapes.flatMap((one) => [one, ...flat(one.children ?? [])]);
const circles = (shapes: readonly SvgShape[]): number[] =>
  flat(shapes).flatMap(({ tag, attributes }) => (tag === 'circle' ? [Number(attributes.r)] : []));

test('pipe and fitting to one scale: half a unit for a millimetre of the wall', () => {
  const { shapes } = cavityDrawing(weighSketch(sampleText('hall-wet-vented')).battery(), englishWeigh);
  // Wet vented 4 in: fitting 127.5, pipe 114.3 mm (ASTM D2665); circuit and individual 1½ in: 56.6 and 48.3 mm.
  expect(circles(shapes)).toEqual([127.5, 114.3, 56.6, 48.3, 56.6, 48.3].map((mm) => Math.round(mm * 25) / 100));
  // The modelled wall has studs of 38 × 140: two a panel.
  const studs = flat(shapes).filter(
    ({ tag, attributes }) => tag === 'rect' && attributes.width === 19 && attributes.height === 70,
  );
  expect(studs.length).toBe(6);
});

test('what does not fit says by how much, in words as well as in colour', () => {
  const svg = cavitySvg(weighSketch(sampleText('sports-hall')).result);
  // 3 in: fitting 100.6 mm in 89 mm.
  expect(svg).toContain('11.6 mm too');
  expect(svg.match(/stroke="#b00020"/g)?.length).toBeGreaterThan(0);
});

test('a reading that cannot be has its reason in place of a picture', () => {
  const { shapes } = cavityDrawing(weighSketch(sampleText('bathroom-group')).battery(), englishWeigh);
  const said = flat(shapes)
    .flatMap(({ text }) => text ?? [])
    .join(' ');
  expect(said).toContain('Cannot be: 2 outlets below 2 in stand beside larger ones');
});

test('one sound document, names escaped', () => {
  const svg = cavitySvg(weighSketch(sampleText('dwelling').replaceAll('"Upper floor"', '"<b>&upper"')).result);
  expect(svg.startsWith('<svg xmlns="http://www.w3.org/2000/svg"')).toBe(true);
  expect(svg).not.toContain('<b>');
  expect(svg).not.toMatch(/NaN|undefined|Infinity/);
  const open = svg.match(/<[a-z]+[ >]/g)?.length;
  expect(svg.match(/<\/[a-z]+>/g)?.length).toBe(open);
});
