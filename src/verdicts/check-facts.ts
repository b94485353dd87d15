import type { CheckedDrain, CheckedPipe, CheckedStack, CheckedTrap, CheckFacts } from '../codes/check.ts';
import type { PlumbingCode } from '../codes/plumbing-code.ts';
import type { PipeUse } from '../codes/use.ts';
import type { Identity } from '../model/identity.ts';
import type { ElementId, Model } from '../model/model.ts';
import type { Network, PipeId } from '../network/network.ts';
import { otherEnd } from '../network/other-end.ts';
import { openSky } from '../paths/open-air.ts';
import type { Paths } from '../paths/paths.ts';
import type { Stack } from '../roles/find-stacks.ts';
import { widestDrawn } from '../roles/main-vent.ts';
import type { VentFoot } from '../roles/roles.ts';
import type { NominalSize } from '../units/nominal-size.ts';
import { checkedVents, mouthsOf } from './checked-vents.ts';
import { drainAccess } from './drain-access.ts';
import { inclinedOffsets } from './inclined-offsets.ts';
import type { Run } from './outcome.ts';
import { storeyTies } from './tied-storeys.ts';

export interface Checkable {
  readonly model: Model;
  readonly identities: readonly Identity[];
  readonly network: Network;
  readonly paths: Paths;
  readonly code: PlumbingCode;
}

