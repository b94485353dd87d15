import { sizeForLoad } from '../../tables/find-size.ts';
import type { NominalSize } from '../../units/nominal-size.ts';
import { noLoad, plusLoad, unitsOf } from '../../units/quantity.ts';
import { coordinateMetres, turnDegrees } from '../../units/uncertainty.ts';
import type { BatteryFacts, BatteryTrap, Broken } from '../battery.ts';
import type { ReadingRule } from '../plumbing-code.ts';
import type { Reading } from '../reading.ts';
import type { Tools } from '../tools.ts';

/** Conditions of a wet vent (R43 to R50), a circuit vent (R53 to R63, R69) and individual vents (R36). */
export function readings(tools: Tools): ReadingRule[] {
  return [
    { reading: 'wet-vent', broken: wetVentBreaks(tools) },
    { reading: 'circuit-vent', broken: circuitVentBreaks(tools) },
    { reading: 'individual-vent', broken: individualBreaks(tools) },
  ];
}

/** Neither holds and both break equally many: a closet too many or a large arm speaks for a circuit vent (RULES 4.3). */
export function whenNoneHolds({ family }: Tools): (facts: BatteryFacts) => Reading {
  const arm = family.size('wet-vent-arm');
  const closets = family.number('wet-vent-closets', 'count');
  return ({ wet, traps }) => {
    const large = traps.some(({ size, closet }) => !closet && family.series.rank(size) > family.series.rank(arm.value));
    return wet.closets > closets.value || large ? 'circuit-vent' : 'wet-vent';
  };
}

type Breaks = (facts: BatteryFacts) => Broken[];

function wetVentBreaks({ family, omit, settings }: Tools): Breaks {
  const { rank } = family.series;
  const table = family.table('wet-vent');
  const mostClosets = family.number('wet-vent-closets', 'count');
  const largestArm = family.size('wet-vent-arm');
  const guestLoad = family.number('wet-vent-guests', 'load');
  const upperLoad = family.number('wet-vent-upper-storey', 'load');
  const mostOffsets = family.number('wet-vent-offsets', 'count');
  const smallOffset = {
    upTo: family.size('wet-vent-offset-small-up-to'),
    length: family.number('wet-vent-offset-small', 'length'),
  };
  const largeOffset = family.number('wet-vent-offset-large', 'length');
  const clause = (rule: string): string => family.rule(rule).clause;

  return ({ wet, traps, guests }) => {
    const broken: Broken[] = [];
    const breaks = (
      rule: string,
      facts: Broken['facts'],
      finding: Broken['finding'] = 'wet-vent-not-allowed',
    ): void => {
      broken.push({ rule, clause: clause(rule), facts, finding });
    };
    const column = wet.closets > 0 ? 'withCloset' : 'noCloset';
    const found = sizeForLoad(table, column, wet.load, omit);
    if (found.size === null) {
      const limit = found.cell.value;
      breaks(
        'NPC-R43',
        { loadUnits: unitsOf(wet.load), limitUnits: typeof limit === 'number' ? limit / 60 : null },
        'wet-vent-overloaded',
      );
    }
    // A closet at the head, with the vent on its own drain, drains into the wet vent like the others.
    const closets = traps.filter(({ closet }) => closet);
    if (closets.length > mostClosets.value)
      breaks('NPC-R44', { closets: closets.length, closetsMost: mostClosets.value });
    else if (closets.length === 2 && closets[0]!.joins !== closets[1]!.joins) breaks('NPC-R44', { closetsApart: true });
    if (settings.wetVentClosetOrder === 'always' && closetBeforeOthers(traps))
      breaks('NPC-R44', { closetUpstream: true });
    if (settings.wetVentArms === 'always' || wet.storeys > 1) {
      const large = traps.filter(
        ({ closet, place, emergency, free, size }) =>
          !closet && place > 0 && !(emergency && free) && rank(size) > rank(largestArm.value),
      );
      for (const { size } of large.slice(0, 1))
        breaks('NPC-R45', { arm: size, armMost: largestArm.value, arms: large.length });
    }
    const guestSum = guests.reduce((sum, { load }) => plusLoad(sum, load), noLoad);
    if (guestSum > guestLoad.value)
      breaks('NPC-R46', { guestUnits: unitsOf(guestSum), guestUnitsMost: guestLoad.value / 60, guests: guests.length });
    for (const { storey, load } of wet.upperStoreys) {
      if (load > upperLoad.value)
        breaks('NPC-R47', { storey, loadUnits: unitsOf(load), limitUnits: upperLoad.value / 60 });
    }
    if (wet.offsets.length > mostOffsets.value)
      breaks('NPC-R48', { offsets: wet.offsets.length, offsetsMost: mostOffsets.value });
    const longest =
      found.size !== null && rank(found.size) <= rank(smallOffset.upTo.value) ? smallOffset.length : largeOffset;
    for (const { length, joined } of wet.offsets) {
      if (length > longest.value + coordinateMetres) breaks('NPC-R48', { offsetM: length, offsetMostM: longest.value });
      if (joined) breaks('NPC-R48', { joinedInOffset: true });
    }
    return broken;
  };
}

