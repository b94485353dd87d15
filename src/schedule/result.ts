/** The published result, `format: "drainwright-result"`, exactly as CONTRACT names it. Plain JSON, lengths in metres. */
export interface Result {
  readonly format: 'drainwright-result';
  readonly version: 1;
  readonly program: { readonly name: 'drainwright'; readonly version: string };
  readonly model: ResultModel;
  /** Set when several files were read as one building: all of them, the first is `model`. */
  readonly models?: readonly ResultModel[];
  readonly code: {
    readonly id: string;
    readonly title: string;
    readonly edition: string;
    readonly unit: string;
    readonly localTables?: readonly string[];
  };
  readonly settings: Readonly<Record<string, unknown>>;
  /** What the user answered beside the settings, one entry a fact; absent where nothing. */
  readonly answers?: readonly ResultAnswer[];
  readonly counts: ResultCounts;
  /** By file, then STEP id. */
  readonly elements: readonly ResultElement[];
  readonly fixtures: readonly ResultFixture[];
  readonly pipes: readonly ResultPipe[];
  readonly batteries: readonly ResultBattery[];
  readonly joints: { readonly ports: number; readonly geometry: number; readonly inferred: readonly ResultJoint[] };
  readonly systems: readonly ResultSystem[];
  /** Errors first, then warnings, then notes; inside by code, then first GlobalId. */
  readonly findings: readonly ResultFinding[];
  readonly unresolved: readonly { readonly globalId: string; readonly stepId: number; readonly reason: string }[];
  readonly caution: string;
}

export interface ResultAnswer {
  readonly part: 'sewerEnds' | 'fixtures' | 'pipes' | 'batteries' | 'leaveOut' | 'cleanouts';
  /** GlobalId, or `name:` pattern, as answered; of `leaveOut` the name of the system. */
  readonly key: string;
  /** `kind`, `detail.flush`, `size`, `slope` …; null where the key says it all. */
  readonly field: string | null;
  readonly value: string | number | boolean;
  /** How many elements the key meets. */
  readonly meets: number;
}

export interface ResultModel {
  readonly file: string;
  readonly sha256: string;
  readonly schema: string;
  readonly lengthUnit: string;
  readonly remarks?: readonly string[];
}

export interface ResultCounts {
  readonly elements: number;
  readonly pipes: number;
  readonly fittings: number;
  readonly fixtures: number;
  readonly terminals: number;
  readonly leftOut: Readonly<Record<string, number>>;
  readonly unresolved: number;
}

export interface ResultElement {
  readonly globalId: string;
  readonly stepId: number;
  readonly file: string;
  readonly class: string;
  readonly use: 'pipe' | 'fitting' | 'fixture' | 'terminal' | 'left-out' | 'unresolved';
  readonly reason?: string;
}

/** A connected piece of drainage and where it leaves. */
export interface ResultSystem {
  readonly sewerEnd: {
    readonly at: readonly [number, number, number] | null;
    readonly pipe: string | null;
    readonly how: string;
  };
  /** Broken off rather than led out: it ends inside the building, and of other piping somebody said where. Absent otherwise. */
  readonly isCutOff?: true;
  readonly pipes: number;
  readonly fixtures: number;
  readonly load: LoadRange;
}

export interface SizeLabel {
  readonly label: string;
  readonly dn: number;
}
export interface SizeRange {
  readonly least: SizeLabel | null;
  readonly most: SizeLabel | null;
}
export interface LoadRange {
  readonly least: number;
  readonly most: number;
}

export interface ResultFixture {
  readonly globalId: string;
  readonly stepId: number;
  readonly name: string | null;
  readonly kind: string | null;
  readonly detail: {
    readonly flush: string | null;
    readonly style: string | null;
    readonly heads: number | null;
    readonly emergency: boolean | null;
    readonly domestic: boolean | null;
    readonly flushLitres?: number;
    readonly flow?: number;
    readonly intermittent?: boolean;
    readonly frequency?: number;
  };
  /** What would settle its load, and what may be answered; no choices: any number. Absent where nothing is open. */
  readonly open?: readonly OpenFact[];
  /** Row of the code's fixture table; null when unidentified. */
  readonly row: string | null;
  readonly evidence: string;
  readonly load: LoadRange;
  readonly trapSize: SizeLabel | null;
  readonly storey: string | null;
  readonly waterPath?: readonly string[];
  readonly airPath?: readonly string[];
  readonly ventedBy: { readonly how: string; readonly vents: readonly string[]; readonly rule?: string };
  readonly trap: { readonly at: readonly [number, number, number] | null; readonly how: string };
  readonly trapArm: {
    readonly length: number | null;
    readonly fall: number | null;
    readonly slope: number | null;
    readonly turn: number | null;
    readonly limit: number | null;
  } | null;
}

