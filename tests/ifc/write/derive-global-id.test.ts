import { createHash } from 'node:crypto';
import { expect, test } from 'vitest';
import { deriveGlobalId, packed } from '../../../src/ifc/write/derive-global-id.ts';

const digest = (bytes: Uint8Array): Uint8Array => createHash('sha256').update(bytes).digest();
const bytesOf = (uuid: string): Uint8Array => Buffer.from(uuid.replaceAll('-', ''), 'hex');

// The packing is 128 bits in base 64, two bits in the first character: worked by hand from the alphabet of
// ISO 16739 (IfcGloballyUniqueId). All ones is `3` and 21 times the last sign; one is the last character `1`.
const packings = [
  { uuid: '00000000-0000-0000-0000-000000000000', text: '0000000000000000000000' },
  { uuid: 'ffffffff-ffff-ffff-ffff-ffffffffffff', text: '3$$$$$$$$$$$$$$$$$$$$$' },
  { uuid: '00000000-0000-0000-0000-000000000001', text: '0000000000000000000001' },
  { uuid: '40000000-0000-0000-0000-00000000003f', text: '100000000000000000000$' },
];
for (const { uuid, text } of packings) {
  test(`${uuid} packs to ${text}`, () => expect(packed(bytesOf(uuid))).toBe(text));
}

test('the same words give the same GlobalId, any other word another', () => {
  const one = deriveGlobalId(digest, ['3vB2YO$MX4xv5uCqZZG05x', 'Drainwright_Pipe', 'IFCPROPERTYSET']);
  expect(one).toMatch(/^[0-3][0-9A-Za-z_$]{21}$/);
  expect(deriveGlobalId(digest, ['3vB2YO$MX4xv5uCqZZG05x', 'Drainwright_Pipe', 'IFCPROPERTYSET'])).toBe(one);
  const others = [
    ['3vB2YO$MX4xv5uCqZZG05y', 'Drainwright_Pipe', 'IFCPROPERTYSET'],
    ['3vB2YO$MX4xv5uCqZZG05x', 'Drainwright_Fixture', 'IFCPROPERTYSET'],
    ['3vB2YO$MX4xv5uCqZZG05x', 'Drainwright_Pipe', 'IFCRELDEFINESBYPROPERTIES'],
    ['3vB2YO$MX4xv5uCqZZG05xDrainwright_Pipe', '', 'IFCPROPERTYSET'],
  ];
  expect(new Set([one, ...others.map((words) => deriveGlobalId(digest, words))]).size).toBe(5);
});
