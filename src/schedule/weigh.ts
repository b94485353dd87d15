import type { BrokenCondition, Result, SizeLabel } from './result.ts';

/** The published comparison, `format: "drainwright-weigh"`: plain JSON, lengths in metres, loads in the code's unit. */
export interface WeighResult {
  readonly format: 'drainwright-weigh';
  readonly version: 1;
  readonly program: Result['program'];
  readonly model: Result['model'];
  readonly models?: NonNullable<Result['models']>;
  readonly code: Result['code'];
  readonly settings: Result['settings'];
  readonly currency?: string;
  /** In the order of the batteries of the result. */
  readonly batteries: readonly WeighBattery[];
  readonly caution: string;
}

export interface WeighBattery {
  readonly id: string;
  readonly fixtures: readonly string[];
  /** `2 lavatories, 7 urinals`. */
  readonly title: string;
  readonly storey: string | null;
  /** Reading of the piping as it is modelled, and why. */
  readonly modelled: string;
  readonly why: string;
  /** One sentence: what governs the choice here. */
  readonly verdict: string;
  /** Wet vent, circuit vent, individual vents, in this order; then the modelled reading where it is another. */
  readonly alternatives: readonly WeighAlternative[];
}

export interface WeighAlternative {
  readonly reading: string;
  readonly modelled: boolean;
  readonly holds: boolean;
  /** What stands against it, with clause and numbers. */
  readonly broken: readonly WeighObstacle[];
  /**
   * Largest required size in the wall, or above the floor where no wall is modelled, and under the floor. Like all that
   * follows null or empty for a reading that does not hold and is not the modelled one.
   */
  readonly largest: {
    readonly inWall: SizeLabel | null;
    readonly underFloor: SizeLabel | null;
    /** Next larger size that is made, where the material does not come in what is asked under the floor. */
    readonly laidUnderFloor?: SizeLabel;
  } | null;
  /** Developed length by role and size, in the order of the water, then of the air. */
  readonly pipes: readonly WeighPipes[];
  /** The same pipe by pipe. */
  readonly sections: readonly WeighSection[];
  readonly fittings: readonly WeighFitting[];
  readonly cleanouts: readonly WeighCleanout[];
  readonly floorHoles: readonly { readonly size: SizeLabel | null; readonly count: number }[];
  readonly wall: WeighWall | null;
  /** Vents that are not in the model. */
  readonly adds: readonly {
    readonly what: string;
    readonly role: string;
    readonly size: SizeLabel | null;
    readonly length: number;
  }[];
  /** Pipes of the model that it does without. */
  readonly leavesOut: readonly {
    readonly globalId: string;
    readonly name: string | null;
    readonly role: string;
    readonly length: number;
  }[];
  /** Pipes that need another size than as modelled read. */
  readonly resizes: readonly WeighResize[];
  readonly costs?: WeighCosts;
}

export interface WeighObstacle extends Omit<BrokenCondition, 'rule' | 'title' | 'clause'> {
  readonly rule: string | null;
  readonly title: string | null;
  readonly clause: string | null;
  readonly sentence: string;
}

export interface WeighPipes {
  readonly role: string;
  readonly size: SizeLabel | null;
  readonly length: number;
}

export interface WeighSection extends WeighPipes {
  /** null: not in the model, or the inside of a fitting. */
  readonly globalId: string | null;
  readonly name: string | null;
  readonly load: number;
  readonly place: 'wall' | 'floor' | 'room';
  readonly added: boolean;
}

export interface WeighFitting {
  readonly kind: 'bend' | 'junction' | 'double-junction' | 'reducer' | 'coupling';
  /** Degrees, of a bend. */
  readonly angle?: number;
  readonly size: SizeLabel;
  /** Of a junction its largest branch, of a reducer its smaller end. */
  readonly branch?: SizeLabel;
  readonly count: number;
}

export interface WeighCleanout {
  readonly size: SizeLabel;
  /** Pipe that it serves. */
  readonly pipe: SizeLabel;
  readonly place: string;
  readonly rule: string;
  readonly clause: string;
}

export interface WeighWall {
  /** Clear depth that the widest fitting in the wall needs, metres. */
  readonly depth: number;
  /** Shallowest stud between which it fits; null: none of the usual ones. */
  readonly stud: string | null;
  readonly judgedBy: 'fitting' | 'pipe';
  /** The widest pipe stands between studs, or runs along the wall. */
  readonly lies: 'upright' | 'along';
  readonly size: SizeLabel;
  /** Next larger size that is made, where the pipe's material does not come in the size that is asked. */
  readonly laidAs?: SizeLabel;
  /** Of the pipe alone, metres. */
  readonly outside: number;
  /** As the model has it; empty where it draws no wall round the pipes: then the pipes above the floor are judged. */
  readonly modelled: readonly WeighModelledWall[];
  /** Everything fits the walls as modelled, holes included. */
  readonly fits: boolean | null;
  /** Of the largest level pipe that has to pass through studs. */
  readonly bored: WeighBored | null;
}

export interface WeighModelledWall {
  readonly globalId: string;
  readonly name: string | null;
  /** Clear depth between its boards, metres; null: solid. */
  readonly cavity: number | null;
  readonly framing: 'wood' | 'steel' | null;
  readonly loadBearing: boolean | null;
}

export interface WeighBored {
  readonly size: SizeLabel;
  /** Of the pipe, metres. */
  readonly outside: number;
  /** Metres. */
  readonly hole: number;
  readonly source: string;
  /** Largest hole by stud, metres. */
  readonly limits: readonly { readonly stud: string; readonly loadbearing: number; readonly other: number }[];
  readonly stud: { readonly loadbearing: string | null; readonly other: string | null };
}

export interface WeighResize {
  readonly globalId: string;
  readonly name: string | null;
  readonly role: string;
  readonly from: SizeLabel | null;
  readonly to: SizeLabel | null;
}

export interface WeighCosts {
  /** Of what has a price. */
  readonly total: number;
  readonly lines: readonly {
    readonly what: string;
    readonly size: string | null;
    readonly quantity: number;
    readonly unit: 'm' | 'piece';
    readonly price: number;
    readonly cost: number;
  }[];
  /** What the price file says nothing of. */
  readonly unpriced: readonly string[];
}