/** What a code's checks look at, gathered from one run. */
export function checkFacts({ model, identities, network, paths, code }: Checkable, run: Run): CheckFacts {
  const { stream } = paths;
  const { roles, loads, sizes } = run;
  const elementsOf = (pipes: readonly PipeId[]): ElementId[] => [
    ...new Set(pipes.flatMap((pipe) => network.pipes[pipe]!.element ?? [])),
  ];

  const pipes = network.pipes.map(({ id, element, length }): CheckedPipe => {
    const { uncertainty, ground } = paths.slopes[id]!;
    return {
      use: roles.uses[id]!,
      element,
      required: sizes[id]!.size,
      modelled: loads.modelled[id]!.size,
      slopeUncertainty: uncertainty,
      slopeGround: ground,
      length,
    };
  });

  const traps = paths.traps.map(({ fixture, after, arm, how }): CheckedTrap => {
    const path = paths.fixtures[fixture]!;
    const measured = roles.arms[fixture] ?? null;
    const uncertain = Math.max(0, ...arm.map((pipe) => paths.slopes[pipe]!.uncertainty));
    return {
      element: path.element,
      size: loads.fixtures[fixture]!.trap,
      siphonic: loads.fixtures[fixture]!.row.siphonic,
      drains: path.water.length > 0,
      how: roles.venting[fixture]!.how,
      arm:
        measured === null
          ? null
          : {
              length: measured.length,
              fall: measured.fall,
              plan: measured.plan,
              height: measured.fall,
              slope: arm.some((pipe) => paths.vertical[pipe] === true) ? null : measured.slope,
              slopeUncertainty: uncertain,
              turn: measured.turn,
            },
      isDrawn: how === 'drawn',
      fixture: identities[path.element]!.kind,
      outletLength: spanOf(path.water.slice(0, after)),
      outletLevel: spanOf(path.water.slice(0, after).filter((pipe) => paths.vertical[pipe] !== true)),
      kind: loads.fixtures[fixture]!.row.title,
      refused: loads.fixtures[fixture]!.row.refused === true,
      row: loads.fixtures[fixture]!.row.id,
      way: roles.ways[fixture] ?? null,
    };
  });

  const ofStack = ventsOfStacks(run);
  const ties = storeyTies(paths, code, run);
  const sky = openSky(model, identities, network);
  const access = drainAccess({ model, identities, network, paths, code, run });
  return {
    pipes,
    traps,
    stacks: roles.stacks.map((stack) => checkedStack(stack)),
    drains: buildingDrains(),
    vents: checkedVents(model, network, paths, run),
    access: access.checked,
  };

  function checkedStack(stack: Stack): CheckedStack {
    const vents = ofStack.get(stack.id) ?? [];
    const yokes = vents.filter(({ role }) => role === 'yoke-vent');
    const heightAt = (use: PipeUse): number => network.joints[use.vent!.foot]!.at?.[2] ?? 0;
    return {
      elements: elementsOf(stack.pipes),
      footLoad: loads.pipes[stack.foot]!.load,
      storeysServed: stack.served.length,
      height: stack.height,
      hasStackVent: vents.some(({ role }) => role === 'stack-vent'),
      ventStack: soundest(vents.map(({ vent }) => vent!.leaves)),
      ventStackBeyond: beyondFoot(
        stack,
        vents.find(({ vent }) => vent!.leaves === 'drain'),
      ),
      joins: roles.uses[stack.foot]!.stack!.joins,
      footHeight: network.joints[stream.down(stack.foot)]!.at?.[2] ?? null,
      footCounts: loads.pipes[stack.foot]!.counts,
      footSize: sizes[stack.foot]!.size,
      firstBelow: firstBelow(stack),
      isWetVent: roles.batteries.some(
        ({ facts, reading, broken }) =>
          reading === 'wet-vent' &&
          broken.length === 0 &&
          facts.wet.stack &&
          facts.line.some((pipe) => stack.pipes.includes(pipe)),
      ),
      yokes: [...new Set(yokes.map((use) => roles.floors.at(heightAt(use))))].sort((a, b) => b - a),
      yokeHeights: yokes.map(heightAt).sort((a, b) => b - a),
      yokeTops: roles.feet.flatMap((foot) => yokeTop(stack, foot)),
      inclined: inclinedOffsets(network, paths, stack),
      cleanout: cleanoutAbove(stack),
      ties: ties.get(stack.id) ?? stack.served.map(() => null),
      topStorey: stack.served.at(-1) ?? 0,
      lowestStorey: stack.served[0] ?? 0,
      offsets: stack.offsets.map(({ pipes: level, length }, offset) => {
        const first = stack.pipes.indexOf(level[0]!);
        const above = stack.pipes.slice(0, first);
        const heights = above.flatMap((pipe) =>
          network.pipes[pipe]!.ends.map((joint) => network.joints[joint]!.at?.[2] ?? 0),
        );
        const [low, high] = [Math.min(...heights), Math.max(...heights)];
        const floors = roles.floors.elevations.filter((floor, storey) => {
          const top = roles.floors.elevations[storey + 1] ?? floor + 3;
          return Math.min(high, top) - Math.max(low, floor) >= (top - floor) / 2;
        });
        return {
          elements: elementsOf(level),
          length,
          storeysAbove: floors.length,
          servedAbove: storeysOf(above.at(-1) ?? stack.top),
          storey: roles.floors.at(low),
          height: Number.isFinite(low) ? low : null,
          // What joins at its lower end enters the part below.
          firstJoin: firstJoin(level.slice(0, -1)),
          loadAbove: loads.pipes[above.at(-1) ?? stack.top]!.load,
          reliefVents: vents.filter(({ vent }) => vent!.offset === offset).length,
        };
      }),
    };
  }

  /** Storeys from which fixtures drain through a pipe. */
  function storeysOf(pipe: PipeId): number {
    const { from, to } = loads.pipes[pipe]!;
    return new Set(loads.order.slice(from, to).map((fixture) => roles.floors.of(paths.fixtures[fixture]!))).size;
  }

  /** From the head of a level drain to the first other one that joins it, along these pipes. */
  function firstJoin(list: readonly PipeId[]): CheckedStack['firstBelow'] {
    let walked = 0;
    for (const pipe of list) {
      walked += stream.span(pipe);
      const branch = stream.inflows[stream.down(pipe)]!.find((one) => one !== pipe && paths.vertical[one] !== true);
      if (branch !== undefined) return { element: network.pipes[branch]!.element, distance: walked };
    }
    return null;
  }

  function cleanoutAbove({ pipes: down }: Stack): number | null {
    let walked = 0;
    for (const pipe of [...down].reverse()) {
      if (access.opens(stream.down(pipe))) return walked;
      walked += stream.span(pipe);
    }
    return access.opens(stream.up(down[0]!)) ? walked : null;
  }

  function yokeTop(stack: Stack, { joint, path }: VentFoot): CheckedStack['yokeTops'] {
    const use = roles.uses[path[0]!]!;
    if (use.role !== 'yoke-vent' || use.vent?.serves !== stack.id) return [];
    const own = path.filter((pipe) => roles.uses[pipe]!.role === 'yoke-vent');
    let at = joint;
    for (const pipe of own) {
      at = otherEnd(network, pipe, at);
    }
    const height = network.joints[at]!.at?.[2] ?? null;
    const floor = height === null ? undefined : roles.floors.elevations.findLast((one) => one <= height);
    return [{ elements: elementsOf(own), overFloor: height === null || floor === undefined ? null : height - floor }];
  }

  function spanOf(list: readonly PipeId[]): number {
    return list.reduce((sum, pipe) => sum + stream.span(pipe), 0);
  }

  /** Along the drain from the foot of a stack to the vent that stands on it. */
  function beyondFoot(stack: Stack, use: PipeUse | undefined): number {
    let walked = 0;
    for (
      let pipe = paths.next[stack.foot] ?? null;
      pipe !== null && use !== undefined;
      pipe = paths.next[pipe] ?? null
    ) {
      walked += stream.span(pipe);
      if (stream.down(pipe) === use.vent!.foot) return walked;
    }
    return 0;
  }

  /** The level drain below the foot, as far as it stays level. */
  function firstBelow(stack: Stack): CheckedStack['firstBelow'] {
    const level: PipeId[] = [];
    for (let pipe = paths.next[stack.foot] ?? null; pipe !== null; pipe = paths.next[pipe] ?? null) {
      if (paths.vertical[pipe] === true) break;
      level.push(pipe);
    }
    return firstJoin(level);
  }

  function buildingDrains(): CheckedDrain[] {
    return paths.systems.flatMap(({ pipes: own }) => {
      const drain = own.filter((pipe) => roles.uses[pipe]!.drain === 'building-drain');
      if (drain.length === 0) return [];
      const inside = new Set(own);
      const feet = roles.feet.filter(({ path }) => inside.has(path[0]!));
      const drawn = widestDrawn({ loads, code }, feet);
      const sized = feet.map(({ path }) => narrowest(path.map((pipe) => sizes[pipe]!.size)));
      const widest = [drawn, ...sized].reduce(
        (a, b) => (a === null ? b : b === null ? a : code.series.larger(a, b)),
        null,
      );
      const last = own.find((pipe) => paths.wet[pipe] && paths.next[pipe] === null);
      return [
        {
          elements: elementsOf(drain),
          pipes: drain,
          widestVent: widest,
          required: last === undefined ? null : sizes[last]!.size,
          mouths: mouthsOf(network, paths, code, run, feet, { model, sky }),
          hasCleanout: drain.some((pipe) => access.opens(stream.up(pipe)) || access.opens(stream.down(pipe))),
        },
      ];
    });
  }

  function narrowest(list: readonly (NominalSize | null)[]): NominalSize | null {
    if (list.some((size) => size === null)) return null;
    return (list as NominalSize[]).reduce((a, b) => (code.series.rank(a) <= code.series.rank(b) ? a : b));
  }
}

/** Dry pipes at the feet of the vents that serve each stack, by the stack's id. */
function ventsOfStacks({ roles }: Run): Map<number, PipeUse[]> {
  const found = new Map<number, PipeUse[]>();
  for (const { path } of roles.feet) {
    const use = roles.uses[path[0]!]!;
    const stack = use.vent?.serves ?? null;
    if (stack === null) continue;
    const known = found.get(stack);
    if (known === undefined) found.set(stack, [use]);
    else known.push(use);
  }
  return found;
}

const soundness: readonly CheckedStack['ventStack'][] = [null, 'above a branch', 'drain', 'foot'];
const soundest = (places: readonly CheckedStack['ventStack'][]): CheckedStack['ventStack'] =>
  places.reduce((a, b) => (soundness.indexOf(a) >= soundness.indexOf(b) ? a : b), null);
