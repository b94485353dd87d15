/** Steepest fall that a stated number may mean; what is steeper is a drop and no slope. */
const steepest = 1;

/**
 * Fall in m/m that a number stated as slope means, never negative; null where it means none. A bare number up to 1 is
 * a ratio, from 1 to 15 per cent (nobody lays a drain at 1:15 and steeper by saying so), and above 15 the n of 1:n.
 */
export function slopeOfNumber(value: number, form: 'ratio' | 'one-in' | 'percent' | 'per-mille'): number | null {
  const size = Math.abs(value);
  if (!Number.isFinite(size)) return null;
  if (size === 0) return form === 'one-in' ? null : 0;
  const slope =
    form === 'percent'
      ? size / 100
      : form === 'per-mille'
        ? size / 1000
        : form === 'one-in'
          ? 1 / size
          : size <= 1
            ? size
            : size <= 15
              ? size / 100
              : 1 / size;
  return slope <= steepest ? slope : null;
}

/** The same for an angle in radians, as some programs state a slope. */
export function slopeOfAngle(radians: number): number | null {
  const slope = Math.tan(Math.abs(radians));
  return Number.isFinite(slope) && slope <= steepest ? slope : null;
}

const number = '(\\d+(?:[.,]\\d+)?)';
const decimal = (text: string): number => Number(text.replace(',', '.'));

/** Fall that a text means: `1:50`, `1 in 50`, `2 %`, `20 ‰`, `1/4" / 12"`, `1/4 in/ft`, `0.02`. null where it means none. */
export function slopeOfText(text: string, form: 'ratio' | 'one-in' | 'percent' | 'per-mille'): number | null {
  const said = text.trim();
  if (said.length > 40) return null;
  const perFoot =
    /^(\d+\s+)?(?:(\d+)\/(\d+)|(\d+(?:\.\d+)?))\s*(?:"|in\.?|inch(?:es)?)?\s*(?:\/|per|:)\s*(?:12\s*"|1\s*'|1\s*ft|ft|foot|12\s*in)/i.exec(
      said,
    );
  if (perFoot !== null) {
    const [, whole, top, bottom, plain] = perFoot;
    const inches = Number(whole ?? 0) + (plain === undefined ? Number(top) / Number(bottom) : Number(plain));
    return Number.isFinite(inches) && inches <= 12 ? inches / 12 : null;
  }
  const oneIn = new RegExp(`^1\\s*(?::|in|zu|op|/)\\s*${number}$`, 'i').exec(said);
  if (oneIn !== null) return slopeOfNumber(decimal(oneIn[1]!), 'one-in');
  const percent = new RegExp(`^-?${number}\\s*(%|‰|mm/m|cm/m)$`).exec(said);
  if (percent !== null) {
    const isPercent = percent[2] === '%' || percent[2] === 'cm/m';
    return slopeOfNumber(decimal(percent[1]!), isPercent ? 'percent' : 'per-mille');
  }
  const bare = new RegExp(`^-?${number}$`).exec(said);
  return bare === null ? null : slopeOfNumber(decimal(bare[1]!), form);
}
