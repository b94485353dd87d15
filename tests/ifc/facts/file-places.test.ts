import { describe, expect, test } from 'vitest';
import { filesApart } from '../../../src/ifc/facts/file-places.ts';
import type { Facts } from '../../../src/ifc/facts/read-facts.ts';
import type { Fabric } from '../../../src/model/model.ts';

/** A file that draws slabs of 10 by 10 m with their corners at these points, metres. */
function slabsAt(...corners: readonly (readonly [number, number, number])[]): Facts {
  const slabs = corners.map(
    ([x, y, z], index): Fabric => ({
      file: 0,
      stepId: index + 1,
      globalId: `slab${index}`,
      name: null,
      predefinedType: null,
      storey: null,
      box: { min: [x, y, z], max: [x + 10, y + 10, z + 1] },
      outline: null,
    }),
  );
  return { elements: [], ports: [], systems: [], spaces: [], walls: [], roofs: [], slabs };
}

const nothing = slabsAt();
const here = slabsAt([0, 0, 0]);
const many = (count: number, x: number): (readonly [number, number, number])[] =>
  Array.from({ length: count }, () => [x, 0, 0] as const);

describe('which files lie apart from the building', () => {
  test.each([
    { title: 'two that overlap', files: [here, slabsAt([5, 5, 0])], apart: [null, null] },
    { title: 'a yard drain that ends 8 m before the wall', files: [here, slabsAt([18, 0, 0])], apart: [null, null] },
    { title: '30 m to the side', files: [here, slabsAt([40, 0, 0])], apart: [null, { metres: 30, from: 0 }] },
    // 30 m one way, 40 m the other: 50 m.
    { title: 'off the corner', files: [here, slabsAt([40, 50, 0])], apart: [null, { metres: 50, from: 0 }] },
    { title: 'over one another', files: [here, slabsAt([0, 0, 201])], apart: [null, { metres: 200, from: 0 }] },
    {
      title: 'joined by a third',
      files: [here, slabsAt([40, 0, 0]), slabsAt([18, 0, 0], [32, 0, 0])],
      apart: [null, null, null],
    },
    { title: 'one that draws nothing lies nowhere', files: [nothing, here], apart: [null, null] },
    { title: 'none that draws anything', files: [nothing, nothing], apart: [null, null] },
    // 2 % of 100 things may lie anywhere.
    {
      title: 'two of 100 at the origin',
      files: [here, slabsAt(...many(98, 5000), ...many(2, 0))],
      apart: [null, { metres: 4990, from: 0 }],
    },
  ])('$title', ({ files, apart }) => {
    expect(filesApart(files)).toEqual(apart);
  });
});
