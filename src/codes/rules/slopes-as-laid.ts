import type { Facts } from '../../findings/finding.ts';
import type { SizeAtSlope, SlopeReading } from '../../tables/find-slope.ts';
import type { Family } from '../../tables/open-family.ts';

/** Inches a foot and their round percents alike, and each size only at slopes that it may be laid to. */
export const slopeReading = (family: Family): SlopeReading => ({
  share: family.number('slope-percent-share', 'share').value,
  asLaid: true,
});

/** The column read, and the smaller size that a steeper pipe would be. */
export const columnFacts = ({ slope, steeper }: SizeAtSlope): Facts => ({
  columnSlope: slope,
  ...(steeper === null ? {} : { steeperSize: steeper.size, steeperSlope: steeper.slope }),
});
