import { type Finding, finding } from '../findings/finding.ts';
import type { Vec3 } from '../geometry/vector.ts';
import { keyMatches } from '../model/answer-keys.ts';
import type { Space } from '../model/model.ts';
import type { FixtureId, FixturePath } from '../paths/paths.ts';
import type { FixtureFacts } from './fixture-facts.ts';
import type { BathroomGroup, FixtureLoad } from './loads.ts';

/**
 * A closet, a lavatory and a bath in one space count as a group, with one extra that the code takes in. Only where the model puts them into the space, by
 * relation or because their outlets lie inside it, or the user says so; else they are added one by one, with a note.
 */
export function bathroomGroups(
  facts: FixtureFacts,
  loads: readonly FixtureLoad[],
): { groups: BathroomGroup[]; findings: Finding[] } {
  const rule = facts.code.group;
  if (rule === null) return { groups: [], findings: [] };
  const rooms = new Map<string, FixtureId[]>();
  const homeless: FixtureId[] = [];
  for (const fixture of facts.paths.fixtures) {
    const part = rule.memberOf(loads[fixture.id]!.row, facts.identities[fixture.element]!.detail);
    if (part === null) continue;
    const room = roomOf(facts, fixture);
    if (room === null) homeless.push(fixture.id);
    else rooms.set(room, [...(rooms.get(room) ?? []), fixture.id]);
  }
  const groups: BathroomGroup[] = [];
  for (const members of rooms.values()) {
    const first = (part: string): FixtureId | undefined =>
      members.find(
        (id) => rule.memberOf(loads[id]!.row, facts.identities[facts.paths.fixtures[id]!.element]!.detail) === part,
      );
    const [closet, lavatory, bath] = [first('closet'), first('lavatory'), first('bath')];
    if (closet === undefined || lavatory === undefined || bath === undefined) continue;
    const extra = first('extra');
    const group = [closet, lavatory, bath, ...(extra === undefined ? [] : [extra])];
    groups.push({ members: group, figure: rule.figure(loads[closet]!.row).load });
  }
  const parts = new Set(
    homeless.map((id) => rule.memberOf(loads[id]!.row, facts.identities[facts.paths.fixtures[id]!.element]!.detail)),
  );
  parts.delete('extra');
  const findings =
    parts.size === 3
      ? [
          finding(
            'group-not-applied',
            homeless.map((id) => facts.paths.fixtures[id]!.element),
            { fixtures: homeless.length },
            rule.clause,
          ),
        ]
      : [];
  return { groups, findings };
}

/** Key of the space a fixture stands in; null where neither relation, place nor user says. */
function roomOf({ model, network, answers }: FixtureFacts, fixture: FixturePath): string | null {
  const element = model.elements[fixture.element]!;
  for (const [key, { space }] of answers.fixtures) {
    if (space !== undefined && keyMatches(key, element)) return `answer:${space}`;
  }
  if (element.space !== null) return `space:${element.space}`;
  const at = network.joints[fixture.outlet]!.at;
  const inside = at === null ? undefined : model.spaces.find((space) => holds(space, at));
  return inside === undefined ? null : `space:${inside.id}`;
}

const holds = ({ box }: Space, at: Vec3): boolean =>
  box !== null && [0, 1, 2].every((axis) => at[axis]! >= box.min[axis]! && at[axis]! <= box.max[axis]!);
