/** The comments between which our own lines stand in a file that we have written. */
export const beginMark = '/* Drainwright 1 begin */';
export const endMark = '/* Drainwright 1 end */';

export function atMark(b: Uint8Array, at: number, mark: string): boolean {
  for (let i = 0; i < mark.length; i++) if (b[at + i] !== mark.charCodeAt(i)) return false;
  return true;
}

/** Past one line end (LF, CRLF or CR) if one stands here. */
export function pastLineEnd(b: Uint8Array, at: number): number {
  if (b[at] === 13) return b[at + 1] === 10 ? at + 2 : at + 1;
  return b[at] === 10 ? at + 1 : at;
}
