import { createHash } from 'node:crypto';
import fc from 'fast-check';
import { expect, test } from 'vitest';
import { base64, fromBase64 } from '../../src/deliver/base64.ts';
import { sha256 } from '../../src/deliver/sha256.ts';

const hex = (bytes: Uint8Array): string => Buffer.from(bytes).toString('hex');

test.each([
  ['', 'e3b0c44298fc1c149afbf4c8996fb92427ae41e4649b934ca495991b7852b855', 'NIST CAVP SHA256ShortMsg, Len = 0'],
  ['abc', 'ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad', 'FIPS 180-4 example, one block'],
  [
    'abcdbcdecdefdefgefghfghighijhijkijkljklmklmnlmnomnopnopq',
    '248d6a61d20638b8e5c026930c3e6039a33ce45964ff2167f6ecedd419db06c1',
    'FIPS 180-4 example, two blocks',
  ],
])('sha256 of %j (%s: %s)', (text, digest) => {
  expect(hex(sha256(text))).toBe(digest);
});

test('agrees with the library of Node on any bytes', () => {
  fc.assert(
    fc.property(fc.uint8Array({ maxLength: 300 }), (bytes) => {
      expect(hex(sha256(bytes))).toBe(createHash('sha256').update(bytes).digest('hex'));
    }),
  );
});

test('base64 there and back, across its pieces', () => {
  for (const length of [0, 1, 2, 3, 0x5fff, 0x6000, 0x6001, 70_000]) {
    const bytes = Uint8Array.from({ length }, (_, at) => (at * 31) & 255);
    expect(base64(bytes)).toBe(Buffer.from(bytes).toString('base64'));
    expect(hex(fromBase64(base64(bytes)))).toBe(hex(bytes));
  }
});
