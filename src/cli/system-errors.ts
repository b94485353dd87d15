/** The code of a system error such as `ENOENT`; null for anything else. */
export function systemCode(error: unknown): string | null {
  const code = typeof error === 'object' && error !== null && 'code' in error ? error.code : null;
  return typeof code === 'string' ? code : null;
}

/** A system error in words that say what to do; the system's own words for the rare ones. */
export function reasonOf(error: unknown): string {
  const code = systemCode(error);
  const words = code === null ? undefined : reasons[code];
  if (words !== undefined) return words;
  return error instanceof Error ? error.message : String(error);
}

const reasons: Readonly<Record<string, string>> = {
  ENOENT: 'there is no such file',
  ENOTDIR: 'a part of the path is no folder',
  EACCES: 'permission denied',
  EPERM: 'permission denied',
  EROFS: 'the disk is read-only',
  EISDIR: 'it is a folder',
  ELOOP: 'its symbolic links run in a circle',
  ENAMETOOLONG: 'the name is too long',
  EMFILE: 'too many files are open',
  EIO: 'the disk reports an error',
  ENOSPC: 'the disk is full',
  EDQUOT: 'the disk quota is used up',
  EFBIG: 'the file would be larger than allowed here',
  EBUSY: 'another program holds it',
  ENXIO: 'it is a pipe or device that nothing answers at',
  ERR_FS_FILE_TOO_LARGE: 'it is larger than 2 GiB',
  ERR_INVALID_ARG_VALUE: 'no file can have such a name',
};
