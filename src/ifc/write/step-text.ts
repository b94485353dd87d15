import type { ValueToWrite } from '../../model/property-set.ts';

/** A string as STEP (ISO 10303-21) writes it, in ASCII alone: quotes and backslashes doubled, the rest as `\X2\` or `\X4\`. */
export function stepString(text: string): string {
  if (/^[ !#-&(-[\]-~"]*$/.test(text)) return `'${text}'`;
  let written = '';
  let open = '';
  for (const character of text) {
    const code = character.codePointAt(0) ?? 0;
    const wanted = code >= 0x20 && code < 0x7f ? '' : code > 0xffff ? '\\X4\\' : '\\X2\\';
    if (open !== wanted) {
      if (open !== '') written += '\\X0\\';
      written += wanted;
      open = wanted;
    }
    if (wanted !== '') written += hex(code, wanted === '\\X4\\' ? 8 : 4);
    else written += character === "'" || character === '\\' ? character + character : character;
  }
  return `'${written}${open === '' ? '' : '\\X0\\'}'`;
}

/** A real as STEP writes it: always with a point, the exponent after a capital E. Throws for what is not finite. */
export function stepReal(value: number): string {
  if (!Number.isFinite(value)) throw new Error(`${value} is no number that an IFC file can hold`);
  const [mantissa = '0', exponent] = String(Object.is(value, -0) ? 0 : value).split('e');
  const point = mantissa.includes('.') ? mantissa : `${mantissa}.`;
  return exponent === undefined ? point : `${point}E${exponent.replace('+', '')}`;
}

/** A value with its measure, as IfcPropertySingleValue takes it. */
export function stepValue({ as, value }: ValueToWrite): string {
  switch (as) {
    case 'label':
      return `IFCLABEL(${stepString(cutTo(value, longestLabel))})`;
    case 'text':
      return `IFCTEXT(${stepString(value)})`;
    case 'integer':
      return `IFCINTEGER(${value})`;
    case 'real':
      return `IFCREAL(${stepReal(value)})`;
    case 'length':
      return `IFCLENGTHMEASURE(${stepReal(value)})`;
    case 'positive-length':
      return `IFCPOSITIVELENGTHMEASURE(${stepReal(value)})`;
  }
}

/** IfcLabel holds 255 characters; a longer one is not valid. */
const longestLabel = 255;

const cutTo = (text: string, length: number): string => {
  const characters = [...text];
  return characters.length <= length ? text : `${characters.slice(0, length - 3).join('')}...`;
};

const hex = (code: number, digits: number): string => code.toString(16).toUpperCase().padStart(digits, '0');
