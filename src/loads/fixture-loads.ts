import type { FixtureRow } from '../codes/fixture-row.ts';
import type { PlumbingCode } from '../codes/plumbing-code.ts';
import { keyMatches } from '../model/answer-keys.ts';
import type { ElementId } from '../model/model.ts';
import type { FixturePath } from '../paths/paths.ts';
import type { NominalSize, SizeSeries } from '../units/nominal-size.ts';
import { noLoad } from '../units/quantity.ts';
import type { FixtureFacts } from './fixture-facts.ts';
import type { FixtureLoad, Scenario } from './loads.ts';
import { readSize, sizeOfLength } from './read-size.ts';
import { countSharedTraps } from './shared-traps.ts';

/** Row, trap and load of every fixture in one scenario, by fixture id. */
export function fixtureLoads(facts: FixtureFacts, scenario: Scenario): FixtureLoad[] {
  const single = facts.paths.fixtures.map((fixture): FixtureLoad => {
    const { kind, detail } = facts.identities[fixture.element]!;
    const rows = facts.code.fixtures.rowsFor(kind, detail);
    const witnessed = trapWitness(facts, fixture);
    const sized = rows.map((row) => ({ row, ...trapOf(row, witnessed, facts.code.series) }));
    const candidates = sized.map((one) => ({ ...one, ...one.row.loadAt(one.trap) }));
    if (detail.flow !== undefined) return steadyLoad(facts.code, candidates, detail.flow, detail.intermittent === true);
    const chosen = choose(candidates, scenario, kind === null, facts.code.series);
    const alike = candidates.every(
      (one) => one.load === chosen.load && one.trap === chosen.trap && one.row.closet === chosen.row.closet,
    );
    return { ...chosen, steady: 0, settled: kind !== null && alike };
  });
  return countSharedTraps(facts, single);
}

interface Candidate {
  readonly row: FixtureRow;
  readonly trap: NominalSize;
  readonly trapFrom: FixtureLoad['trapFrom'];
  readonly load: FixtureLoad['load'];
  readonly cell: FixtureLoad['cell'];
}

/** Lightest and heaviest of what the fixture may be; an unidentified one is a closet only where the scenario says so. */
function choose(
  rows: readonly Candidate[],
  scenario: Scenario,
  unidentified: boolean,
  { rank }: SizeSeries,
): Candidate {
  const byLoad = [...rows].sort((a, b) => a.load - b.load);
  if (scenario === 'lightest') return least(byLoad, rank);
  if (unidentified && scenario === 'closet') return byLoad.findLast(({ row }) => row.closet) ?? byLoad.at(-1)!;
  if (unidentified) return byLoad.findLast(({ row }) => !row.closet) ?? byLoad.at(-1)!;
  return byLoad.at(-1)!;
}

/** The least of everything it may be: the lightest load is not always the smallest trap (an emergency floor drain). */
function least(byLoad: readonly Candidate[], rank: SizeSeries['rank']): Candidate {
  const smallest = (sizes: readonly NominalSize[]): NominalSize => sizes.reduce((a, b) => (rank(b) < rank(a) ? b : a));
  const first = byLoad[0]!;
  const leastTrap = smallest(byLoad.map(({ row }) => row.leastTrap));
  return { ...first, trap: smallest(byLoad.map(({ trap }) => trap)), row: { ...first.row, leastTrap } };
}

/** A stated flow stands for the load: counted as load where the code does so, else kept apart. */
function steadyLoad(
  { steadyLoad: counted }: PlumbingCode,
  rows: readonly Candidate[],
  flow: number,
  intermittent: boolean,
): FixtureLoad {
  const row = rows.find((one) => !one.row.closet) ?? rows[0]!;
  const load = counted?.(flow, intermittent);
  return { ...row, ...(load ?? { load: noLoad }), steady: load === undefined ? flow : 0, settled: true };
}

interface TrapWitness {
  readonly size: NominalSize;
  readonly from: 'drawn' | 'property' | 'answer' | 'pipe';
}

/** Drawn trap, stated outlet or the user's word decide; a pipe's size counts only within what the row prints. */
function trapOf(
  row: FixtureRow,
  witness: TrapWitness | null,
  series: SizeSeries,
): { trap: NominalSize; trapFrom: FixtureLoad['trapFrom'] } {
  if (witness === null) return { trap: row.leastTrap, trapFrom: 'assumed' };
  if (witness.from !== 'pipe') return { trap: witness.size, trapFrom: witness.from };
  const rank = series.rank(witness.size);
  if (rank <= series.rank(row.leastTrap))
    return { trap: row.leastTrap, trapFrom: rank === series.rank(row.leastTrap) ? 'pipe' : 'assumed' };
  return rank > series.rank(row.largestTrap)
    ? { trap: row.largestTrap, trapFrom: 'assumed' }
    : { trap: witness.size, trapFrom: 'pipe' };
}

function trapWitness(facts: FixtureFacts, fixture: FixturePath): TrapWitness | null {
  const { model, network, paths, code, answers, modelled, identities } = facts;
  const element = model.elements[fixture.element]!;
  for (const [key, answer] of answers.fixtures) {
    if (answer.trapSize !== undefined && keyMatches(key, element) && code.series.has(answer.trapSize)) {
      return { size: answer.trapSize as NominalSize, from: 'answer' };
    }
  }
  const trap = paths.traps[fixture.id]!;
  if (trap.how === 'drawn') {
    const drawn = network.joints[trap.at]!.elements.find(
      (one) => identities[one]?.part === 'trap' && one !== fixture.element,
    );
    const size = drawn === undefined ? null : sizeOfTrap(facts, drawn);
    if (size !== null) return { size, from: 'drawn' };
  }
  const stated = identities[fixture.element]!.outletMm;
  const outlet = stated === null ? null : sizeOfLength(stated, code.series, code.dimensions);
  if (outlet !== null) return { size: outlet, from: 'property' };
  const begins = fixture.water[trap.after];
  const pipe = begins === undefined ? null : modelled[begins]!.size;
  return pipe === null ? null : { size: pipe, from: 'pipe' };
}

/** A drawn trap says its size as a terminal does, by its outlet, or as a fitting does. */
function sizeOfTrap(
  { model, identities, code: { series, dimensions } }: FixtureFacts,
  trap: ElementId,
): NominalSize | null {
  const stated = identities[trap]!.outletMm;
  const outlet = stated === null ? null : sizeOfLength(stated, series, dimensions);
  return outlet ?? readSize(model.elements[trap]!, series, dimensions).size;
}
