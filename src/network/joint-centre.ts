import { boxCentre } from '../geometry/box.ts';
import { meetingPoint } from '../geometry/meeting-point.ts';
import { add, distance, dot, length, scale, subtract, type Vec3 } from '../geometry/vector.ts';
import type { BodyPart } from './piping.ts';

/** A pipe's end at a joint: where it stops and its unit direction out of the pipe. */
export interface Entry {
  readonly point: Vec3;
  readonly outward: Vec3;
}

/** Bodies that sit at the very end of their pipe and add nothing to its length. */
const atTheEnd = new Set([
  'fixture',
  'unknown-terminal',
  'cleanout',
  'vent-terminal',
  'air-admittance-valve',
  'sewer-connection',
]);

/**
 * Where the axes meet, so that developed length runs from corner to corner; in the middle of the ends where they are
 * parallel; where the body's centre lies along a lone pipe's axis. null without any geometry.
 */
export function jointCentre(entries: readonly Entry[], body: BodyPart | null, bodyPlace: Vec3 | null): Vec3 | null {
  if (entries.length === 0) return bodyPlace;
  if (entries.length === 1) return alone(entries[0]!, body);
  const middle = meanOf(entries.map(({ point }) => point));
  if (body !== null && atTheEnd.has(body.part)) return middle;
  const spread = Math.max(...entries.map(({ point }) => distance(point, middle)));
  const meeting = meetingPoint(entries.map(({ point, outward }) => ({ point, direction: outward })));
  return meeting !== null && distance(meeting, middle) <= 1.5 * spread + 0.05 ? meeting : middle;
}

function alone({ point, outward }: Entry, body: BodyPart | null): Vec3 {
  if (body === null || body.box === null || atTheEnd.has(body.part)) return point;
  const ahead = dot(subtract(boxCentre(body.box), point), outward);
  return ahead > 0 ? add(point, scale(outward, ahead)) : point;
}

/**
 * What a joint adds to a pipe's length: from its end to the joint's centre. Negative where the end runs past the centre
 * (a spigot in its socket), so that lengths along a run add up to the run.
 */
export function reachTo(centre: Vec3, { point, outward }: Entry): number {
  const way = subtract(centre, point);
  const ahead = dot(way, outward);
  if (ahead >= 0) return length(way);
  return ahead + length(subtract(way, scale(outward, ahead)));
}

const meanOf = (points: readonly Vec3[]): Vec3 => scale(points.reduce(add), 1 / points.length);
