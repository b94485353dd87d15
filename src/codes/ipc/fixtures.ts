import type { FixtureKind } from '../../model/identity.ts';
import type { Cell } from '../../tables/table.ts';
import type { Load } from '../../units/quantity.ts';
import type { FixtureRow, FixtureRows } from '../fixture-row.ts';
import type { GroupRule } from '../plumbing-code.ts';
import { type GroupSize, partBy } from '../rules/bathroom-parts.ts';
import { fixtureRows } from '../rules/fixture-rows.ts';
import { countBowlsOnce } from '../rules/one-trap.ts';
import { openUses } from '../rules/open-uses.ts';
import type { Tools } from '../tools.ts';

/** Loads of Table 709.1 in the use that the user set, else in private to public use; Table 709.2 by trap (R07, R08). */
export function fixtures(tools: Tools): FixtureRows {
  const rowsOf = (facts: Readonly<Record<string, string>>): FixtureRows =>
    fixtureRows(tools, {
      columns: [{ load: 'load', outlet: 'trap', facts }],
      isSiphonic: (_, kind) => kind === 'water-closet',
      isEmergency: (key) => key === 'floor-drain-emergency',
    });
  const own = useOf(tools);
  return { ...rowsOf(own), openUses: openUses(own.use ?? null, uses, (use) => rowsOf({ use })) };
}

const uses = ['private', 'public'];

const useOf = ({ settings }: Tools): Record<string, string> =>
  typeof settings.use === 'string' ? { use: settings.use } : {};

/** What a row is of a bathroom group (202, R06). */
export const partOf = partBy({
  lavatory: 'lavatory',
  bathtub: 'bath',
  'shower-5.7': 'shower',
  'shower-12.3': 'shower',
  'shower-25.8': 'shower',
  'shower-55.6': 'shower',
  bidet: 'bidet',
  'floor-drain-emergency': 'emergency-drain',
});

/** One water closet, one lavatory, one bathtub or shower, and with them one bidet and one emergency floor drain (202, R06). */
export const groupSize: GroupSize = {
  closet: { slot: 'closet', most: 1 },
  lavatory: { slot: 'lavatory', most: 1 },
  bath: { slot: 'bath or shower', most: 1 },
  shower: { slot: 'bath or shower', most: 1 },
  bidet: { slot: 'bidet', most: 1 },
  'emergency-drain': { slot: 'emergency drain', most: 1 },
};

/** The figure for a whole group, of private bathrooms only: in public rooms its parts are summed (R12). */
export function bathroomGroup({ family, settings }: Tools): GroupRule {
  const table = family.table('fixtures');
  const figureRow = (id: string): Cell<number> =>
    table.rows.find((row) => row.text('fixture') === id)!.amount('load') as Cell<number>;
  const isPrivate = ({ id }: FixtureRow): boolean =>
    id.startsWith('wc-private') || (id === 'wc-flushometer-tank' && settings.use === 'private');
  return {
    clause: family.rule('IPC-R12').clause,
    memberOf: (row) => {
      const part = partOf(row);
      if (part === 'closet') return isPrivate(row) ? 'closet' : null;
      if (part === 'bath' || part === 'shower') return 'bath';
      return part === 'bidet' ? 'extra' : part === 'lavatory' ? 'lavatory' : null;
    },
    figure: ({ id }) => {
      const cell = figureRow(id.includes('over') ? 'bathroom-group-over-1.6' : 'bathroom-group-1.6');
      return { load: cell.value as Load, cell };
    },
  };
}

/** Up to three compartments over one trap are one sink; a dishwasher or grinder through it adds nothing (R50, 709.1). */
export const sharedTrap = countBowlsOnce({
  bowls: new Set<FixtureKind>(['sink', 'kitchen-sink', 'laundry-tray']),
  most: 3,
  through: new Set<FixtureKind>(['dishwasher', 'garbage-grinder']),
});
