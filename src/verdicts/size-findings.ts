import type { PlumbingCode } from '../codes/plumbing-code.ts';
import { type Facts, type Finding, finding } from '../findings/finding.ts';
import type { ElementId } from '../model/model.ts';
import type { Network, PipeId } from '../network/network.ts';
import type { Paths } from '../paths/paths.ts';
import { unitsOf } from '../units/quantity.ts';
import type { PipeVerdict, Run } from './outcome.ts';

/** Undersized and oversized pipes, drawn reductions in the flow, slopes that nobody gives: one finding an element. */
export function sizeFindings(
  network: Network,
  paths: Paths,
  code: PlumbingCode,
  run: Run,
  verdicts: readonly PipeVerdict[],
): Finding[] {
  const findings: Finding[] = [];
  const { rank } = code.series;
  const modelled = (pipe: PipeId) => run.loads.modelled[pipe]!.size;
  for (const [element, sections] of [...network.pipesOf].sort(([a], [b]) => a - b)) {
    const worst = [...sections].sort((a, b) => weight(verdicts[b]!) - weight(verdicts[a]!) || a - b)[0];
    if (worst === undefined) continue;
    const { verdict, required, load, ventLoad, provisional } = verdicts[worst]!;
    // An outlet pipe as wide as its trap is what people lay, whatever less its table allows.
    const asTrap = verdict === 'oversized' && run.roles.uses[worst]!.portion === 'outlet';
    if ((verdict === 'undersized' || verdict === 'oversized') && !asTrap) {
      const step = run.sizes[worst]!.governing[0]!;
      findings.push(
        finding(
          verdict,
          [element],
          {
            role: run.roles.uses[worst]!.role,
            modelled: modelled(worst),
            required: required!.most,
            requiredLeast: required!.least,
            loadUnits:
              typeof step.facts.loadUnits === 'number' ? step.facts.loadUnits : unitsOf((ventLoad ?? load).most),
            rule: step.rule,
            cause: causeOf(run, worst),
            provisional,
            ...(verdict === 'undersized' ? steeperFacts(step.facts) : {}),
            ...(verdict === 'oversized' && run.roles.uses[worst]!.isMainVent ? { mainVent: true } : {}),
          },
          step.clause,
        ),
      );
    }
    const reduced = sections.flatMap((pipe) => reductionInto(pipe));
    const first = reduced[0];
    if (first !== undefined) {
      findings.push(
        finding(
          'smaller-downstream',
          [element, first.from],
          { modelled: modelled(first.pipe), upstream: first.size },
          reductionClause(run, first.pipe),
        ),
      );
    }
  }
  const flat = network.pipes.filter(({ id, element, length }) => {
    const { drain, vertical, portion } = run.roles.uses[id]!;
    return (
      element !== null &&
      drain !== null &&
      !vertical &&
      portion !== 'outlet' &&
      length >= shortest &&
      paths.slopes[id]!.ground === 'unknown'
    );
  });
  if (flat.length > 0) {
    const about = [...new Set(flat.map(({ element }) => element as ElementId))];
    findings.push(
      finding('slope-unknown', about, {
        pipes: about.length,
        assumedSlope: typeof code.settings.assumedSlope === 'number' ? code.settings.assumedSlope : null,
      }),
    );
  }
  return findings;

  function reductionInto(pipe: PipeId): { pipe: PipeId; from: ElementId; size: string }[] {
    const use = run.roles.uses[pipe]!;
    const own = modelled(pipe);
    if (use.drain === null || own === null) return [];
    return use.inflows.flatMap((inflow) => {
      const size = modelled(inflow);
      const from = network.pipes[inflow]!.element;
      return size !== null && from !== null && rank(size) > rank(own) ? [{ pipe, from, size }] : [];
    });
  }
}

/** Where the slope asks for the size: what a steeper pipe would need. */
const steeperFacts = ({ steeperSize, steeperSlope }: Facts): Facts =>
  steeperSize === undefined || steeperSlope === undefined ? {} : { steeperSize, steeperSlope };

/** A stub between two fittings says nothing of the slope a pipe is laid to, metres. */
const shortest = 0.15;

const weights: Readonly<Record<PipeVerdict['verdict'], number>> = {
  undersized: 3,
  unknown: 2,
  oversized: 1,
  agrees: 0,
};
const weight = ({ verdict }: PipeVerdict): number => weights[verdict];

const reductionClause = (run: Run, pipe: PipeId): string =>
  run.sizes[pipe]!.trail.find(({ facts }) => facts.fromPipe !== undefined)?.clause ?? '';

/** Pipes that are too small for one reason share a cause: the rule, and the battery, stack or pipe it comes from. */
export function causeOf(run: Run, start: PipeId): string {
  let pipe = start;
  for (const seen = new Set<PipeId>(); !seen.has(pipe); ) {
    seen.add(pipe);
    const step = run.sizes[pipe]!.governing[0];
    const { battery, stack, vent } = run.roles.uses[pipe]!;
    if (step === undefined) return 'none';
    const from = step.facts.fromPipe;
    if (typeof from === 'number' && run.sizes[from] !== undefined) {
      pipe = from as PipeId;
      continue;
    }
    if (battery !== null) return `${step.rule} battery ${battery.facts.id + 1}`;
    if (stack !== null) return `${step.rule} stack ${stack.id + 1}`;
    if (vent?.stack != null) return `${step.rule} stack ${vent.stack.id + 1}`;
    return `${step.rule} pipe ${pipe}`;
  }
  return 'loop';
}
