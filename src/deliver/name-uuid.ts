import { sha256 } from './sha256.ts';

/** A UUID that the same words always give (RFC 9562, version 8: the bits are ours to choose). */
export function nameUuid(words: string): string {
  const bytes = sha256(new TextEncoder().encode(words)).slice(0, 16);
  bytes[6] = (bytes[6]! & 0x0f) | 0x80;
  bytes[8] = (bytes[8]! & 0x3f) | 0x80;
  const hex = [...bytes].map((byte) => byte.toString(16).padStart(2, '0')).join('');
  return [hex.slice(0, 8), hex.slice(8, 12), hex.slice(12, 16), hex.slice(16, 20), hex.slice(20)].join('-');
}
