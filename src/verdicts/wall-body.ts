import type { PlanPoint } from '../geometry/plan-outline.ts';
import type { Prism } from '../geometry/prism.ts';
import type { Wall } from '../model/model.ts';

/** A wall as piping meets it. */
export interface WallBody {
  readonly wall: Wall;
  readonly prism: Prism;
  /** Unit direction of its length in plan. */
  readonly along: PlanPoint;
  /** Metres. */
  readonly thickness: number;
  /** Room for pipe between its faces; null where it is solid. */
  readonly cavity: Cavity | null;
}

export interface Cavity {
  readonly depthMm: number;
  /** From the wall's layers, or its thickness less a board on each face. */
  readonly ground: 'layers' | 'thickness';
  /** Studs that a level pipe has to pass; null where the cavity is clear, or nothing says. */
  readonly framing: 'wood' | 'steel' | null;
}
