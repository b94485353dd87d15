import { type ElementNames, elementNames } from './element-names.ts';
import { decimal, lengthText, loadText, sizeText, slopeText } from './number-text.ts';
import type { LoadRange, Result, ResultPipe, TrailStep } from './result.ts';
import { shownText, unbroken } from './shown-text.ts';
import { blank, heading, paragraph, type TextLine } from './text-line.ts';
import { counted, countedKinds, plainWords } from './trade-words.ts';

/** Undersized pipes that share a cause: the rule, and the battery, stack or pipe that it comes from. */
export interface UndersizedGroup {
  readonly cause: string;
  /** In the order of the result. */
  readonly pipes: readonly ResultPipe[];
  /** The pipe where the cause lies: its own demand governs, not one that a pipe before it hands on. */
  readonly root: ResultPipe;
  /** Of the root: the demand that governs, and its battery. */
  readonly governing: TrailStep | null;
  readonly battery: string | null;
  /** What one vent would spare, in a sentence; null where it would not. */
  readonly remedy: string | null;
}

/** Groups of the undersized pipes: most pipes first, then by the first pipe. */
export function undersizedGroups({ findings, pipes }: Result): UndersizedGroup[] {
  const causes = new Map(
    findings.flatMap(({ code, about, facts }) => (code === 'undersized' ? [[about[0], String(facts.cause)]] : [])),
  );
  const remedies = new Map(
    findings.flatMap(({ code, facts, sentence }) =>
      code === 'one-vent-short' ? [[String(facts.battery), sentence]] : [],
    ),
  );
  const groups = new Map<string, ResultPipe[]>();
  for (const pipe of pipes) {
    const cause = causes.get(pipe.globalId);
    if (cause !== undefined) groups.set(cause, [...(groups.get(cause) ?? []), pipe]);
  }
  return [...groups]
    .flatMap(([cause, group]) => {
      const root = group.find((pipe) => cause.startsWith(`${governingOf(pipe)?.rule} `)) ?? group[0];
      if (root === undefined) return [];
      const battery = root.battery ?? null;
      const remedy = battery === null ? null : (remedies.get(battery) ?? null);
      return [{ cause, pipes: group, root, governing: governingOf(root) ?? null, battery, remedy }];
    })
    .sort((a, b) => b.pipes.length - a.pipes.length);
}

const governingOf = ({ trail }: ResultPipe): TrailStep | undefined => trail.find(({ governs }) => governs);

/** The undersized pipes grouped by cause: modelled size, required size, load, clause, and which pipes they are. */
export function undersizedText(result: Result): TextLine[] {
  const groups = undersizedCauses(result);
  if (groups.length === 0) return [];
  const names = elementNames(result);
  const pipes = groups.reduce((sum, group) => sum + group.pipes.length, 0);
  const shown = groups.slice(0, mostGroups);
  const rest = groups.length - shown.length;
  return [
    blank,
    ...heading(`Undersized: ${pipes} of ${counted(result.counts.pipes, 'pipe')}, by cause`),
    ...shown.flatMap((group, place) => groupText(group, place + 1, result.code.unit, names)),
    ...(rest === 0
      ? []
      : paragraph(`and ${counted(rest, 'smaller group')}; --json lists every pipe`, '      ', 'quiet')),
  ];
}

/** Groups as they are told: alike ones together, with the batteries that they come from. */
export interface UndersizedCause extends UndersizedGroup {
  readonly batteries: readonly string[];
  /** Of each group among them. */
  readonly roots: readonly ResultPipe[];
}

/** Single pipes, and rows, that fall short alike, by the same row and load, are one line and not a page of them. Most pipes first. */
export function undersizedCauses(result: Result): UndersizedCause[] {
  const groups = undersizedGroups(result);
  const merged = new Map<string, UndersizedCause>();
  for (const group of groups) {
    const { pipes, root, governing, battery, cause } = group;
    const { role, modelled, required, load } = root;
    const told = governing !== null && (battery !== null || pipes.length === 1);
    const each = pipes.map((pipe) => [pipe.role, pipe.modelled?.label, pipe.required]);
    const key = told
      ? JSON.stringify([
          role,
          modelled?.label,
          required,
          load,
          root.ventLoad,
          battery === null,
          group.remedy === null,
          each,
          governing.rule,
          governing.row,
          governing.asks?.label,
        ])
      : cause;
    const known = merged.get(key);
    const batteries = [...(known?.batteries ?? []), ...(battery === null ? [] : [battery])];
    merged.set(
      key,
      known === undefined
        ? { ...group, batteries, roots: [root] }
        : { ...known, pipes: [...known.pipes, ...pipes], batteries, roots: [...known.roots, root] },
    );
  }
  return [...merged.values()].sort((a, b) => b.pipes.length - a.pipes.length);
}

