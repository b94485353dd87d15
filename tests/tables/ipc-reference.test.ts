import { type Case, compareFamily, orNA, perColumn, plain, same, sized, sizedOrNA } from '../support/compare-family.ts';
import { asInches } from '../support/table-files.ts';

// Every cell against the figures that it was typed from.
const ipcVents = ['1.25', '1.5', '2', '2.5', '3', '4'];
const ipc: readonly Case[] = [
  { table: 'slope', file: 'table-704.1', cells: 3, expected: { slope: plain('inPerFt') } },
  {
    table: 'cleanouts',
    file: 'table-708.1',
    cells: 12,
    expected: { cleanout: sizedOrNA('cleanoutSize'), spacing: plain('spacingFt'), clearance: orNA('clearanceIn') },
  },
  {
    table: 'fixtures',
    file: 'table-709.1',
    cells: 99,
    expected: { fixture: plain('key'), trap: sizedOrNA('trapSize'), load: orNA('load') },
  },
  { table: 'loads-by-trap', file: 'table-709.2', cells: 12, expected: { trap: sized('trap'), load: plain('load') } },
  {
    table: 'drain',
    file: 'table-710.1-1',
    cells: 60,
    expected: { size: sized('size'), ...same('1:192', '1:96', '1:48', '1:24') },
  },
  {
    table: 'branch-and-stack',
    file: 'table-710.1-2',
    cells: 55,
    expected: {
      size: sized('size'),
      branch: plain('branch'),
      oneInterval: orNA('oneInterval'),
      stackUpTo3: orNA('stackUpTo3'),
      stackOver3: orNA('stackOver3'),
    },
  },
  {
    table: 'stack-vent',
    file: 'table-906.1',
    cells: 38 * 13,
    expected: {
      stack: sized('stack'),
      load: plain('load'),
      ...perColumn([...ipcVents, '5', '6', '8', '10', '12'], asInches),
    },
  },
  {
    table: 'sump-vent',
    file: 'table-906.5.1',
    cells: 84,
    expected: { flow: plain('gpm'), ...perColumn(ipcVents, asInches) },
  },
  {
    table: 'trap-arm',
    file: 'table-909.1',
    cells: 15,
    expected: { trap: sized('trap'), slope: plain('slope'), longest: plain('maxFt') },
  },
  { table: 'common-vent', file: 'table-911.3', cells: 8, expected: { size: sized('size'), upper: plain('upperMax') } },
  { table: 'wet-vent', file: 'table-912.3', cells: 8, expected: { size: sized('size'), load: plain('load') } },
  {
    table: 'waste-stack',
    file: 'table-913.4',
    cells: 21,
    expected: { size: sized('size'), ...same('oneInterval', 'total') },
  },
  {
    table: 'combination',
    file: 'table-915',
    cells: 18,
    expected: { size: sized('size'), ...same('toBranchOrStack', 'toBuildingDrain') },
  },
  {
    table: 'single-stack',
    file: 'table-917.2',
    cells: 32,
    expected: { size: sized('size'), ...same('under75', 'under160', 'over160') },
  },
];

compareFamily('ipc', 'ipc-2015', ipc, 66);
