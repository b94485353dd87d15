import { createHash } from 'node:crypto';

const alphabet = '0123456789ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz_$';

/** A GlobalId of 22 characters, the same for the same words: 128 bits of a digest in IFC's own base 64. */
export function globalIdOf(...words: readonly string[]): string {
  const digest = createHash('sha256').update(words.join('\u0000')).digest();
  let bits = BigInt(`0x${digest.subarray(0, 16).toString('hex')}`);
  let text = '';
  for (let place = 0; place < 22; place += 1) {
    text = (alphabet[Number(bits & 63n)] ?? '0') + text;
    bits >>= 6n;
  }
  return text;
}
