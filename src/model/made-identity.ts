import type { MediumSaid } from './element-medium.ts';
import { fixtureDetail } from './fixture-detail.ts';
import { type FixtureDetail, type FixtureKind, type Identity, noDetail, type Part } from './identity.ts';
import type { Contradiction, Judgement } from './judge-kind.ts';
import type { Element } from './model.ts';
import type { NamesTable } from './names-table.ts';
import { outletSize } from './outlet-size.ts';

/** One element's identity, and what in it contradicts itself. */
export interface Identified {
  readonly identity: Identity;
  readonly contradiction: Contradiction | null;
}

/** A fixture with everything that its names and properties say of it. */
export function fixtureIdentity(
  element: Element,
  judged: Judgement,
  medium: MediumSaid | null,
  names: NamesTable,
): Identified {
  const { fixture, style } = names.meaning(judged.kind);
  return {
    identity: {
      part: 'fixture',
      kind: fixture,
      detail: fixture === null ? noDetail : fixtureDetail(element, fixture, style, names),
      medium: mediumOfFixture(fixture, medium),
      evidence: judged.evidence,
      weak: judged.weak,
      outletMm: outletSize(element, names),
      reading: null,
    },
    contradiction: judged.contradiction,
  };
}

/** Fixtures stand in supply systems too; only a drain in the floor may belong to rain. */
const mediumOfFixture = (kind: FixtureKind | null, medium: MediumSaid | null): Identity['medium'] =>
  kind === 'floor-drain' && medium?.medium === 'storm' ? 'storm' : 'sanitary';

/** The identity of a part that is no fixture, by the word or type that decided. */
export function turned(element: Element, judged: Judgement, medium: MediumSaid | null, names: NamesTable): Identified {
  const meaning = names.meaning(judged.kind);
  const style = meaning.style;
  return {
    identity: {
      part: meaning.part,
      kind: null,
      detail: style === null ? noDetail : { ...noDetail, style },
      medium: meaning.medium ?? medium?.medium ?? null,
      evidence: judged.evidence,
      weak: judged.weak,
      outletMm: meaning.part === 'trap' ? outletSize(element, names) : null,
      reading: null,
    },
    contradiction: judged.contradiction,
  };
}

/** An element that has no part in drainage, for a reason other than its name. */
export const leftOut = (medium: MediumSaid | null, ground: string): Identity => ({
  ...piping('not-drainage', medium, ground, noDetail),
  medium: medium?.medium ?? 'other',
});

/** A piece of the way, known by what flows in it. */
export const piping = (part: Part, medium: MediumSaid | null, ifcClass: string, detail: FixtureDetail): Identity => ({
  part,
  kind: null,
  detail,
  medium: medium?.medium ?? null,
  evidence: medium?.evidence ?? ifcClass,
  weak: medium?.weak ?? false,
  outletMm: null,
  reading: null,
});
