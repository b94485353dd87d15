import { Cursor } from '../lines/cursor.ts';
import type { LineIndex } from '../lines/line-index.ts';
import { stepString } from './step-text.ts';

/**
 * What our lines say about their owner. IFC2X3 demands an owner history: the project's own, else the first of the
 * file, else five records of ours, dated by the file's header so that a second run writes the same. Later schemas
 * leave it open (`$`), and so do we.
 */
export interface OwnerHistory {
  /** `#12` or `$`. */
  readonly reference: string;
  /** Records to write before it can be referred to; their ids begin at `firstId`. */
  readonly records: readonly string[];
}

export function ownerHistory(index: LineIndex, firstId: number, version: string): OwnerHistory {
  if (!needsOwner(index)) return { reference: '$', records: [] };
  const owned = projectOwner(index) ?? index.ids[index.recordsOf('IFCOWNERHISTORY')[0] ?? -1];
  if (owned !== undefined) return { reference: `#${owned}`, records: [] };
  const [person, organization, both, application, history] = [0, 1, 2, 3, 4].map((place) => `#${firstId + place}`);
  return {
    reference: `${history}`,
    records: [
      `${person}=IFCPERSON($,'Drainwright',$,$,$,$,$,$);`,
      `${organization}=IFCORGANIZATION($,'Drainwright contributors',$,$,$);`,
      `${both}=IFCPERSONANDORGANIZATION(${person},${organization},$);`,
      `${application}=IFCAPPLICATION(${organization},${stepString(version)},'Drainwright','Drainwright');`,
      `${history}=IFCOWNERHISTORY(${both},${application},$,.ADDED.,$,$,$,${headerTime(index)});`,
    ],
  };
}

/** IFC2X3 and what came before it. */
const needsOwner = ({ schemas }: LineIndex): boolean => /^IFC2/i.test(schemas[0] ?? '');

function projectOwner(index: LineIndex): number | undefined {
  const [project] = index.recordsOf('IFCPROJECT');
  if (project === undefined) return undefined;
  const owner = new Cursor(index.bytes)
    .at(index.args[project] ?? 0)
    .skip(1)
    .id();
  return index.types[index.typeOf[index.find(owner)] ?? 0] === 'IFCOWNERHISTORY' ? owner : undefined;
}

/** FILE_NAME's time stamp in seconds since 1970, its zone kept, UTC where it names none; 0 where it cannot be read. */
function headerTime(index: LineIndex): number {
  const open = index.header.get('FILE_NAME');
  const stamp = open === undefined || open < 0 ? null : new Cursor(index.bytes).at(open).skip(1).text();
  const read = /^(\d{4})-(\d\d)-(\d\d)T(\d\d):(\d\d)(?::(\d\d)(?:\.\d*)?)?(?:Z|([+-])(\d\d):?(\d\d))?$/.exec(
    stamp ?? '',
  );
  if (read === null) return 0;
  const [year = 0, month = 0, day = 0, hour = 0, minute = 0, second = 0] = read
    .slice(1, 7)
    .map((part) => Number(part ?? 0));
  const zone = (read[7] === '-' ? -1 : 1) * (Number(read[8] ?? 0) * 3600 + Number(read[9] ?? 0) * 60);
  return Math.max(0, (days(year, month, day) * 24 + hour) * 3600 + minute * 60 + second - zone);
}

/** Days since 1970-01-01 in the Gregorian calendar. */
function days(year: number, month: number, day: number): number {
  const y = month <= 2 ? year - 1 : year;
  const fromMarch = (month + 9) % 12;
  const leaps = Math.floor(y / 4) - Math.floor(y / 100) + Math.floor(y / 400);
  return y * 365 + leaps + Math.floor((fromMarch * 153 + 2) / 5) + day - 1 - daysTo1970;
}
/** From 0000-03-01 to 1970-01-01. */
const daysTo1970 = 719_468;
