import { boxCentre, boxSize } from '../geometry/box.ts';
import { add, type Box, length, scale, unit, type Vec3 } from '../geometry/vector.ts';
import { type XmlElement, xml } from './xml.ts';

/**
 * How a reader of issues should show these elements: selected, coloured, and seen slantwise from above with some of
 * what is round them. World metres, z up. `box` null: nobody knows where they are, and the view has no eye.
 */
export function viewpoint(id: string, about: readonly string[], box: Box | null): XmlElement {
  const known = about.filter((globalId) => wellFormed.test(globalId)).slice(0, mostComponents);
  const components = known.map((globalId) => xml('Component', { IfcGuid: globalId }));
  const shown =
    components.length === 0
      ? null
      : xml('Components', {}, [
          xml('Selection', {}, components),
          xml('Visibility', { DefaultVisibility: 'true' }),
          xml('Coloring', {}, [xml('Color', { Color: lit }, components)]),
        ]);
  return xml('VisualizationInfo', { Guid: id }, [shown, box === null ? null : camera(box)]);
}

/** The page's colour for what is too small. */
const lit = 'E03A08';
/** Programs grow slow on long lists; the text names how many there are. */
const mostComponents = 1000;
const wellFormed = /^[0-9A-Za-z_$]{22}$/;

/** Degrees, top to bottom: the widest that version 2.1 allows. */
const fieldOfView = 60;
const leastReach = 1.5;

function camera(box: Box): XmlElement {
  const middle = boxCentre(box);
  const reach = Math.max(leastReach, length(boxSize(box)) / 2 + 0.5);
  const away = reach / Math.sin((fieldOfView / 2) * (Math.PI / 180));
  const toward = unit([1, 1.4, -1]);
  const side = Math.hypot(toward[0], toward[1]);
  const up: Vec3 = [(-toward[2] * toward[0]) / side, (-toward[2] * toward[1]) / side, side];
  return xml('PerspectiveCamera', {}, [
    point('CameraViewPoint', add(middle, scale(toward, -away))),
    point('CameraDirection', toward),
    point('CameraUpVector', up),
    xml('FieldOfView', {}, String(fieldOfView)),
  ]);
}

const point = (tag: string, [x, y, z]: Vec3): XmlElement =>
  xml(tag, {}, [xml('X', {}, number(x)), xml('Y', {}, number(y)), xml('Z', {}, number(z))]);

/** Tenths of a millimetre are enough for an eye. */
const number = (value: number): string => String(Number(value.toFixed(4)));
