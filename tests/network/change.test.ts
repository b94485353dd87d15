import { describe, expect, test } from 'vitest';
import { elementId } from '../../src/model/model.ts';
import { buildNetwork } from '../../src/network/build-network.ts';
import { addPipe, removePipes } from '../../src/network/change.ts';
import type { JointId, Network, PipeId } from '../../src/network/network.ts';
import { drawn, joinsOf, pipe } from '../support/drawn.ts';

const parts = [pipe('run', '0 0 0 > 4 0 0'), pipe('branch', '1 3 0 > 1 0 0')];
const added = pipe('vent', '3 0 0 > 3 0 2');

const teeNetwork = (): Network => {
  const { model, identities } = drawn(parts);
  return buildNetwork(model, identities).value;
};
/** The drawing that a changed network is read against: with the added pipe. */
const drawing = drawn([...parts, added]);
const last = (network: Network): PipeId => network.pipesOf.get(elementId(0))!.at(-1)!;

describe('a changed network', () => {
  test('a pipe added on a wall cuts the run as if it had been drawn', () => {
    const network = teeNetwork();
    const { network: changed, pipe: id } = addPipe(network, {
      element: elementId(2),
      ends: [{ pipe: last(network), at: 2 }, { open: [3, 0, 2] }],
      points: added.line!,
      length: 2,
    });
    const whole = buildNetwork(drawing.model, drawing.identities).value;
    expect(joinsOf(drawing, changed)).toEqual(joinsOf(drawing, whole));
    expect(changed.pipes[id]!.length).toBe(2);
    expect(changed.pipesOf.get(elementId(0))!.map((at) => [changed.pipes[at]!.from, changed.pipes[at]!.to])).toEqual([
      [0, 1],
      [1, 3],
      [3, 4],
    ]);
    expect(changed.pipes.map((it) => it.id)).toEqual(changed.pipes.map((_, place) => place));
    expect(changed.fates[2]).toEqual({ use: 'pipe', reason: null });
  });

  test('the network that was given stays as it was', () => {
    const network = teeNetwork();
    addPipe(network, {
      element: elementId(2),
      ends: [{ pipe: last(network), at: 2 }, { open: null }],
      points: null,
      length: 2,
    });
    removePipes(network, new Set([last(network)]));
    expect(network).toEqual(teeNetwork());
  });

  test('at a joint nothing is cut', () => {
    const network = teeNetwork();
    const tee = network.joints.find(({ pipes }) => pipes.length === 3)!.id;
    const { network: changed } = addPipe(network, {
      element: elementId(2),
      ends: [{ joint: tee as JointId }, { open: null }],
      points: null,
      length: 1.5,
    });
    expect(changed.pipes.length).toBe(network.pipes.length + 1);
    expect(changed.joints[tee]!.pipes.length).toBe(4);
  });

  test('a bypass with both ends on one pipe cuts it twice', () => {
    const network = teeNetwork();
    const { network: changed, pipe: id } = addPipe(network, {
      element: elementId(2),
      ends: [
        { pipe: last(network), at: 1 },
        { pipe: last(network), at: 2 },
      ],
      points: null,
      length: 1.5,
    });
    const lengths = changed.pipesOf.get(elementId(0))!.map((at) => changed.pipes[at]!.length);
    expect(lengths).toEqual([1, 1, 1, 1]);
    const meeting = changed.pipes[id]!.ends.map((joint) => changed.joints[joint]!.pipes.length);
    expect(meeting).toEqual([3, 3]);
  });

  test('added and removed again, the rest is joined as before', () => {
    const network = teeNetwork();
    const { network: changed, pipe: id } = addPipe(network, {
      element: elementId(2),
      ends: [{ joint: network.joints[0]!.id }, { open: null }],
      points: null,
      length: 1,
    });
    const { network: again, numbers } = removePipes(changed, new Set([id]));
    expect(again.pipes).toEqual(network.pipes);
    expect([...numbers]).toEqual([0, 1, 2, -1]);
    expect(again.joints.slice(0, network.joints.length)).toEqual(network.joints);
    expect(again.fates[2]).toEqual({ use: 'left-out', reason: 'removed' });
  });

  test('a pipe out of the middle leaves two pieces, numbered without a hole', () => {
    const network = teeNetwork();
    const branch = network.pipesOf.get(elementId(1))![0]!;
    const { network: changed } = removePipes(network, new Set([network.pipesOf.get(elementId(0))![0]!]));
    expect(changed.pipes.map((it) => it.id)).toEqual([0, 1]);
    expect(changed.joints.filter(({ pipes }) => pipes.length === 2).length).toBe(1);
    expect(changed.pipes[branch - 1]!.element).toBe(1);
  });
});
