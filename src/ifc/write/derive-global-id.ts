/** SHA-256 of bytes: 32 bytes. Passed in, since Node and the browser have their own. */
export type Digest = (bytes: Uint8Array) => Uint8Array;

/**
 * A GlobalId of 22 characters that the same words always give: the first 128 bits of their digest with the version and
 * variant of a name-based UUID (RFC 9562, version 8), packed as IFC packs one.
 */
export function deriveGlobalId(digest: Digest, words: readonly string[]): string {
  const uuid = digest(encoder.encode(JSON.stringify(words))).slice(0, 16);
  uuid[6] = ((uuid[6] ?? 0) & 0x0f) | 0x80;
  uuid[8] = ((uuid[8] ?? 0) & 0x3f) | 0x80;
  return packed(uuid);
}

/** The 16 bytes of a UUID as IFC writes them: the first byte in two characters, then three bytes in each four. */
export function packed(uuid: Uint8Array): string {
  let text = characters(uuid[0] ?? 0, 2);
  for (let i = 1; i < 16; i += 3) {
    text += characters(((uuid[i] ?? 0) << 16) | ((uuid[i + 1] ?? 0) << 8) | (uuid[i + 2] ?? 0), 4);
  }
  return text;
}

const encoder = new TextEncoder();
const alphabet = '0123456789ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz_$';

function characters(value: number, count: number): string {
  let text = '';
  for (let place = count - 1; place >= 0; place--) text += alphabet[(value >> (6 * place)) & 63];
  return text;
}
