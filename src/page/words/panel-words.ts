/** Words of the cards: pipe, fixture, the ride along a way, battery and its readings. */
export interface PanelWords {
  /** Whether a file is the one that the page was made from, and what differs. */
  readonly proof: {
    readonly title: string;
    readonly hint: string;
    readonly reading: string;
    readonly same: (file: string) => string;
    readonly other: (file: string) => string;
    readonly unread: string;
    readonly missing: (count: number, names: string) => string;
    readonly moved: (count: number, names: string) => string;
    readonly resized: (count: number, names: string) => string;
    readonly elements: (here: number, page: number) => string;
    readonly alike: string;
  };
  readonly pipe: {
    readonly one: string;
    readonly tooSmall: (drawn: string, needed: string) => string;
    readonly agrees: (size: string) => string;
    readonly oversized: (drawn: string, needed: string) => string;
    readonly unknown: (needed: string) => string;
    readonly provisional: string;
    readonly why: (size: string) => string;
    readonly whyNot: (size: string) => string;
    readonly smallest: string;
    readonly fails: (rule: string, asks: string) => string;
    readonly noRoom: (rule: string) => string;
    /** What too small a pipe of each kind means, for somebody who reads no code. */
    readonly plain: Readonly<Record<'drain' | 'vent' | 'both', string>>;
    readonly roleWhy: Readonly<Record<'both' | 'water' | 'air' | 'none', string>>;
    /** `4 in holds 36 FU` */
    readonly holds: (size: string, load: string) => string;
    /** `1½ in reaches 9 m` */
    readonly reaches: (size: string, length: string) => string;
    readonly demands: string;
    readonly demand: string;
    readonly numbers: string;
    readonly asks: string;
    readonly clause: string;
    readonly governs: string;
    readonly noSize: string;
    readonly fromMemory: string;
    readonly row: (row: string) => string;
    readonly table: (table: string) => string;
    readonly noTrail: string;
    /** Heading over what physics says beside the code's size. */
    readonly physics: string;
    readonly water: (count: number) => string;
    readonly air: (count: number) => string;
    readonly noWater: string;
    readonly noAir: string;
    readonly load: string;
    readonly ventLoad: string;
    readonly facts: string;
    readonly length: string;
    readonly developedLength: string;
    readonly slope: string;
    readonly slopeGround: Readonly<Record<'geometry' | 'property' | 'answer' | 'unknown', string>>;
    readonly vertical: string;
    readonly storey: string;
    readonly system: string;
    readonly drawn: string;
    readonly drawnFrom: (from: string) => string;
    readonly notDrawn: string;
    readonly needed: string;
    readonly next: string;
    readonly sections: string;
    readonly section: (from: string, to: string) => string;
    readonly also: (roles: string) => string;
    readonly portion: Readonly<Record<'wet' | 'dry' | 'outlet', string>>;
    readonly isolate: string;
    readonly showAll: string;
    readonly battery: string;
    readonly upstream: string;
    readonly about: string;
  };
  readonly fixture: {
    readonly one: string;
    readonly flush: string;
    readonly air: string;
    readonly row: string;
    readonly known: string;
    readonly trapSize: string;
    readonly trapAt: string;
    readonly trapArm: string;
    readonly armLimit: (limit: string) => string;
    readonly ventedBy: string;
    readonly unvented: string;
    readonly free: string;
    readonly unidentified: string;
    readonly path: string;
    readonly plainUnvented: string;
  };
  readonly follow: {
    readonly water: (name: string) => string;
    readonly air: (name: string) => string;
    readonly step: string;
    readonly stopped: string;
    readonly reaches: string;
    readonly sewer: string;
    readonly parts: Readonly<Record<'arm' | 'through' | 'dry', string>>;
    readonly profile: string;
    readonly start: string;
  };
  readonly battery: {
    readonly one: (id: string) => string;
    readonly reading: string;
    readonly holds: string;
    readonly broken: string;
    readonly chosen: string;
    readonly why: string;
    readonly condition: string;
    readonly none: string;
    readonly show: string;
  };
  readonly weigh: Readonly<
    Record<
      | 'title'
      | 'asDrawn'
      | 'holds'
      | 'inWall'
      | 'underFloor'
      | 'pipe'
      | 'adds'
      | 'cleanouts'
      | 'depth'
      | 'stud'
      | 'noStud'
      | 'unnamed'
      | 'cut',
      string
    >
  >;
}
