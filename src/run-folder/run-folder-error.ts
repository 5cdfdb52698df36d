/** A run folder that cannot be written or read: the outside world's fault, told in one sentence with the next step. */
export class RunFolderError extends Error {
  /** What could not be written or read. */
  readonly path: string;
  readonly doing: 'write' | 'read';

  /** @param problem what is wrong, without a full stop. @param nextStep whole sentence. */
  constructor(doing: 'write' | 'read', path: string, problem: string, nextStep: string, cause?: unknown) {
    super(`cannot ${doing} "${printable(path)}": ${printable(problem)}. ${nextStep}`, { cause });
    this.name = 'RunFolderError';
    this.path = path;
    this.doing = doing;
  }
}

const REASONS: Readonly<Record<string, string>> = {
  EACCES: 'permission denied',
  EPERM: 'permission denied',
  EROFS: 'the file system is read-only',
  ENOSPC: 'the disk is full',
  EDQUOT: 'the disk quota is used up',
  EFBIG: 'a file grew larger than the file system allows',
  EIO: 'the disk reported an error',
  ENOTDIR: 'a file stands where a folder is needed',
  EISDIR: 'a folder stands where a file is needed',
  EEXIST: 'something of that name is there already',
  ENOTEMPTY: 'the folder is not empty',
  EBUSY: 'the folder is in use by the system (a mount point, or a program that holds it)',
  EXDEV: 'the folder lies on another file system than the one it stands in',
  ENAMETOOLONG: 'the name is too long',
  ENOENT: 'it does not exist',
  EMFILE: 'too many files are open',
  ENFILE: 'too many files are open',
};

/** Why a call to the file system failed, in words. */
export function fileSystemReason(error: NodeJS.ErrnoException): string {
  return REASONS[error.code ?? ''] ?? error.message;
}

export function isFileSystemError(error: unknown): error is NodeJS.ErrnoException {
  return error instanceof Error && 'code' in error && 'syscall' in error;
}

/** Names come from outside: whatever moves a cursor or reorders text becomes a space. */
function printable(text: string): string {
  return text.replace(/[\p{Cc}\p{Cf}\p{Cs}\p{Zl}\p{Zp}]/gu, ' ');
}
