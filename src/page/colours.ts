export type Rgb = readonly [number, number, number];

/** What the scene needs of a theme; the panel has its own in the style sheet. */
export interface Theme {
  readonly name: 'light' | 'dark';
  readonly ground: Rgb;
  readonly wall: Rgb;
  readonly edge: Rgb;
  readonly fixture: Rgb;
  readonly chosen: Rgb;
  readonly water: Rgb;
  readonly air: Rgb;
  readonly undersized: Rgb;
  readonly unknown: Rgb;
  readonly oversized: Rgb;
  readonly agrees: Rgb;
  /** Eight that people with any of the common colour blindnesses tell apart. */
  readonly groups: readonly Rgb[];
  /** From little to much. */
  readonly ramp: readonly Rgb[];
  readonly drains: readonly Rgb[];
  readonly wetVent: Rgb;
  readonly circuit: Rgb;
  readonly vents: readonly Rgb[];
  readonly idle: Rgb;
}

export const rgb = (hex: string): Rgb => {
  const value = Number.parseInt(hex.slice(1), 16);
  return [value >> 16, (value >> 8) & 255, value & 255];
};
export const hex = (colour: Rgb): string =>
  `#${colour.map((part) => Math.round(part).toString(16).padStart(2, '0')).join('')}`;
export const mix = (a: Rgb, b: Rgb, t: number): Rgb => [
  Math.round(a[0] + (b[0] - a[0]) * t),
  Math.round(a[1] + (b[1] - a[1]) * t),
  Math.round(a[2] + (b[2] - a[2]) * t),
];

/** The groups follow the palette of Okabe and Ito (2008), some darkened for a light ground. */
export const themes: Readonly<Record<'light' | 'dark', Theme>> = {
  light: {
    name: 'light',
    ground: rgb('#ebe8e1'),
    wall: rgb('#ffffff'),
    edge: rgb('#7b776d'),
    fixture: rgb('#ffffff'),
    chosen: rgb('#1348b8'),
    water: rgb('#0b74c4'),
    air: rgb('#0b8a6a'),
    undersized: rgb('#e03a08'),
    unknown: rgb('#9a9488'),
    oversized: rgb('#7a63c9'),
    agrees: rgb('#2a7c86'),
    groups: ['#0072b2', '#d98e00', '#009e73', '#c4649a', '#4aa3d8', '#c94f00', '#6b5b95', '#7d6429'].map(rgb),
    ramp: ['#c9bd8f', '#9db57f', '#64a088', '#388290', '#2d5f8a', '#30406f', '#271a45'].map(rgb),
    drains: ['#86add0', '#2f74b5', '#123f73', '#0b2545', '#3d3a36'].map(rgb),
    wetVent: rgb('#a83a80'),
    circuit: rgb('#6f3fb0'),
    vents: ['#d08c00', '#a86f00', '#c4a23a', '#8a6a1c', '#b8860b'].map(rgb),
    idle: rgb('#aaa69c'),
  },
  dark: {
    name: 'dark',
    ground: rgb('#11161c'),
    wall: rgb('#8ea0b4'),
    edge: rgb('#7f93a8'),
    fixture: rgb('#5d6a78'),
    chosen: rgb('#8ec5ff'),
    water: rgb('#5cc0ff'),
    air: rgb('#62e0b4'),
    undersized: rgb('#ff6b35'),
    unknown: rgb('#8d939b'),
    oversized: rgb('#ab9cf2'),
    agrees: rgb('#4aa5ab'),
    groups: ['#4aa3e0', '#f0b429', '#2fc79a', '#e08cbb', '#8ad0ff', '#ff8a4c', '#a99be0', '#c9a95a'].map(rgb),
    ramp: ['#47568c', '#4279a8', '#429eb0', '#63bd9f', '#a5d281', '#e5e08c', '#fff6cf'].map(rgb),
    drains: ['#a9c8e6', '#5ea0e0', '#3b78c4', '#8fb1ff', '#c9c4ba'].map(rgb),
    wetVent: rgb('#e77cc0'),
    circuit: rgb('#b694ff'),
    vents: ['#f2b632', '#d39a2c', '#e8cf7a', '#b99243', '#ffd166'].map(rgb),
    idle: rgb('#6c7580'),
  },
};
