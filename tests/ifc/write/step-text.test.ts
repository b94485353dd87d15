import fc from 'fast-check';
import { expect, test } from 'vitest';
import { stepReal, stepString, stepValue } from '../../../src/ifc/write/step-text.ts';

// ISO 10303-21: 6.4.3 (strings: ' and \ doubled, \X2\ four and \X4\ eight hexadecimal digits, closed by \X0\).
const strings = [
  { text: 'Stack', step: "'Stack'" },
  { text: "3' offset", step: "'3'' offset'" },
  { text: 'C:\\pipes', step: "'C:\\\\pipes'" },
  { text: '1½ in', step: "'1\\X2\\00BD\\X0\\ in'" },
  { text: 'Øé', step: "'\\X2\\00D800E9\\X0\\'" },
  { text: 'a\u{1F6BD}é', step: "'a\\X4\\0001F6BD\\X0\\\\X2\\00E9\\X0\\'" },
  { text: 'a\nb', step: "'a\\X2\\000A\\X0\\b'" },
  { text: '', step: "''" },
];
for (const { text, step } of strings) {
  test(`${JSON.stringify(text)} is written ${step}`, () => expect(stepString(text)).toBe(step));
}

test('any string is written in ASCII, quotes balanced', () => {
  fc.assert(
    fc.property(fc.string({ unit: 'binary' }), (text) => {
      const step = stepString(text);
      expect(step).toMatch(/^'(?:[ -&(-[\]-~]|''|\\\\|\\X2\\(?:[0-9A-F]{4})+\\X0\\|\\X4\\(?:[0-9A-F]{8})+\\X0\\)*'$/);
    }),
  );
});

// ISO 10303-21: 6.4.2, a real has a decimal point, and E before the exponent.
const reals = [
  { value: 5, step: '5.' },
  { value: 0.1, step: '0.1' },
  { value: -2.5, step: '-2.5' },
  { value: 1e-7, step: '1.E-7' },
  { value: 1.5e-9, step: '1.5E-9' },
  { value: 1e21, step: '1.E21' },
  { value: -0, step: '0.' },
];
for (const { value, step } of reals) test(`${value} is written ${step}`, () => expect(stepReal(value)).toBe(step));

test('every finite real reads back as itself; what is not finite is refused', () => {
  fc.assert(
    fc.property(fc.double({ noNaN: true, noDefaultInfinity: true }), (value) => {
      const step = stepReal(value);
      expect(step).toMatch(/^-?\d+\.\d*(E-?\d+)?$/);
      expect(Number(step)).toBe(value === 0 ? 0 : value);
    }),
  );
  expect(() => stepReal(Number.NaN)).toThrow('no number');
  expect(() => stepReal(Number.POSITIVE_INFINITY)).toThrow('no number');
});

test('a label is cut at the 255 characters that IfcLabel holds, a text is not', () => {
  expect(stepValue({ as: 'label', value: 'x'.repeat(300) })).toBe(`IFCLABEL('${'x'.repeat(252)}...')`);
  expect(stepValue({ as: 'label', value: 'x'.repeat(255) })).toBe(`IFCLABEL('${'x'.repeat(255)}')`);
  expect(stepValue({ as: 'text', value: 'x'.repeat(300) })).toBe(`IFCTEXT('${'x'.repeat(300)}')`);
  expect(stepValue({ as: 'positive-length', value: 100 })).toBe('IFCPOSITIVELENGTHMEASURE(100.)');
  expect(stepValue({ as: 'integer', value: 3 })).toBe('IFCINTEGER(3)');
});
