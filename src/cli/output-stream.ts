import { fileSystemReason } from '../run-folder/run-folder-error.js';

/**
 * Guards standard output and error against readers that went away: a closed pipe is no fault and is left quietly, so
 * that a run still writes its files and keeps its exit status. Any other failure (a full disk behind `>`) is handed on.
 */
export function guardStreams(onFailure: (reason: string) => void): void {
  for (const stream of [process.stdout, process.stderr]) {
    stream.on('error', (error: NodeJS.ErrnoException) => {
      if (error.code !== 'EPIPE' && error.code !== 'ERR_STREAM_DESTROYED') onFailure(fileSystemReason(error));
    });
  }
}

/** Writes to standard output. */
export function print(text: string): void {
  if (!process.stdout.destroyed) process.stdout.write(text);
}

/** Writes to standard error. */
export function tell(text: string): void {
  if (!process.stderr.destroyed) process.stderr.write(text);
}
