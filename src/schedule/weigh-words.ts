import type { WeighBattery, WeighObstacle } from './weigh.ts';

/** The words of a battery's verdict and of the cut through its wall, in one language. Numbers come as metres or millimetres. */
export interface WeighWords {
  /** `wet vented` */
  readonly vented: (reading: string) => string;
  /** `wet or circuit vented` */
  readonly named: (readings: readonly string[]) => string;
  readonly noneHolds: (fails: string) => string;
  readonly only: (vented: string) => string;
  readonly fails: (vented: string, reasons: string) => string;
  readonly noPlace: string;
  readonly obstacle: (obstacle: WeighObstacle) => string;
  /** null: no usual stud takes it. */
  readonly asks: (named: string, stud: string | null, sizes: string) => string;
  /** `studs of 2x4` */
  readonly studsOf: (stud: string) => string;
  readonly laidAs: (size: string, as: string) => string;
  readonly modelledWall: (fit: string, fitNot: string) => string;
  readonly wall: (asks: string) => string;
  readonly bored: (asks: string) => string;
  readonly floor: (sizes: string) => string;
  readonly onlyPipe: string;
  readonly leastPipe: (vented: string, others: readonly string[]) => string;
  readonly more: (vented: string, metres: number, cleanouts: number) => string;
  readonly size: (label: string) => string;
  readonly list: (texts: readonly string[]) => string;
  /** Over the cut: which battery, and on which storey. */
  readonly battery: (battery: WeighBattery) => string;
  readonly asModelled: string;
  readonly noWidth: string;
  readonly cannotBe: (reasons: string) => string;
  readonly cut: (facts: CutFacts) => string;
}

/** What stands under a cut; lengths in millimetres, sizes and studs in words. */
export interface CutFacts {
  readonly size: string;
  readonly laidAs: string | null;
  readonly judgedBy: string;
  readonly depth: number;
  /** What is left in the wall; below zero: what it lacks. */
  readonly room: number;
  readonly isModelled: boolean;
  readonly stud: string | null;
  readonly level: {
    readonly size: string;
    readonly hole: number;
    readonly stud: string | null;
    readonly loadbearing: string | null;
  } | null;
}
