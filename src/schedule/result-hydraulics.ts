import { type DrainFlow, fillAtSpeed, flowAtFill, flowInDrain } from '../hydraulics/drain-flow.ts';
import { colebrookWhite, manning } from '../hydraulics/friction.ts';
import { fullStack, shareOfStack, stackCapacity, terminalLength, terminalSpeed } from '../hydraulics/stack-flow.ts';
import type { PipeId } from '../network/network.ts';
import type { NominalSize } from '../units/nominal-size.ts';
import type { Outcome } from '../verdicts/outcome.ts';
import type { LevelHydraulics, ResultHydraulics, StackHydraulics } from './result.ts';

/** Water at this speed, m/s, carries solids along: 2 ft/s of American practice. */
const selfCleansing = 0.6;
/** Plastic in service and new cast iron: n 0.012 (handbooks, from memory). */
const byManning = { law: manning(0.012), name: 'Manning, n 0.012' };
/** Roughness and viscosity of EN 12056-2, 6.6: 1 mm, water at about 10 degrees. */
const byColebrookWhite = { law: colebrookWhite(0.001, 1.31e-6), name: 'Colebrook-White, roughness 1 mm' };

/** What physics says of a drain at its largest required size; null for vents, and where size, bore or slope is not known. */
export function resultHydraulics(outcome: Outcome, pipe: PipeId): ResultHydraulics | null {
  const { shown, pipes } = outcome;
  const { drain, vertical, slope, portion } = shown.roles.uses[pipe]!;
  const size = pipes[pipe]!.required?.most ?? null;
  if (drain === null || portion === 'outlet' || size === null) return null;
  const flow = flowOf(outcome, pipe);
  if (vertical) return drain === 'stack' ? inStack(outcome, size, flow) : null;
  return slope === null || slope <= 0 ? null : inLevelDrain(outcome, pipe, size, slope, flow);
}

/** The flow that a rule of the code reckoned with, l/s. */
function flowOf({ shown }: Outcome, pipe: PipeId): number | null {
  const stated = shown.sizes[pipe]!.trail.find(({ facts }) => typeof facts.flowLps === 'number');
  return typeof stated?.facts.flowLps === 'number' ? stated.facts.flowLps : null;
}

function inLevelDrain(
  outcome: Outcome,
  pipe: PipeId,
  size: NominalSize,
  slope: number,
  flow: number | null,
): LevelHydraulics | null {
  const { friction } = outcome.code;
  const bore = friction?.bore(size) ?? madeBore(outcome, pipe, size);
  if (bore === null) return null;
  const { law, name } = friction ?? byManning;
  const other = friction === undefined ? byColebrookWhite : byManning;
  const otherwise = flowAtFill(bore, slope, 0.5, other.law);
  const cleansFrom = fillAtSpeed(bore, slope, selfCleansing, law);
  const told = ({ flow: litres, speed }: DrainFlow) => ({
    flow: rounded(litres),
    speed: rounded(speed),
    cleansItself: speed >= selfCleansing,
  });
  const own = flow === null ? null : flowInDrain(bore, slope, flow, law);
  return {
    kind: 'level',
    bore,
    law: name,
    slope: Math.round(slope * 1e6) / 1e6,
    halfFull: told(flowAtFill(bore, slope, 0.5, law)),
    otherLaw: { law: other.name, flow: rounded(otherwise.flow), speed: rounded(otherwise.speed) },
    cleansFrom: cleansFrom === null ? null : rounded(cleansFrom),
    ...(flow === null ? {} : { atFlow: own === null ? null : { ...told(own), fill: rounded(own.fill) } }),
  };
}

/** Bore of pipe as made of the element's material, metres; null where no source gives it. */
function madeBore({ code, network, model }: Outcome, pipe: PipeId, size: NominalSize): number | null {
  const { element } = network.pipes[pipe]!;
  const { series } = code.walls.pipeOf(element === null ? null : model.elements[element]!.material);
  const dn = code.series.sizes[code.series.rank(size)]!.dn;
  const inner = series.rows.find((row) => row.dn === dn)?.innerMm ?? null;
  return inner === null ? null : inner / 1000;
}

/** The published formulas take the nominal size where the code knows no bores. */
function inStack({ code }: Outcome, size: NominalSize, flow: number | null): StackHydraulics | null {
  const nominal = code.series.sizes[code.series.rank(size)]!.lengthsMm[0];
  const bore = code.friction?.bore(size) ?? (nominal === undefined ? null : nominal / 1000);
  if (bore === null) return null;
  const full = stackCapacity(fullStack, bore);
  const speed = terminalSpeed(full, bore);
  return {
    kind: 'stack',
    bore,
    flow: rounded(full),
    speed: rounded(speed),
    terminalLength: rounded(terminalLength(speed)),
    ...(flow === null ? {} : { share: rounded(shareOfStack(flow, bore)) }),
  };
}

/** Hundredths: what anybody reads off a chart. */
const rounded = (value: number): number => Math.round(value * 100) / 100;
