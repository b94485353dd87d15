import type { Load } from '../../units/quantity.ts';
import type { CodeRules } from '../plumbing-code.ts';
import type { Tools } from '../tools.ts';
import { armRow, checks } from './checks.ts';
import { drainRules } from './drain-rules.ts';
import { counts, fixtures, flowLoad, sharedTrap, washerRow } from './fixtures.ts';
import { readings, whenNoneHolds } from './readings.ts';
import { ventLength, ventRules } from './vent-rules.ts';
import { wetRules } from './wet-rules.ts';

/** Uniform Plumbing Code: which rule reads which table, the book's contents page. */
export function upc(tools: Tools): CodeRules {
  const { family } = tools;
  const rowOf = armRow(tools);
  const closetArm = family.number('closet-arm', 'length');
  const reliefClosets = family.number('relief-closets', 'count');
  return {
    fixtures: fixtures(tools),
    readings: readings(tools),
    whenNoneHolds,
    rules: [...drainRules(tools), ...wetRules(tools), ...ventRules(tools)],
    checks: checks(tools),
    freeOfVent: () => null,
    armLimit: (trap, { siphonic }) => {
      const longest = rowOf(trap)?.amount('longest').value;
      return siphonic ? closetArm.value : typeof longest === 'number' ? longest : null;
    },
    steadyLoad: flowLoad(tools),
    sewerBegins: family.number('sewer-start', 'length').value,
    // Offsets are drains like others here, and have no vents of their own.
    stackOffset: Number.POSITIVE_INFINITY,
    batteryLimits: {
      reliefDrainLoad: family.number('relief-drain-load', 'load').value as Load,
      reliefDue: ({ closets, soilAbove }) => closets >= reliefClosets.value && soilAbove,
      additionalAfter: Number.POSITIVE_INFINITY,
      turnDegrees: Number.POSITIVE_INFINITY,
    },
    ventStack: null,
    ventLength,
    wetVentLoad: 'section',
    islandVents: true,
    // The body of the code has no figure for a bathroom group (R12).
    group: null,
    row: washerRow(tools),
    counts: counts(tools),
    sharedTrap,
  };
}