const mostGroups = 12;
const mostPipes = 8;

function groupText(group: UndersizedCause, place: number, unit: string, names: ElementNames): TextLine[] {
  const { pipes, remedy } = group;
  const bySizes = new Map<string, ResultPipe[]>();
  for (const pipe of pipes) {
    const sizes = `Drawn ${pipe.modelled?.label ?? '?'}, needs ${sizeText(pipe.required)}`;
    bySizes.set(sizes, [...(bySizes.get(sizes) ?? []), pipe]);
  }
  const battery = batteriesText(group);
  const whose = battery === '' ? '' : `, ${battery}`;
  const named = pipes.slice(0, mostPipes).map(({ globalId }) => unbroken(names.of(globalId)));
  const more = pipes.length - named.length;
  return [
    ...[...bySizes].flatMap(([sizes, some], line) =>
      paragraph(
        `${sizes}: ${countedKinds(some.map(({ role }) => plainWords(role)))}${whose}`,
        line === 0 ? `${place}. `.padStart(6) : '      ',
        'error',
      ),
    ),
    ...paragraph(reasonText(group, unit, names), '      '),
    ...(remedy === null ? [] : paragraph(shownText(remedy), '      ')),
    ...paragraph(named.join(', ') + (more > 0 ? ` and ${more} more` : ''), '      ', 'quiet'),
  ];
}

/** `battery-1 and 4 alike`; empty where the cause lies in no row. */
export const batteriesText = ({ batteries: [first, ...alike] }: UndersizedCause): string =>
  first === undefined ? '' : `${first}${alike.length === 0 ? '' : ` and ${alike.length} alike`}`;

/** The developed length that entered a table, or the shortest and longest of several; null: none did. */
function lengthsOf(roots: readonly ResultPipe[]): string | null {
  const lengths = roots.flatMap(({ developedLength }) => developedLength ?? []);
  if (lengths.length === 0) return null;
  const [least, most] = [lengthText(Math.min(...lengths)), lengthText(Math.max(...lengths))];
  return least === most ? most : `${least} to ${most}`;
}

/** The rule, the load and length that chose the row, and where it is printed. */
export function reasonText({ root: pipe, roots }: UndersizedCause, unit: string, names: ElementNames): string {
  const { load, ventLoad, provisional } = pipe;
  const lengths = lengthsOf(roots);
  const step = governingOf(pipe);
  const upstream = step?.facts.upstream;
  const entering = enteringLoad(step, ventLoad ?? load);
  const parts = [
    [...(step === undefined ? [] : [step.title]), ...(entering === null ? [] : [loadText(entering, unit)])].join(': '),
    ...(lengths === null ? [] : [`${lengths} developed length`]),
    ...holdsText(step),
    ...closetsText(step),
    ...steeperText(step),
    ...(typeof upstream === 'string' ? [`after ${names.of(upstream)}`] : []),
    ...(step === undefined ? [] : [step.clause]),
    ...(provisional ? ['provisional'] : []),
  ];
  return parts.join('; ');
}

/** A vent that no trap breathes through is sized by a load that its demand names, a relief vent by that of its branch, or by none. */
function enteringLoad(step: TrailStep | undefined, own: LoadRange): LoadRange | null {
  if (own.most > 0) return own;
  const named = step?.facts.loadUnits;
  return typeof named === 'number' ? { least: named, most: named } : null;
}

/** Where the number of water closets asks for the size: how many there are, and how many a smaller pipe takes. */
function closetsText(step: TrailStep | undefined): string[] {
  const { closets, closetsMost } = step?.facts ?? {};
  return typeof closets === 'number' && typeof closetsMost === 'number'
    ? [`${counted(closets, 'water closet')}, at most ${closetsMost}`]
    : [];
}

/** Where the slope asks for the size: what would do in a steeper pipe. */
function steeperText(step: TrailStep | undefined): string[] {
  const size = step?.facts.steeperSize;
  const slope = step?.facts.steeperSlope;
  return typeof size === 'string' && typeof slope === 'number'
    ? [`laid at ${slopeText(slope)} or steeper ${size} is enough`]
    : [];
}

/** `3 in holds 12, 4 in 36`: what the table gives the next smaller size and the one that it asks for. */
function holdsText(step: TrailStep | undefined): string[] {
  const limit = step?.facts.limitUnits;
  if (step === undefined || step.asks === null || typeof limit !== 'number') return [];
  const { asks, smaller } = step;
  return typeof smaller?.limit === 'number'
    ? [`${smaller.size.label} holds ${decimal(smaller.limit, 2)}, ${asks.label} ${decimal(limit, 2)}`]
    : [`${asks.label} holds ${decimal(limit, 2)}`];
}
