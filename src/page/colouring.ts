import type { Building } from './building.ts';
import { mix, type Rgb, type Theme } from './colours.ts';
import { type MarginStep, marginStep, marginSteps } from './margin-step.ts';
import { fates, type PipeFate } from './plan-side.ts';
import type { ColourBy, PageState } from './state.ts';

/** One line of the legend. `pattern` is the second sign beside colour: 0 plain, 1 dashes, 2 rings, 3 dots, 4 long-short. */
export interface Category {
  readonly key: string;
  readonly colour: Rgb;
  readonly pattern: number;
  readonly count: number;
}

const verdicts = ['undersized', 'unknown', 'oversized', 'agrees'] as const;
const verdictPattern: Readonly<Record<string, number>> = { undersized: 0, unknown: 3, oversized: 2, agrees: 0 };
const drainRoles = ['fixture-drain', 'branch', 'stack', 'building-drain', 'building-sewer'];
const ventRoles = [
  'individual-vent',
  'dual-vent',
  'continuous-vent',
  'branch-vent',
  'circuit-vent',
  'additional-circuit-vent',
  'relief-vent',
  'stack-vent',
  'vent-stack',
  'vent-header',
  'yoke-vent',
  'offset-relief-vent',
  'tank-vent',
];
const roleOrder = [...drainRoles, 'wet-vent', 'circuit-vented-branch', ...ventRoles, 'idle', 'unknown'];
/** Upper ends of the steps of load, in the code's unit. */
const loadSteps = [0, 3, 12, 48, 180, 540];

/** What a section counts as under a switch; null for links between fittings, which take their neighbours' grey. */
export function categoryKey(building: Building, section: number, by: ColourBy): string | null {
  const state = building.state(section);
  const pipe = building.pipe(section);
  if (state === undefined || pipe === undefined) return null;
  switch (by) {
    case 'verdict':
      return state.verdict;
    case 'role':
      return state.role;
    case 'system':
      return pipe.system ?? '';
    case 'size':
      return state.modelled?.label ?? '';
    case 'storey':
      return String(building.storeyOf[section]);
    case 'load': {
      const load = Math.max(state.load.most, state.ventLoad?.most ?? 0);
      const step = loadSteps.findIndex((limit) => load <= limit);
      return String(step < 0 ? loadSteps.length : step);
    }
    case 'margin':
      return marginStep(pipe, building.margin(building.data.scene.pipes.pipe[section]!));
    case 'change':
      return building.plan?.fates.get(pipe.globalId) ?? asItIs;
  }
}

/** A pipe that a plan leaves alone. */
export const asItIs = 'same';

/** Upper end of a step of load; null: over the last one, which is `last`. */
export const loadStepEnd = (key: string): number | null => loadSteps[Number(key)] ?? null;
export const lastLoadStep = loadSteps.at(-1) ?? 0;

/** The categories that occur, in the order of the legend, each with its count of pipes. */
export function categoriesOf(building: Building, by: ColourBy, theme: Theme): readonly Category[] {
  const pipes = new Map<string, Set<number>>();
  for (let section = 0; section < building.sectionCount; section++) {
    const key = categoryKey(building, section, by);
    if (key === null) continue;
    const rows = pipes.get(key) ?? new Set();
    rows.add(building.data.scene.pipes.pipe[section]!);
    pipes.set(key, rows);
  }
  const keys = [...pipes.keys()].sort((a, b) => rank(building, by, a) - rank(building, by, b) || (a < b ? -1 : 1));
  return keys.map((key, index) => ({
    key,
    ...look(by, key, index, keys.length, theme),
    count: pipes.get(key)?.size ?? 0,
  }));
}

function rank(building: Building, by: ColourBy, key: string): number {
  if (by === 'verdict') return verdicts.indexOf(key as (typeof verdicts)[number]);
  if (by === 'role') return roleOrder.includes(key) ? roleOrder.indexOf(key) : roleOrder.length;
  if (by === 'storey') return key === '-1' ? Number.POSITIVE_INFINITY : -Number(key);
  if (by === 'load') return Number(key);
  if (by === 'margin') return marginSteps.indexOf(key as MarginStep);
  if (by === 'change') return key === asItIs ? fates.length : fates.indexOf(key as PipeFate);
  if (by === 'size') return building.result.pipes.find(({ modelled }) => modelled?.label === key)?.modelled?.dn ?? 1e9;
  return 0;
}

