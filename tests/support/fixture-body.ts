import type { Box, Vec3 } from '../../src/geometry/vector.ts';
import type { Solid } from './draft.ts';
import type { PipeSize } from './pipe-sizes.ts';
import type { SketchFixture } from './sketch.ts';

/**
 * A plain but recognisable body round the outlet: bowl and tank, basin and tail, tub, tray. It always reaches its outlet.
 * `floor` is the storey's level; sizes are common practice, no source.
 */
export function fixtureBody(
  fixture: SketchFixture,
  outlet: Vec3,
  floor: number,
  tail: PipeSize | null,
): readonly Solid[] {
  const [width, depth, height] = fixture.word.body;
  const top = floor + fixture.rim;
  const put = boxFor(fixture.back, outlet);
  const half = width / 2;
  const solids = ((): Solid[] => {
    switch (fixture.word.kind) {
      case 'water-closet': {
        const pan: Solid[] = [
          { bowl: put(-half, half, -0.45, 0.08, floor, top) },
          { box: put(-0.11, 0.11, 0, 0.26, floor, top) },
        ];
        const tank: Solid = { box: put(-half, half, 0.09, 0.28, top, floor + height) };
        return fixture.details.flush === 'valve' ? pan : [...pan, tank];
      }
      case 'urinal':
        return fixture.details.style === 'stall'
          ? [
              { box: put(-half, half, 0.11, 0.18, floor, floor + 1.1) },
              { box: put(-half, -half + 0.05, -0.22, 0.11, floor, floor + 1.1) },
              { box: put(half - 0.05, half, -0.22, 0.11, floor, floor + 1.1) },
              { box: put(-half + 0.05, half - 0.05, -0.22, 0.11, floor, floor + 0.08) },
            ]
          : [
              { bowl: put(-half, half, -0.28, 0.02, top - 0.15, top + 0.1) },
              { box: put(-half, half, 0.02, 0.06, top - 0.15, top + height - 0.15) },
            ];
      case 'bathtub':
        return [{ bowl: put(-half, half, -depth + 0.2, 0.2, floor, top) }];
      case 'shower':
        return [{ box: put(-half, half, -depth / 2, depth / 2, floor, top) }];
      case 'floor-drain':
        return [{ box: put(-half, half, -depth / 2, depth / 2, floor - height, floor) }];
      case 'mop-sink':
        return [{ bowl: put(-half, half, -depth / 2, depth / 2, floor, top) }];
      case 'bidet':
        return [{ bowl: put(-half, half, -depth + 0.15, 0.15, floor, top) }];
      default:
        return [{ bowl: put(-half, half, -depth + 0.06, 0.06, top - height, top) }];
    }
  })();
  const lowest = solids.map((solid) =>
    'bar' in solid ? solid.bar[0][2] : 'box' in solid ? solid.box.min[2] : solid.bowl.min[2],
  );
  const bottom = Math.min(...lowest);
  if (outlet[2] < bottom)
    solids.push({ bar: [outlet, [outlet[0], outlet[1], bottom]], radius: (tail?.outer ?? 0.05) / 2 });
  return solids;
}

/** Boxes told across the back and away from it: `from`..`to` along the depth counts toward the back from the outlet. */
function boxFor(back: SketchFixture['back'], [x, y]: Vec3) {
  return (left: number, right: number, from: number, to: number, low: number, high: number): Box => {
    switch (back) {
      case 'north':
        return { min: [x + left, y + from, low], max: [x + right, y + to, high] };
      case 'south':
        return { min: [x + left, y - to, low], max: [x + right, y - from, high] };
      case 'east':
        return { min: [x + from, y + left, low], max: [x + to, y + right, high] };
      case 'west':
        return { min: [x - to, y + left, low], max: [x - from, y + right, high] };
    }
  };
}
