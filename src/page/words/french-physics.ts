import type { LevelHydraulics, ResultHydraulics, StackHydraulics } from '../../schedule/result.ts';
import { decimal, lengthText, slopeText } from '../format.ts';
import type { Words } from './words.ts';

/** What physics says beside the code's size, in French; the same facts in the same order as its English sentences. */
export function frenchPhysics(words: Words, hydraulics: ResultHydraulics): string[] {
  const [first, ...rest] = hydraulics.kind === 'level' ? level(words, hydraulics) : stack(words, hydraulics);
  return [`À titre indicatif, sans effet sur le diamètre : ${first}.`, ...rest.map((sentence) => `${sentence}.`)];
}

function level(words: Words, { bore, law, slope, halfFull, otherLaw, cleansFrom, atFlow }: LevelHydraulics): string[] {
  const carries = ({ flow, speed }: { readonly flow: number; readonly speed: number }, by: string): string =>
    `${decimal(words, flow, 2)} l/s à ${decimal(words, speed, 2)} m/s selon ${lawName(by)}`;
  const deep = (fill: number): string =>
    `rempli à ${decimal(words, fill * 100, 0)} %, soit ${lengthText(words, fill * bore)} de hauteur`;
  const half = `à demi rempli, un diamètre intérieur de ${inner(words, bore)} à ${slopeText(words, slope)} débite ${carries(halfFull, law)}, ${carries(otherLaw, otherLaw.law)}`;
  const cleans =
    cleansFrom === null
      ? 'Il est trop lent à toute hauteur pour s’autocurer, ce qui demande 0,6 m/s'
      : `Il s’autocure, ce qui demande 0,6 m/s, dès qu’il est ${deep(cleansFrom)}`;
  if (atFlow === undefined) return [half, cleans];
  if (atFlow === null) return [half, cleans, 'Au débit que le code retient, il coulerait plein'];
  const own = `À son débit de ${decimal(words, atFlow.flow, 2)} l/s il est ${deep(atFlow.fill)}, à ${decimal(words, atFlow.speed, 2)} m/s`;
  return [half, cleans, `${own} : ${atFlow.cleansItself ? 'il s’autocure' : 'trop lent pour s’autocurer'}`];
}

function stack(words: Words, { bore, flow, speed, terminalLength, share }: StackHydraulics): string[] {
  const full = `remplie aux 7/24, une colonne de ${inner(words, bore)} de diamètre intérieur débite ${decimal(words, flow, 2)} l/s, qui tombent à ${decimal(words, speed, 2)} m/s à partir de ${decimal(words, terminalLength, 1)} m sous l’entrée (Wyly et Eaton)`;
  return share === undefined ? [full] : [full, `Son propre débit en remplit ${decimal(words, share * 100, 0)} %`];
}

const inner = (words: Words, bore: number): string => `${decimal(words, bore * 1000, 1)} mm`;

/** `Manning, n 0.012`, `Colebrook-White, roughness 1 mm` as the result names them. */
const lawName = (law: string): string => {
  const [author = law, figure] = law.replace('roughness', 'rugosité').split(', ');
  return figure === undefined ? author : `${author} (${figure.replace('.', ',')})`;
};
