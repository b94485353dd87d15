import { groupedChanges } from '../../schedule/grouped-changes.ts';
import type { MendChange, MendResult } from '../../schedule/mend.ts';
import { decimal } from '../format.ts';
import { isNew } from '../plan-side.ts';
import { type PlanWords, planWords } from '../words/plan-words.ts';
import type { Desk } from './desk.ts';
import { make, modelText } from './element.ts';
import { findingSentence } from './finding-sentence.ts';
import { capital } from './names.ts';
import { changeTitle, rowSentence } from './plan-titles.ts';
import { sideSwitch } from './side-switch.ts';

/** The plan in the order in which it is made: what changes and why, the proof, and what a point is. */
export function planList(desk: Desk): HTMLElement {
  const { building, words } = desk;
  if (building.plan === null) return make('div', {});
  const { plan } = building.plan;
  const own = planWords[words.language];
  return make(
    'div',
    { class: 'plan' },
    make('h3', {}, own.title),
    sideSwitch(desk),
    make(
      'ol',
      { class: 'plan-steps' },
      ...groupedChanges(plan.changes).map((group) => make('li', {}, changeButton(desk, group))),
    ),
    make(
      'p',
      { class: plan.after.errors === 0 ? 'plan-proof good' : 'plan-proof bad' },
      plan.after.errors === 0 ? own.proved : own.left(plan.after.errors, plan.before.errors),
    ),
    make('p', { class: 'quiet' }, searchText(own, plan)),
    plan.after.findings.length > 0 && make('h3', {}, own.leftTitle),
    plan.after.findings.length > 0 &&
      make(
        'ul',
        { class: 'plan-left' },
        ...plan.after.findings.map((finding) => make('li', {}, modelText(findingSentence(desk, finding)))),
      ),
    ...plan.after.advice.map(({ code, sentence }) =>
      make('p', { class: 'plan-advice' }, own.advice === null ? sentence : own.advice(code)),
    ),
    weights(desk, plan),
    plan.changes.length > 0 && make('p', { class: 'quiet' }, own.proposals),
  );
}

function searchText(own: PlanWords, { search, changes }: MendResult): string {
  if (!search.exact) return own.brokenOff(search.runs);
  return changes.length === 0 ? own.noChange : own.cheapest;
}

/** Brings its pipes into the picture: on the mended side those that are new as well. */
function changeButton(desk: Desk, group: readonly MendChange[]): HTMLElement {
  const { words } = desk;
  const own = planWords[words.language];
  const cost = group.reduce((sum, one) => sum + one.cost, 0);
  const because = group[0]?.finding;
  return make(
    'button',
    { type: 'button', class: 'plan-step', onclick: () => frame(desk, group) },
    make('span', { class: 'plan-what' }, modelText(changeTitle(desk, group))),
    make('span', { class: 'tag' }, own.points(decimal(words, cost, 1))),
    make(
      'span',
      { class: 'plan-why' },
      modelText(because == null ? own.follows : findingSentence(desk, because)),
      ...group.flatMap((change) => rowSentence(desk, change).map((text) => ` ${text}`)),
    ),
  );
}

function frame({ building, scene, announce }: Desk, group: readonly MendChange[]): void {
  const { result } = building;
  const rows = new Set(group.flatMap(({ about }) => about.flatMap((id) => building.pipeAt.get(id) ?? [])));
  // The new pipes of one vent lie between its ends.
  for (const { vent } of group) if (vent !== undefined) for (const row of newRows(building, vent)) rows.add(row);
  scene?.framePipes([...rows]);
  announce([...rows].map((row) => result.pipes[row]?.name ?? '').join(', '));
}

/** Rows of the pipes that a vent of the plan is built of, by where they lie; none on the side where it is not there. */
function newRows({ result, data, sectionsOf, pointStart }: Desk['building'], vent: NonNullable<MendChange['vent']>) {
  const { pipes, origin } = data.scene;
  const spots = new Set(
    vent.points.map((point) => point.map((at, axis) => Math.round((at - origin[axis]!) * 1000)).join(' ')),
  );
  return result.pipes.flatMap(({ globalId }, row) => {
    if (!isNew(globalId)) return [];
    const at = pointStart[sectionsOf[row]?.[0] ?? -1];
    return at !== undefined && spots.has(`${pipes.x[at]} ${pipes.y[at]} ${pipes.z[at]}`) ? [row] : [];
  });
}

function weights({ words }: Desk, { weights: given }: MendResult): HTMLElement {
  const own = planWords[words.language];
  return make(
    'details',
    {},
    make('summary', {}, own.weights),
    make(
      'dl',
      { class: 'facts' },
      ...(Object.keys(own.weight) as (keyof typeof own.weight)[]).map((name) =>
        make(
          'div',
          { class: 'fact' },
          make('dt', {}, capital(own.weight[name])),
          make('dd', {}, decimal(words, given[name], 2)),
        ),
      ),
    ),
  );
}
