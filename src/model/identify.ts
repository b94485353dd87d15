import { type Finding, finding, type WithFindings } from '../findings/finding.ts';
import { type AnswerBook, answerBook, answeredIdentity } from './answered-identity.ts';
import type { Answers } from './answers.ts';
import { mediaOfSystems } from './element-medium.ts';
import { flushFromBeside } from './flush-beside.ts';
import { identifyBody } from './identify-body.ts';
import type { IdentifyFacts } from './identify-facts.ts';
import { identifyPiping } from './identify-piping.ts';
import { identifyTerminal } from './identify-terminal.ts';
import type { Identity } from './identity.ts';
import type { Contradiction } from './judge-kind.ts';
import type { Identified } from './made-identity.ts';
import type { Element, Model } from './model.ts';
import type { NamesTable } from './names-table.ts';
import { ventingOfSystems, ventingWord } from './venting-word.ts';

/**
 * What each element is for the trade, by element id. Class before type before name, as the names table says; the user's
 * answers above all. A contradiction is the finding `kind-contradicted`, in the order of the elements.
 */
export function identify(model: Model, answers: Answers, names: NamesTable): WithFindings<readonly Identity[]> {
  const facts: IdentifyFacts = {
    names,
    media: mediaOfSystems(model, names),
    venting: ventingOfSystems(model, names),
  };
  const book = answerBook(answers);
  const findings: Finding[] = [];
  const identities = model.elements.map((element) => {
    const { identity: found, contradiction } = identifyElement(element, facts);
    const reading = found.part === 'fixture' ? ventingWord(element, facts.venting, names) : null;
    const identity = reading === null ? found : { ...found, reading };
    const answered = answeredBy(book, element, identity);
    if (contradiction !== null && answered === identity) findings.push(contradicted(element, contradiction));
    return answered;
  });
  return { value: flushFromBeside(model, identities), findings };
}

function identifyElement(element: Element, facts: IdentifyFacts): Identified {
  switch (element.kind) {
    case 'segment':
    case 'fitting':
    case 'valve':
      return identifyPiping(element, facts);
    case 'chamber':
    case 'treatment':
      return identifyBody(element, facts);
    case 'terminal':
    case 'other':
      return identifyTerminal(element, facts);
  }
}

const answeredBy = (book: AnswerBook, element: Element, identity: Identity): Identity =>
  answeredIdentity(book, element, identity) ?? identity;

const contradicted = (element: Element, { taken, takenFrom, other, otherFrom }: Contradiction): Finding =>
  finding('kind-contradicted', [element.id], { taken, takenFrom, other, otherFrom });
