import { rowAtSize } from '../../tables/find-row.ts';
import type { Load } from '../../units/quantity.ts';
import type { CodeRules } from '../plumbing-code.ts';
import { steadyLoadBy } from '../rules/steady-load.ts';
import type { Tools } from '../tools.ts';
import { checks } from './checks.ts';
import { drainRules, washers } from './drain-rules.ts';
import { bathroomGroup, fixtures, sharedTrap } from './fixtures.ts';
import { readings, whenNoneHolds } from './readings.ts';
import { unsized, ventLength, ventRules } from './vent-rules.ts';
import { wetRules } from './wet-rules.ts';

/** International Plumbing Code: which rule reads which table, the book's contents page. */
export function ipc(tools: Tools): CodeRules {
  const { family } = tools;
  const arms = family.table('trap-arm');
  const reliefClosets = family.number('relief-closets', 'count');
  return {
    fixtures: fixtures(tools),
    readings: readings(tools),
    whenNoneHolds,
    rules: [...drainRules(tools), ...wetRules(tools), ...ventRules(tools)],
    checks: checks(tools),
    // Emergency floor drains are not excused (901.2.1).
    freeOfVent: () => null,
    armLimit: (trap, { siphonic }) => {
      const longest = rowAtSize(arms, 'trap', trap, 'smaller', family.series)?.amount('longest').value;
      return siphonic || typeof longest !== 'number' ? null : longest;
    },
    steadyLoad: steadyLoadBy(family.number('continuous-flow', 'factor')),
    sewerBegins: family.number('sewer-start', 'length').value,
    stackOffset: 0,
    batteryLimits: {
      reliefDrainLoad: family.number('relief-drain-load', 'load').value as Load,
      reliefDue: ({ closets, soilAbove }) => closets >= reliefClosets.value && soilAbove,
      additionalAfter: Number.POSITIVE_INFINITY,
      turnDegrees: Number.POSITIVE_INFINITY,
    },
    ventStack: null,
    ventLength,
    unsized: unsized(tools),
    wetVentLoad: 'section',
    islandVents: true,
    group: bathroomGroup(tools),
    row: null,
    counts: [{ id: washers, takes: ({ kind }) => kind === 'clothes-washer' }],
    sharedTrap,
  };
}
