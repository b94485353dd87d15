import { fixtureSymbolPath } from '../../schedule/fixture-symbols.ts';
import { makeSvg } from './element.ts';

/** The plan symbol of a kind, beside its name; decoration for those who see. */
export const fixtureSymbol = (kind: string | null): SVGSVGElement =>
  makeSvg(
    'svg',
    { class: 'symbol', viewBox: '0 0 24 24', 'aria-hidden': 'true' },
    makeSvg('path', { d: fixtureSymbolPath(kind) }),
  );
