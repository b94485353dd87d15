import { type MediumSaid, mediumOfPiping } from './element-medium.ts';
import { textsOf } from './element-texts.ts';
import type { IdentifyFacts } from './identify-facts.ts';
import { type FixtureDetail, type Identity, noDetail, type Part } from './identity.ts';
import { type Judgement, judgeKind } from './judge-kind.ts';
import { fixtureIdentity, type Identified, piping, turned } from './made-identity.ts';
import type { Element } from './model.ts';
import { ventingWord } from './venting-word.ts';

/** Pipe segments, fittings and valves: piping unless a clear word makes a trap, cleanout or vent end of them. */
export function identifyPiping(element: Element, facts: IdentifyFacts): Identified {
  const medium = mediumOfPiping(element, facts.media, facts.names);
  if (element.kind === 'segment') return { identity: pipeIdentity(element, medium, facts), contradiction: null };
  const judged = judgeKind(element, facts.names);
  if (judged !== null) {
    const turned =
      element.kind === 'valve'
        ? valveTurned(element, judged, medium, facts)
        : fittingTurned(element, judged, medium, facts);
    if (turned !== null) return turned;
  }
  const part: Part = element.kind === 'valve' ? 'valve' : 'fitting';
  return { identity: piping(part, medium, element.ifcClass, noDetail), contradiction: null };
}

function pipeIdentity(element: Element, medium: MediumSaid | null, { names, venting }: IdentifyFacts): Identity {
  const toSewer = textsOf(element, names).some(({ text }) => names.readThing(text)?.kind === 'sewer-connection');
  const detail: FixtureDetail = toSewer ? { ...noDetail, style: 'building-sewer' } : noDetail;
  return { ...piping('pipe', medium, element.ifcClass, detail), reading: ventingWord(element, venting, names) };
}

/** Parts that models draw as fittings. */
const fromFitting: ReadonlySet<Part> = new Set([
  'trap',
  'cleanout',
  'vent-terminal',
  'air-admittance-valve',
  'sewer-connection',
  'valve',
  'tank',
]);
/** The same as valves, "pipe accessories" among them. */
const fromValve: ReadonlySet<Part> = new Set(['trap', 'cleanout', 'vent-terminal', 'sewer-connection', 'tank']);

function fittingTurned(
  element: Element,
  judged: Judgement,
  medium: MediumSaid | null,
  { names }: IdentifyFacts,
): Identified | null {
  const { part } = names.meaning(judged.kind);
  if (judged.weak) return null;
  if (fromFitting.has(part)) return turned(element, judged, medium, names);
  // A floor drain may be drawn as a fitting; a bend to a closet is none.
  const isDrain =
    judged.kind === 'floor-drain' && element.predefinedType !== 'BEND' && element.predefinedType !== 'TRANSITION';
  return isDrain ? fixtureIdentity(element, judged, medium, names) : null;
}

function valveTurned(
  element: Element,
  judged: Judgement,
  medium: MediumSaid | null,
  { names }: IdentifyFacts,
): Identified | null {
  const meaning = names.meaning(judged.kind);
  const drains = medium === null || medium.medium === 'sanitary' || medium.medium === 'vent';
  if (meaning.part === 'air-admittance-valve') {
    // The schema's words for it also mean an automatic air vent of heating and supply pipes.
    const byType = judged.evidence.startsWith('PredefinedType');
    return drains && (medium !== null || !byType) ? turned(element, judged, medium, names) : null;
  }
  if (meaning.part === 'valve') return drains ? turned(element, judged, medium, names) : null;
  if (fromValve.has(meaning.part) && !judged.weak) return turned(element, judged, medium, names);
  if (meaning.part === 'fixture' && !judged.weak) return fixtureIdentity(element, judged, medium, names);
  if (meaning.part !== 'not-drainage' || (medium !== null && drains)) return null;
  return turned(element, judged, medium, names);
}
