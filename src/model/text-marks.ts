import type { FixtureKind } from './identity.ts';

/** What a name says beside the kind. null: nothing said. */
export interface TextMarks {
  readonly flush: 'tank' | 'valve' | null;
  /** Litres to a flush: `6.1 Lpf`, `1.6 gpf`. */
  readonly flushLitres: number | null;
  readonly urinal: UrinalStyle | null;
  readonly emergency: boolean;
  readonly domestic: boolean | null;
  /** `multi`, `gang`, `group`. */
  readonly several: boolean;
  /** The number beside `heads`, `stations`, `users`. */
  readonly heads: number | null;
  readonly bowls: 'double' | 'triple' | null;
  /** Style words of the table, by fixture kind. */
  readonly styles: ReadonlyMap<FixtureKind, string>;
}

/** `wall` is a wall urinal that nobody calls washout or otherwise; `washout` one of which nobody says how it stands. */
export type UrinalStyle =
  | 'stall'
  | 'wall-washout'
  | 'wall-other'
  | 'wall'
  | 'washout'
  | 'pedestal'
  | 'trough'
  | 'waterless';

export type UrinalMark = 'stall' | 'trough' | 'washout' | 'wall' | 'pedestal' | 'waterless';

export function urinalStyle(marks: ReadonlySet<UrinalMark>): UrinalStyle | null {
  if (marks.has('waterless')) return 'waterless';
  if (marks.has('trough')) return 'trough';
  if (marks.has('pedestal')) return marks.has('wall') ? 'wall-other' : 'pedestal';
  if (marks.has('stall')) return 'stall';
  if (marks.has('wall')) return marks.has('washout') ? 'wall-washout' : 'wall';
  return marks.has('washout') ? 'washout' : null;
}

const litresPerGallon = 3.785411784;

/** Litres of the flush volume that a text gives with its unit, rounded to a tenth; null where it gives none. */
export function flushLitres(text: string): number | null {
  const found =
    /(\d{1,2}(?:[.,]\d{1,2})?)\s{0,2}(l\s?pf|litres? per flush|liters? per flush|l\s?\/\s?f|gpf|gal(?:lons?)? per flush)/iu.exec(
      text.slice(0, 1000),
    );
  if (found === null) return null;
  const value = Number(found[1]?.replace(',', '.'));
  const litres = /^g/i.test(found[2] ?? '') ? value * litresPerGallon : value;
  return litres > 0 && litres <= 30 ? Math.round(litres * 10) / 10 : null;
}

/** `3 heads`, `5-Station`, `2 Brausen`; null where no number stands before such a word. */
export function headCount(text: string): number | null {
  const found = headWords.exec(text.slice(0, 1000));
  const count = Number(found?.[1]);
  return found !== null && count >= 1 && count <= 60 ? count : null;
}

const headWords =
  /(?<!\d)(\d{1,2})[\s_-]{0,2}(?:shower ?)?(?:heads?|stations?|users?|persons?|sinks?|basins?|way|pommes?|brausen|köpfe|stellen|postes?|places|personen|personas|pessoas|plätze|plass|platser|stanowisk\w{0,3})(?!\p{L})/iu;
