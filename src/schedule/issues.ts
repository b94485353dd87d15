import { elementNames } from './element-names.ts';
import { sizeText } from './number-text.ts';
import type { Result, ResultFinding } from './result.ts';
import { shownText } from './shown-text.ts';
import { counted, countedKinds, plainWords, sentence } from './trade-words.ts';
import { type UndersizedGroup, undersizedGroups } from './undersized-text.ts';

/** One thing to settle with the designer, however many elements it touches. */
export interface Issue {
  readonly code: string;
  readonly severity: 'error' | 'warning';
  /** One line. */
  readonly title: string;
  /** Whole sentences, one a line. */
  readonly text: string;
  /** GlobalIds of the elements at fault, without repeats, in the order of the result. */
  readonly about: readonly string[];
}

export interface Issues {
  readonly issues: readonly Issue[];
  /** How many more there were than are listed. */
  readonly leftOut: number;
}

/** Readers of issues grow slow and people stop reading long before this. */
const mostIssues = 1000;
/** More findings of one code than this are one issue: they share a cause or at least a remedy. */
const mostAlike = 12;
const mostSentences = 40;

/**
 * What there is to settle: the undersized pipes by cause, then the other errors one by one, then the warnings by kind.
 * Notes ask for nothing and stay out.
 */
export function issuesOf(result: Result): Issues {
  const errors = result.findings.filter(({ severity, code }) => severity === 'error' && code !== 'undersized');
  const warnings = result.findings.filter(({ severity }) => severity === 'warning');
  const all = [
    ...undersizedGroups(result).map((group) => undersizedIssue(result, group)),
    ...byCode(errors).flatMap((alike) =>
      alike.length > mostAlike ? [issueOf(result, alike)] : alike.map((finding) => issueOf(result, [finding])),
    ),
    ...byCode(warnings).map((alike) => issueOf(result, alike)),
  ];
  return { issues: all.slice(0, mostIssues), leftOut: Math.max(0, all.length - mostIssues) };
}

function undersizedIssue(result: Result, { pipes, root, governing, battery }: UndersizedGroup): Issue {
  const roles = countedKinds(pipes.map(({ role }) => plainWords(role)));
  const about = unique(pipes.map(({ globalId }) => globalId));
  const at = new Set(about);
  const sentences = result.findings.flatMap((finding) =>
    finding.code === 'undersized' && at.has(finding.about[0] ?? '') ? [sentenceOf(finding)] : [],
  );
  const whose = battery === null ? '' : `, ${battery}`;
  const why = governing === null ? [] : [sentence(`${shownText(governing.title)} (${shownText(governing.clause)})`)];
  return {
    code: 'undersized',
    severity: 'error',
    title: `Undersized: ${roles}${whose}, drawn ${root.modelled?.label ?? '?'}, needs ${sizeText(root.required)}`,
    text: [...why, ...capped(sentences)].join('\n'),
    about,
  };
}

function issueOf(result: Result, alike: readonly ResultFinding[]): Issue {
  const [first] = alike;
  if (first === undefined) throw new Error('an issue of no finding');
  const names = elementNames(result);
  const about = unique(alike.flatMap((finding) => finding.about));
  const what = plainWords(first.code).replace(/^./, (letter) => letter.toUpperCase());
  const where = alike.length > 1 ? counted(alike.length, 'place') : names.of(about[0] ?? '');
  return {
    code: first.code,
    severity: first.severity === 'error' ? 'error' : 'warning',
    title: where === '' ? what : `${what}: ${where}`,
    text: capped(alike.map(sentenceOf)).join('\n'),
    about,
  };
}

function byCode(findings: readonly ResultFinding[]): readonly (readonly ResultFinding[])[] {
  const groups = new Map<string, ResultFinding[]>();
  for (const finding of findings) {
    const known = groups.get(finding.code);
    if (known === undefined) groups.set(finding.code, [finding]);
    else known.push(finding);
  }
  return [...groups.values()];
}

/** A sentence names its clause itself, or gets it behind. */
function sentenceOf({ sentence: said, clause }: ResultFinding): string {
  const text = shownText(said);
  return clause === null || text.includes(clause) ? text : `${text} (${clause})`;
}

const capped = (sentences: readonly string[]): readonly string[] =>
  sentences.length <= mostSentences
    ? sentences
    : [...sentences.slice(0, mostSentences), `and ${sentences.length - mostSentences} more.`];

const unique = (ids: readonly string[]): readonly string[] => [...new Set(ids)];
