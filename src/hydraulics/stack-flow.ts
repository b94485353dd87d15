/**
 * Water that falls in a stack clings to its wall and soon falls no faster: Wyly and Eaton, National Bureau of Standards,
 * reports BMS 132 and Monograph 31. Bores in metres, flows in l/s; the formulas as published, in inches, feet and US gallons.
 */

/** Speed in m/s that a flow reaches and keeps. */
export const terminalSpeed = (flow: number, bore: number): number =>
  3 * (flow / gallonPerMinute / (bore / inch)) ** 0.4 * foot;

/** Metres of fall in which it is reached. */
export const terminalLength = (speed: number): number => 0.052 * (speed / foot) ** 2 * foot;

/** l/s that fill a share of the stack's cross-section; a fourth to a third in practice, 7/24 by most codes. */
export const stackCapacity = (share: number, bore: number): number =>
  27.8 * share ** (5 / 3) * (bore / inch) ** (8 / 3) * gallonPerMinute;

/** Share of the cross-section that a flow takes. */
export const shareOfStack = (flow: number, bore: number): number => (flow / stackCapacity(1, bore)) ** (3 / 5);

/** Share at which the load tables of most North American codes hold a stack to be full. */
export const fullStack = 7 / 24;

/** Metres. */
export const inch = 0.0254;
const foot = 0.3048;
/** A US gallon a minute in l/s. */
export const gallonPerMinute = 3.785411784 / 60;
