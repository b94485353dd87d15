const constants = primeRoots(64, 1 / 3);
const initial = primeRoots(8, 1 / 2);

/** SHA-256 (FIPS 180-4) of UTF-8 text or bytes. Written out since the page's policy needs it without an await. */
export function sha256(input: string | Uint8Array): Uint8Array {
  const bytes = typeof input === 'string' ? new TextEncoder().encode(input) : input;
  const padded = new Uint8Array(((bytes.length + 8) >> 6) * 64 + 64);
  padded.set(bytes);
  padded[bytes.length] = 0x80;
  const view = new DataView(padded.buffer);
  view.setUint32(padded.length - 8, Math.floor(bytes.length / 0x20000000));
  view.setUint32(padded.length - 4, (bytes.length << 3) >>> 0);
  const hash = Uint32Array.from(initial);
  const words = new Uint32Array(64);
  for (let at = 0; at < padded.length; at += 64) block(hash, words, view, at);
  const out = new DataView(new ArrayBuffer(32));
  hash.forEach((word, index) => {
    out.setUint32(index * 4, word);
  });
  return new Uint8Array(out.buffer);
}

function block(hash: Uint32Array, words: Uint32Array, view: DataView, at: number): void {
  for (let t = 0; t < 16; t++) words[t] = view.getUint32(at + t * 4);
  for (let t = 16; t < 64; t++) {
    const a = words[t - 15]!;
    const b = words[t - 2]!;
    const s0 = turn(a, 7) ^ turn(a, 18) ^ (a >>> 3);
    const s1 = turn(b, 17) ^ turn(b, 19) ^ (b >>> 10);
    words[t] = words[t - 16]! + s0 + words[t - 7]! + s1;
  }
  let [a, b, c, d, e, f, g, h] = hash as unknown as [number, number, number, number, number, number, number, number];
  for (let t = 0; t < 64; t++) {
    const s1 = turn(e, 6) ^ turn(e, 11) ^ turn(e, 25);
    const t1 = (h + s1 + ((e & f) ^ (~e & g)) + constants[t]! + words[t]!) | 0;
    const s0 = turn(a, 2) ^ turn(a, 13) ^ turn(a, 22);
    const t2 = (s0 + ((a & b) ^ (a & c) ^ (b & c))) | 0;
    h = g;
    g = f;
    f = e;
    e = (d + t1) | 0;
    d = c;
    c = b;
    b = a;
    a = (t1 + t2) | 0;
  }
  [a, b, c, d, e, f, g, h].forEach((word, index) => {
    hash[index] = hash[index]! + word;
  });
}

const turn = (word: number, by: number): number => (word >>> by) | (word << (32 - by));

/** First 32 bits of the fractional parts of roots of the first primes (FIPS 180-4, 4.2.2 and 5.3.3). */
function primeRoots(count: number, power: number): Uint32Array {
  const primes: number[] = [];
  for (let n = 2; primes.length < count; n++) if (primes.every((p) => n % p !== 0)) primes.push(n);
  return Uint32Array.from(primes, (p) => Math.floor((p ** power % 1) * 0x100000000));
}
