/** Bytes as base64 without line breaks. In pieces, since one call with a million arguments overflows the stack. */
export function base64(bytes: Uint8Array): string {
  const piece = 0x6000; // divisible by 3, so that pieces join without padding between them
  const texts: string[] = [];
  for (let at = 0; at < bytes.length; at += piece)
    texts.push(btoa(String.fromCharCode(...bytes.subarray(at, at + piece))));
  return texts.join('');
}

export function fromBase64(text: string): Uint8Array<ArrayBuffer> {
  const binary = atob(text);
  const bytes = new Uint8Array(binary.length);
  for (let index = 0; index < binary.length; index++) bytes[index] = binary.charCodeAt(index);
  return bytes;
}
