import { noLoad } from '../../units/quantity.ts';
import type { CodeRules, FixtureCount, ReadingRule } from '../plumbing-code.ts';
import type { Tools } from '../tools.ts';
import type { StackEntry } from '../way.ts';
import { branchRules } from './branch-rules.ts';
import { checks } from './checks.ts';
import { drainRules, friction } from './drain-rules.ts';
import { countOnOneTrap, fixtureRows } from './fixtures.ts';
import { shortBranch } from './reach.ts';
import { stackRules } from './stack-rules.ts';
import { isGerman, systemOf } from './system.ts';
import { applianceCounts, applianceTables, systemThreeRules } from './system-three.ts';
import { ventLength, ventRules } from './vent-rules.ts';

/** EN 12056-2, systems I to IV: which rule reads which table, the book's contents page. */
export function en12056(tools: Tools): CodeRules {
  const { family, settings } = tools;
  const { rules, beyond } = branchRules(tools);
  const said = settings.entries;
  return {
    fixtures: fixtureRows(tools),
    readings: readings(tools),
    whenNoneHolds: () => 'ventilated-branch',
    rules: [
      ...rules,
      ...systemThreeRules(tools, applianceTables(tools)),
      ...stackRules(tools),
      ...drainRules(tools, beyond),
      ...ventRules(tools),
    ],
    checks: checks(tools),
    freeOfVent: () => null,
    shortBranch: shortBranch(tools),
    entries: {
      sweptUpTo: family.number('swept-angle', 'angle').value,
      said: said === 'square' || said === 'swept' ? (said as StackEntry['shape']) : null,
    },
    friction: friction(tools),
    armLimit: () => null,
    sewerBegins: besideWall,
    stackOffset: Number.POSITIVE_INFINITY,
    batteryLimits: {
      reliefDrainLoad: noLoad,
      reliefDue: () => false,
      additionalAfter: Number.POSITIVE_INFINITY,
      turnDegrees: Number.POSITIVE_INFINITY,
    },
    ventStack: null,
    ventLength: ventLength(tools),
    wetVentLoad: 'whole',
    islandVents: false,
    group: null,
    row: null,
    counts: counts(tools),
    sharedTrap: isGerman(tools) ? countOnOneTrap : null,
  };
}

/** Drains inside and outside a building are told apart at the outer face of its wall; metres that a drawing may be off. */
const besideWall = 0.1;

/** The standard knows no wet vent and no circuit vent: fixtures that share a vent stand on a ventilated branch. */
function readings({ family }: Tools): ReadingRule[] {
  const { id, clause } = family.rule('EN-R13');
  return [
    {
      reading: 'ventilated-branch',
      // Air through a stack is the stack's own vent, not that of a branch.
      broken: ({ wet }) => (wet.stack ? [{ rule: id, clause, facts: { stack: true }, finding: 'unvented-trap' }] : []),
    },
  ];
}

/** What the system counts besides closets. */
function counts(tools: Tools): FixtureCount[] {
  const isSoil: FixtureCount = { id: 'soil', takes: ({ kind, row }) => row.closet || kind === 'urinal' };
  const sinks: FixtureCount = { id: 'kitchen-sink', takes: ({ row }) => row.id === 'kitchen-sink' };
  const large: FixtureCount = { id: 'large-flush', takes: ({ row }) => row.id === 'wc-7.5' || row.id === 'wc-9' };
  switch (systemOf(tools)) {
    case 'III':
      return applianceCounts(tools);
    case 'IV':
      return [isSoil];
    default:
      return isGerman(tools) ? [sinks, large] : [];
  }
}