/** A place in the answers file: `kind`, `detail.flush` … of the fixture, or `settings.use` for all. */
export interface OpenFact {
  readonly field: string;
  readonly choices: readonly string[];
}

export type Verdict = 'undersized' | 'agrees' | 'oversized' | 'unknown';

export interface PipeState {
  readonly role: string;
  readonly also: readonly string[];
  readonly portion?: 'wet' | 'dry' | 'outlet';
  readonly storey: string | null;
  readonly orientation: 'vertical' | 'horizontal' | 'unknown';
  readonly slope: {
    readonly value: number | null;
    readonly ground: 'geometry' | 'property' | 'answer' | 'unknown';
  } | null;
  readonly length: number | null;
  readonly developedLength?: number;
  readonly next: string | null;
  readonly load: LoadRange;
  readonly ventLoad?: LoadRange;
  readonly servesWater?: readonly string[];
  readonly servesAir?: readonly string[];
  readonly modelled: (SizeLabel & { readonly from: string }) | null;
  readonly required: SizeRange | null;
  readonly provisional: boolean;
  readonly verdict: Verdict;
  /** Of `unknown`, and what settles it. */
  readonly reason?: string;
  readonly battery?: string;
  /** Of drains at the size required: physics beside the code's size, as information and never instead of it. */
  readonly hydraulics?: ResultHydraulics;
  readonly trail: readonly TrailStep[];
}

export type ResultHydraulics = LevelHydraulics | StackHydraulics;

/** Flows in l/s, speeds in m/s, bore in metres, fill as share of the bore. */
export interface LevelHydraulics {
  readonly kind: 'level';
  readonly bore: number;
  readonly law: string;
  readonly slope: number;
  readonly halfFull: { readonly flow: number; readonly speed: number; readonly cleansItself: boolean };
  /** Half full by the other of the two laws, Manning's and Colebrook's and White's. */
  readonly otherLaw: { readonly law: string; readonly flow: number; readonly speed: number };
  /** Fill from which on it cleans itself; null: at none. */
  readonly cleansFrom: number | null;
  /** At the flow that the code reckons with; null: it would run full. Absent where the code knows loads only. */
  readonly atFlow?: {
    readonly flow: number;
    readonly fill: number;
    readonly speed: number;
    readonly cleansItself: boolean;
  } | null;
}

/** A stack 7/24 full: what it carries, how fast that falls and after how many metres. */
export interface StackHydraulics {
  readonly kind: 'stack';
  readonly bore: number;
  readonly flow: number;
  readonly speed: number;
  readonly terminalLength: number;
  /** Share of the stack that the code's own flow fills; absent where the code knows loads only. */
  readonly share?: number;
}

export interface ResultPipe extends PipeState {
  readonly globalId: string;
  readonly stepId: number;
  readonly name: string | null;
  readonly system: string | null;
  readonly sections?: readonly (PipeState & { readonly from: number; readonly to: number })[];
}

export interface TrailStep {
  readonly rule: string;
  /** What the rule is about, in words of the trade. */
  readonly title: string;
  readonly clause: string;
  readonly table: string | null;
  readonly row: string | null;
  readonly facts: Readonly<Record<string, unknown>>;
  /** null: no size of the table holds it. */
  readonly asks: SizeLabel | null;
  readonly governs: boolean;
  readonly trust: string;
  /** The next smaller size of the table and what it holds, as it is printed; absent where the rule cannot tell. */
  readonly smaller?: { readonly size: SizeLabel; readonly limit: number | string | null };
}

export interface ResultBattery {
  readonly id: string;
  readonly fixtures: readonly string[];
  readonly pipes: readonly string[];
  readonly reading: string;
  readonly why: string;
  /** What the chosen reading breaks, if anything. */
  readonly broken: readonly BrokenCondition[];
  readonly others: readonly {
    readonly reading: string;
    readonly holds: boolean;
    readonly broken: readonly BrokenCondition[];
  }[];
}

export interface BrokenCondition {
  readonly rule: string;
  readonly title: string;
  readonly clause: string;
  readonly facts: Readonly<Record<string, unknown>>;
}

export interface ResultJoint {
  readonly about: readonly string[];
  readonly how: string;
  readonly gap: number;
}

export interface ResultFinding {
  readonly code: string;
  readonly severity: 'error' | 'warning' | 'note';
  readonly about: readonly string[];
  readonly facts: Readonly<Record<string, unknown>>;
  readonly clause: string | null;
  readonly sentence: string;
}