function look(by: ColourBy, key: string, index: number, of: number, theme: Theme): { colour: Rgb; pattern: number } {
  if (key === '' || (by === 'storey' && key === '-1')) return { colour: theme.unknown, pattern: 3 };
  if (by === 'verdict') return { colour: theme[key as (typeof verdicts)[number]], pattern: verdictPattern[key] ?? 0 };
  if (by === 'role') return roleLook(key, theme);
  if (by === 'margin') return marginLook(key, theme);
  if (by === 'change') return changeLook(key, theme);
  if (by === 'size' || by === 'load') {
    const t = of < 2 ? 1 : index / (of - 1);
    return { colour: along(theme.ramp, t), pattern: 0 };
  }
  if (by === 'storey') return { colour: theme.groups[index % theme.groups.length]!, pattern: index % 2 };
  return {
    colour: theme.groups[index % theme.groups.length]!,
    pattern: [0, 1, 2, 4][Math.floor(index / theme.groups.length) % 4]!,
  };
}

function roleLook(role: string, theme: Theme): { colour: Rgb; pattern: number } {
  const drain = drainRoles.indexOf(role);
  if (drain >= 0) return { colour: theme.drains[drain]!, pattern: 0 };
  if (role === 'wet-vent') return { colour: theme.wetVent, pattern: 2 };
  if (role === 'circuit-vented-branch') return { colour: theme.circuit, pattern: 4 };
  const vent = ventRoles.indexOf(role);
  if (vent >= 0)
    return {
      colour: theme.vents[vent % theme.vents.length]!,
      pattern: vent < theme.vents.length ? 1 : vent < 10 ? 4 : 2,
    };
  if (role === 'idle' || role === 'unknown') return { colour: theme.idle, pattern: 3 };
  let sum = 0;
  for (const character of role) sum += character.charCodeAt(0);
  return { colour: theme.groups[sum % theme.groups.length]!, pattern: 1 };
}

/** From full to plenty along the ramp; what carries too much has the colour of the undersized. */
function marginLook(key: string, theme: Theme): { colour: Rgb; pattern: number } {
  if (key === 'over') return { colour: theme.undersized, pattern: 0 };
  if (key === 'none') return { colour: theme.unknown, pattern: 3 };
  const steps = marginSteps.length - 3;
  const at = marginSteps.indexOf(key as MarginStep) - 1;
  return { colour: along(theme.ramp, 1 - at / steps), pattern: at === 0 ? 2 : 0 };
}

function changeLook(key: string, theme: Theme): { colour: Rgb; pattern: number } {
  const at = fates.indexOf(key as PipeFate);
  const colour = [theme.air, theme.undersized, theme.wetVent, theme.chosen][at];
  return { colour: colour ?? theme.idle, pattern: [0, 0, 4, 2][at] ?? 0 };
}

function along(ramp: readonly Rgb[], t: number): Rgb {
  const at = t * (ramp.length - 1);
  const low = Math.min(ramp.length - 2, Math.floor(at));
  return mix(ramp[low]!, ramp[low + 1]!, at - low);
}

/** How each section is drawn now. */
export interface SectionLook {
  readonly colour: Rgb;
  readonly pattern: number;
  readonly hidden: boolean;
  /** Drawn once more, glowing, through whatever stands before it. */
  readonly lit: boolean;
  readonly chosen: boolean;
}

/** Follows `state` alone: chosen and undersized pipes stand out, the rest steps back toward the ground. */
export function lookOf(building: Building, state: PageState, theme: Theme): (section: number) => SectionLook {
  const categories = new Map(categoriesOf(building, state.colourBy, theme).map((category) => [category.key, category]));
  const anyUndersized = state.colourBy === 'verdict' && categories.has('undersized');
  const changes = state.colourBy === 'change';
  const chosen = new Set(state.chosen?.is === 'pipe' ? building.sectionsOf[state.chosen.row] : []);
  const isolated = state.isolated === null ? null : new Set(state.isolated);
  const { pipe } = building.data.scene.pipes;
  return (section) => {
    const key = categoryKey(building, section, state.colourBy);
    const category = key === null ? undefined : categories.get(key);
    const hidden = (key !== null && state.hidden.has(key)) || (isolated !== null && !isolated.has(pipe[section]!));
    const undersized = building.state(section)?.verdict === 'undersized';
    const isChosen = chosen.has(section) && state.follow === null;
    const lit =
      state.follow === null &&
      ((state.colourBy === 'verdict' && undersized) || (changes && key !== null && key !== asItIs) || isChosen);
    const base = chosen.has(section) && !undersized ? theme.chosen : (category?.colour ?? theme.idle);
    const fade = lit ? 0 : state.follow !== null ? 0.82 : chosen.size > 0 ? 0.6 : anyUndersized || changes ? 0.42 : 0;
    return { colour: mix(base, theme.ground, fade), pattern: category?.pattern ?? 0, hidden, lit, chosen: isChosen };
  };
}
