import type { BatteryFacts } from '../codes/battery.ts';
import type { StackUse } from '../codes/stack-use.ts';
import type { PipeUse } from '../codes/use.ts';
import type { Load } from '../units/quantity.ts';

/** What is put on a pipe besides what it carries: load in sixtieths, fixtures, water closets among them. */
export interface Extra {
  readonly load: number;
  readonly fixtures: number;
  readonly closets: number;
}

export const onlyLoad = (load: number): Extra => ({ load, fixtures: 0, closets: 0 });

/** The use of a pipe as it would be if so much more drained into it, at its upstream end, or breathed through it. */
export function loadedUse(use: PipeUse, extra: Extra): PipeUse {
  const { stack, battery, vent, standsIn, wetPortion } = use;
  const more = (load: Load): Load => Math.max(0, load + extra.load) as Load;
  const wet = use.drain !== null;
  return {
    ...use,
    load: wet ? more(use.load) : use.load,
    closets: wet ? use.closets + extra.closets : use.closets,
    fixtures: wet ? use.fixtures + extra.fixtures : use.fixtures,
    stack: stack === null ? null : loadedStack(stack, extra),
    battery: battery === null ? null : { ...battery, facts: loadedFacts(battery.facts, extra) },
    vent:
      vent === null
        ? null
        : {
            ...vent,
            load: more(vent.load),
            closets: vent.closets + extra.closets,
            stack: vent.stack === null ? null : loadedStack(vent.stack, extra),
          },
    standsIn: standsIn === null ? null : { ...standsIn, load: more(standsIn.load) },
    wetPortion:
      wetPortion === null ? null : { load: more(wetPortion.load), closets: wetPortion.closets + extra.closets },
  };
}

/** All of it from the storey that is the heaviest already: the most that it can do. */
function loadedStack(stack: StackUse, { load, closets }: Extra): StackUse {
  const { heaviestStorey, footLoad, footClosets } = stack;
  return {
    ...stack,
    heaviestStorey: { ...heaviestStorey, load: Math.max(0, heaviestStorey.load + load) as Load },
    footLoad: Math.max(0, footLoad + load) as Load,
    footClosets: footClosets + closets,
  };
}

/** A battery with more on its line, as further traps like its last one, joining just before it. */
export function loadedFacts(facts: BatteryFacts, { load, fixtures, closets }: Extra): BatteryFacts {
  const more = (one: Load): Load => Math.max(0, one + load) as Load;
  const { wet, circuit } = facts;
  const withMore = (traps: BatteryFacts['traps']): BatteryFacts['traps'] => {
    const last = traps.at(-1);
    if (last === undefined || fixtures === 0) return traps;
    const one = { ...last, place: Math.max(0, last.place - 1) + 0.5, closet: closets > 0 };
    return [...traps.slice(0, -1), ...Array.from({ length: fixtures }, () => one), last];
  };
  const end = circuit.stretches.length - 1;
  return {
    ...facts,
    traps: withMore(facts.traps),
    wet: {
      ...wet,
      load: closets > 0 ? wet.load : more(wet.load),
      closets: wet.closets + closets,
      passes: more(wet.passes),
    },
    circuit: {
      ...circuit,
      load: more(circuit.load),
      closets: circuit.closets + closets,
      traps: withMore(circuit.traps),
      stretches: circuit.stretches.map((one, at) => (at === end ? { ...one, traps: one.traps + fixtures } : one)),
    },
  };
}
