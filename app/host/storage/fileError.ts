const REASONS: Readonly<Record<string, string>> = {
  ENOENT: 'it is not there',
  ENOTDIR: 'it is not there',
  EACCES: 'no permission',
  EPERM: 'no permission',
  ELOOP: 'its links lead in a circle',
  EISDIR: 'it is a folder',
  EMFILE: 'too many files are open',
  ENFILE: 'too many files are open',
  ENOSPC: 'the disk is full',
  EDQUOT: 'the disk quota is used up',
  EFBIG: 'a file may not grow so large here',
  EROFS: 'the disk can only be read',
  EIO: 'the disk reports a fault',
  ENAMETOOLONG: 'its name is too long',
  EBUSY: 'another program is using it',
  ENXIO: 'it is not an ordinary file',
};

/** The system's code of a failed file operation ('ENOENT'); undefined for any other error. */
export function fileErrorCode(error: unknown): string | undefined {
  if (!(error instanceof Error) || !('code' in error) || !('syscall' in error)) return undefined;
  return typeof error.code === 'string' ? error.code : undefined;
}

/** Why a file operation failed, as the end of a sentence. Undefined for an error that is our own: throw it on. */
export function fileErrorReason(error: unknown): string | undefined {
  const code = fileErrorCode(error);
  return code === undefined ? undefined : (REASONS[code] ?? `the system says ${code}`);
}
