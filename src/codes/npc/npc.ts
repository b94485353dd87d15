import { rowAtSize } from '../../tables/find-row.ts';
import type { Load } from '../../units/quantity.ts';
import type { CodeRules } from '../plumbing-code.ts';
import { steadyLoadBy } from '../rules/steady-load.ts';
import type { Tools } from '../tools.ts';
import { checks } from './checks.ts';
import { drainRules } from './drain-rules.ts';
import { bathroomGroup, fixtures, freeOfVent, macerators } from './fixtures.ts';
import { countOnOneTrap } from './one-trap.ts';
import { readings, whenNoneHolds } from './readings.ts';
import { washers } from './stack-checks.ts';
import { ventLength, ventRules } from './vent-rules.ts';
import { wetVentRules } from './wet-vent-rules.ts';

/** National Plumbing Code of Canada: which rule reads which table, the book's contents page. */
export function npc(tools: Tools): CodeRules {
  const { family } = tools;
  const arms = family.table('trap-arm');
  return {
    fixtures: fixtures(tools),
    readings: readings(tools),
    whenNoneHolds: whenNoneHolds(tools),
    rules: [...drainRules(tools), ...wetVentRules(tools), ...ventRules(tools)],
    checks: checks(tools),
    freeOfVent: freeOfVent(tools),
    armLimit: (trap, { siphonic }) => {
      const longest = rowAtSize(arms, 'trap', trap, 'smaller', family.series)?.amount('longest').value;
      return siphonic || typeof longest !== 'number' ? null : longest;
    },
    sewerBegins: family.number('sewer-start', 'length').value,
    stackOffset: family.number('stack-offset-length', 'length').value,
    batteryLimits: {
      reliefDrainLoad: family.number('relief-drain-load', 'load').value as Load,
      reliefDue: () => true,
      additionalAfter: family.number('additional-fixtures', 'count').value,
      turnDegrees: family.number('additional-turn', 'angle').value,
    },
    ventStack: {
      storeys: family.number('vent-stack-storeys', 'count').value,
      footLoad: family.number('vent-stack-foot-load', 'load').value as Load,
    },
    ventLength,
    wetVentLoad: 'whole',
    islandVents: false,
    group: bathroomGroup(tools),
    row: null,
    counts: [
      { id: washers, takes: ({ kind }) => kind === 'clothes-washer' },
      { id: macerators, takes: ({ kind }) => kind === 'macerating-toilet' },
    ],
    sharedTrap: countOnOneTrap,
    steadyLoad: steadyLoadBy(family.number('continuous-flow', 'factor')),
  };
}
