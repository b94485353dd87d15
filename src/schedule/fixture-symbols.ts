/**
 * Line symbols of fixtures in plan, as drawings have them: SVG path data in a box of 24 by 24. Drawn by stroke alone, so
 * that they print well. A kind without one takes `other`.
 */
export const fixtureSymbols: Readonly<Record<string, string>> = {
  'water-closet': 'M7 3h10v5H7z M12 8c4 0 5.5 3 5.5 6.5S15 21.5 12 21.5 6.5 18 6.5 14.5 8 8 12 8z',
  urinal: 'M6 3h12v4c0 6-2.5 12-6 14-3.5-2-6-8-6-14z M9 6h6',
  lavatory: 'M3.5 5h17v5c0 6-4 9.5-8.5 9.5S3.5 16 3.5 10z M12 8.5v3',
  sink: 'M3.5 5.5h17v13h-17z M12 12m-1.5 0a1.5 1.5 0 1 0 3 0a1.5 1.5 0 1 0-3 0',
  'kitchen-sink':
    'M2.5 6h19v12h-19z M12 6v12 M7 12m-1 0a1 1 0 1 0 2 0a1 1 0 1 0-2 0 M17 12m-1 0a1 1 0 1 0 2 0a1 1 0 1 0-2 0',
  'mop-sink': 'M3.5 3.5h17v17h-17z M3.5 3.5l17 17 M20.5 3.5l-17 17',
  'laundry-tray': 'M3 5h18v14H3z M12 5v14',
  shower: 'M3.5 3.5h17v17h-17z M3.5 3.5l17 17 M20.5 3.5l-17 17 M12 12m-2 0a2 2 0 1 0 4 0a2 2 0 1 0-4 0',
  bathtub: 'M2.5 6h19v12h-19z M6 8h11a3 3 0 0 1 3 3v2a3 3 0 0 1-3 3H6a2 2 0 0 1-2-2v-4a2 2 0 0 1 2-2z',
  bidet: 'M12 3c4.5 0 6 4 6 9s-2 9-6 9-6-4-6-9 1.5-9 6-9z M12 7v3',
  'floor-drain':
    'M12 12m-8.5 0a8.5 8.5 0 1 0 17 0a8.5 8.5 0 1 0-17 0 M12 12m-4 0a4 4 0 1 0 8 0a4 4 0 1 0-8 0 M3.5 12h17',
  'clothes-washer': 'M4 3.5h16v17H4z M12 13m-5 0a5 5 0 1 0 10 0a5 5 0 1 0-10 0 M6.5 6h3',
  dishwasher: 'M4 3.5h16v17H4z M4 8h16 M8 12.5h8 M8 16h8',
  'drinking-fountain': 'M4 8h16c0 5-3 8-8 8s-8-3-8-8z M12 16v5 M12 8V4.5c2 0 3 1 3 2.5',
  other: 'M4 4h16v16H4z M9.5 9.5a2.5 2.5 0 1 1 3.5 2.3c-.7.4-1 .9-1 1.7 M12 16.5v.5',
};

export const fixtureSymbolPath = (kind: string | null): string =>
  (kind !== null && Object.hasOwn(fixtureSymbols, kind) ? fixtureSymbols[kind] : undefined) ?? fixtureSymbols.other!;
