import type { EntryRule } from '../codes/plumbing-code.ts';
import type { StackEntry } from '../codes/way.ts';
import { dot, subtract, unit, type Vec3 } from '../geometry/vector.ts';
import type { ElementId, Model } from '../model/model.ts';
import type { PipeId } from '../network/network.ts';
import { pointsFrom } from '../paths/turns.ts';
import type { Stack, StackContext } from './find-stacks.ts';

/**
 * How every drain comes into a stack, by its angle or its fitting's name. A radius inside the fitting stands in no
 * model: an entry near a right angle that nothing names is `open`, and read as the run in hand has it.
 */
export function stackEntries(
  { network, stream }: StackContext,
  model: Model,
  stack: Stack,
  { sweptUpTo, said }: EntryRule,
  open: StackEntry['shape'],
): StackEntry[] {
  const own = new Set<PipeId>(stack.pipes);
  return stack.pipes.flatMap((pipe) => {
    const joint = stream.up(pipe);
    const drains = stream.inflows[joint]!.filter((one) => !own.has(one));
    // A stack that begins at a bend takes no branch there.
    if (drains.length === 0 || stream.inflows[joint]!.length + stream.dry[joint]!.length < 2) return [];
    const named = shapeNamed(model, network.joints[joint]!.elements);
    const below = firstDirection(pointsFrom(network, pipe, joint));
    return drains.map((drain): StackEntry => {
      const angle = angleBetween(firstDirection(pointsFrom(network, drain, joint)), below);
      const isFlat = angle !== null && angle <= sweptUpTo + measured;
      const shape = isFlat ? 'swept' : (named ?? said);
      return { pipe: drain, shape: shape ?? open, known: shape !== null };
    });
  });
}

/** Short drains at a fitting are drawn to a tenth of a degree at best. */
const measured = 0.5;

/** From the joint into a pipe; null without geometry. */
const firstDirection = ([a, b]: readonly Vec3[]): Vec3 | null =>
  a === undefined || b === undefined ? null : unit(subtract(b, a));

/** Between the flow of a drain toward the joint and that of the stack below it, degrees. */
const angleBetween = (drain: Vec3 | null, below: Vec3 | null): number | null =>
  drain === null || below === null ? null : (Math.acos(Math.min(1, Math.max(-1, -dot(drain, below)))) * 180) / Math.PI;

const swept = /swept|sweep|long.turn|innenradius|(?<![\d.,])45\s*(?:°|deg)/iu;
const square = /square|scharfkantig|short.turn/iu;

/** What the names of the fitting say of its entry; null: nothing, or both. */
function shapeNamed(model: Model, elements: readonly ElementId[]): StackEntry['shape'] | null {
  const words = elements
    .map((element) => model.elements[element]!)
    .filter(({ kind }) => kind === 'fitting')
    .flatMap(({ name, typeName, objectType, description, typeDescription }) => [
      name,
      typeName,
      objectType,
      description,
      typeDescription,
    ])
    .join(' ');
  const [isSwept, isSquare] = [swept.test(words), square.test(words)];
  return isSwept === isSquare ? null : isSwept ? 'swept' : 'square';
}
