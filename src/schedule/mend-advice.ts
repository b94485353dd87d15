import type { FindingCode } from '../findings/finding.ts';

/** What a person has to draw or say where the program knows no change: it adds vents and sizes, never a layout. */
const advice: Partial<Record<FindingCode, string>> = {
  'fixture-unconnected':
    'Draw the drain of each fixture that has none, from its outlet to a branch; no plan can stand in for that.',
  'no-sewer-end':
    'Draw the way to the sewer, give it a name or a system that says so, or answer sewerEnds with the end that it is.',
  'files-apart': 'Export all files with the same origin, or check them one by one.',
  'outlet-pipe-too-long': 'Draw the trap nearer to its fixture, or the fixture nearer to its trap.',
  'unvented-trap':
    'Draw a vent from the drain of each such fixture: no way of a new one to open air or to a vent was found.',
  'trap-arm-too-long': 'Draw the vent nearer to the trap, or the fixture nearer to its vent.',
  backfall: 'Draw the pipe with a fall toward the sewer: its ends lie the wrong way round.',
  'slope-too-small': 'Lay the pipe with its least fall; where its ends are fixed, their heights have to change.',
  'vent-joins-too-low': 'Draw the vent so that it joins the others above the flood level of what it serves.',
  'vent-stack-misplaced': 'Draw the foot of the vent stack at or below the lowest connection of its stack.',
  'yoke-vent-misplaced':
    'Draw the yoke vent from below the branch of its storey to above the floor, as the clause says.',
  'branch-too-long': 'Draw the branch shorter, with fewer bends, or with a vent of its own.',
  'branch-near-foot': 'Draw the branch into another place: farther from the foot of the stack.',
  'appliance-not-allowed': 'Choose another system or another appliance: no size settles it.',
  'valve-not-allowed': 'Lead this vent to open air instead of an air admittance valve.',
  'island-vent-not-allowed': 'Lead this vent up to open air without a dip, or vent the fixture another way.',
  'waste-stack-vent-not-allowed': 'Give the fixtures of this stack vents of their own.',
  'combination-not-allowed': 'Give these fixtures vents of their own, or drain them apart.',
  'single-stack-not-allowed': 'Give the branches of this stack vents of their own.',
  'common-vent-not-allowed': 'Give each of the two fixtures a vent of its own.',
  'closet-needs-larger': 'Draw these water closets into a larger pipe, or fewer of them into this one.',
  'wet-vent-overloaded': 'Draw fewer fixtures onto this wet vent, or give some vents of their own.',
  'vent-area-too-small': 'Draw one more vent of the building drain to open air, or a larger one.',
};

/** For errors that are left, each code once, in their order. */
export function adviceOn(left: readonly FindingCode[]): { code: string; sentence: string }[] {
  return [...new Set(left)].map((code) => ({
    code,
    sentence: advice[code] ?? 'This one is for the designer: the program knows no change for it.',
  }));
}
