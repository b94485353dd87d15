/** Outside diameters in millimetres by DN, for drawing only: ASME B36.10M, the pipe of each nominal size. */
const outside: Readonly<Record<number, number>> = {
  20: 26.7,
  32: 42.2,
  40: 48.3,
  50: 60.3,
  65: 73,
  80: 88.9,
  100: 114.3,
  125: 141.3,
  150: 168.3,
  200: 219.1,
  250: 273,
  300: 323.8,
  375: 406.4,
};

/** Metres; 0 where no size is known. A DN that the list lacks is drawn as wide as its number says. */
export const outsideDiameter = (dn: number | undefined): number => (outside[dn ?? 0] ?? dn ?? 0) / 1000;
