import { EXIT } from './exit-codes.js';

/** npm passes on the Ctrl-C that the terminal already sent to us: two signals this close are one wish. */
const SAME_WISH_MS = 500;

export interface Interrupt {
  /** Aborted by the first Ctrl-C or SIGTERM. */
  readonly signal: AbortSignal;
  /** Gives the signals back to Node. */
  readonly release: () => void;
}

/** The first Ctrl-C (or SIGTERM) aborts, so that what is done can be kept; a second one ends the program at once. */
export function listenForInterrupt(onFirst: () => void): Interrupt {
  const controller = new AbortController();
  let firstAt = 0;
  const heard = (): void => {
    if (!controller.signal.aborted) {
      firstAt = performance.now();
      onFirst();
      controller.abort();
    } else if (performance.now() - firstAt > SAME_WISH_MS) {
      process.exit(EXIT.killed);
    }
  };
  process.on('SIGINT', heard);
  process.on('SIGTERM', heard);
  return {
    signal: controller.signal,
    release: () => {
      process.off('SIGINT', heard);
      process.off('SIGTERM', heard);
    },
  };
}
