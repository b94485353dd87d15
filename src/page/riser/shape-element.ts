import type { SvgShape } from '../../schedule/svg-shape.ts';
import { makeSvg } from '../panel/element.ts';

export function shapeElement({ tag, attributes, text, children = [] }: SvgShape): SVGElement {
  const made: SVGElement = makeSvg(tag, attributes);
  if (text !== undefined) made.append(text);
  made.append(...children.map(shapeElement));
  return made;
}