const closetBeforeOthers = (traps: readonly BatteryTrap[]): boolean => {
  const firstCloset = traps.find(({ closet }) => closet);
  return firstCloset !== undefined && traps.some(({ closet, place }) => !closet && place > firstCloset.place);
};

function circuitVentBreaks({ family }: Tools): Breaks {
  const { rank } = family.series;
  const small = family.size('circuit-small-outlet');
  const mostTraps = family.number('additional-fixtures', 'count');
  const mostTurn = family.number('additional-turn', 'angle');
  const onVentLoad = family.number('vent-fixture-load', 'load');
  const onVentCount = family.number('vent-fixtures', 'count');
  const clause = (rule: string): string => family.rule(rule).clause;
  const isSmall = (size: NominalSize): boolean => rank(size) < rank(small.value);

  return ({ circuit }) => {
    const broken: Broken[] = [];
    const breaks = (
      rule: string,
      facts: Broken['facts'],
      finding: Broken['finding'] = 'circuit-vent-not-allowed',
    ): void => {
      broken.push({ rule, clause: clause(rule), facts, finding });
    };
    const { traps, onVent, relief, stretches } = circuit;
    if (circuit.vertical > 0) breaks('NPC-R53', { verticalPipes: circuit.vertical });
    if (new Set(traps.map(({ storey }) => storey)).size > 1)
      breaks('NPC-R53', { storeys: new Set(traps.map(({ storey }) => storey)).size });
    if (circuit.stackUpstream) breaks('NPC-R53', { stackUpstream: true });
    if (circuit.trapsAtStart !== 1) breaks('NPC-R54', { trapsAtStart: circuit.trapsAtStart });
    if (traps.some(({ size }) => isSmall(size)) && traps.some(({ size }) => !isSmall(size))) {
      breaks('NPC-R56', { smallOutlets: traps.filter(({ size }) => isSmall(size)).length, smallBelow: small.value });
    }
    if (relief === null) breaks('NPC-R57', { traps: traps.length }, 'relief-vent-missing');
    for (const stretch of stretches) {
      if (stretch.traps > mostTraps.value)
        breaks('NPC-R60', { traps: stretch.traps, trapsMost: mostTraps.value }, 'additional-circuit-vent-missing');
      if (stretch.turnDegrees > mostTurn.value + turnDegrees)
        breaks(
          'NPC-R60',
          { turnDeg: stretch.turnDegrees, turnMostDeg: mostTurn.value },
          'additional-circuit-vent-missing',
        );
    }
    for (const { load } of onVent.filter((one) => one.load > onVentLoad.value).slice(0, 1)) {
      breaks('NPC-R69', { loadUnits: unitsOf(load), limitUnits: onVentLoad.value / 60 });
    }
    if (onVent.length > onVentCount.value)
      breaks('NPC-R69', { fixturesOnVent: onVent.length, fixturesMost: onVentCount.value });
    else if (onVent.length === 2 && onVent[0]!.joins !== onVent[1]!.joins) breaks('NPC-R69', { fixturesApart: true });
    return broken;
  };
}

function individualBreaks({ family }: Tools): Breaks {
  const { clause } = family.rule('NPC-R36');
  return ({ traps }) => {
    const without = traps.filter(({ ownVent, free }) => !ownVent && !free);
    return without.length === 0
      ? []
      : [{ rule: 'NPC-R36', clause, facts: { traps: without.length }, finding: 'unvented-trap' }];
  };
}
