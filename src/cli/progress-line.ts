import type { TraceProgress } from '../trace/trace-result.js';
import { formatSeconds, groupedCount, significant } from './number-format.js';

/** When a trace ends: whichever comes first. */
export interface ProgressBounds {
  readonly precision: number | null;
  readonly seconds: number | null;
}

const REDRAW_MS = 100;

/** Share of the work done, 0 to 1, by whichever bound will be met first. The error falls as 1/√histories. */
export function shareDone(progress: TraceProgress, bounds: ProgressBounds): number {
  const shares = [progress.histories / progress.ofHistories];
  if (bounds.seconds !== null) shares.push(progress.seconds / bounds.seconds);
  if (bounds.precision !== null && progress.precision !== null) {
    shares.push((bounds.precision / progress.precision) ** 2);
  }
  return Math.min(1, Math.max(...shares));
}

/** One line: histories, rate, precision reached, time left. */
export function progressText(progress: TraceProgress, bounds: ProgressBounds): string {
  const share = shareDone(progress, bounds);
  const parts = [`${Math.floor(100 * share)} %`, `${groupedCount(progress.histories)} histories`];
  if (progress.seconds > 0) {
    parts.push(`${groupedCount(Number(significant(progress.histories / progress.seconds, 3)))}/s`);
  }
  if (progress.precision !== null) parts.push(`exit known to ${significant(100 * progress.precision, 2)} %`);
  if (share > 0 && share < 1) parts.push(`${formatSeconds((progress.seconds * (1 - share)) / share)} left`);
  return parts.join(', ');
}

/** Shows progress on a stream that can be erased line by line (`rewrite`), or as one line per quarter. */
export class ProgressLine {
  #drawnAt = Number.NEGATIVE_INFINITY;
  #quarters = 0;

  constructor(
    private readonly write: (text: string) => void,
    private readonly bounds: ProgressBounds,
    private readonly rewrite: boolean,
    private readonly columns: number,
  ) {}

  show(progress: TraceProgress): void {
    if (this.rewrite) {
      const now = performance.now();
      if (now - this.#drawnAt < REDRAW_MS) return;
      this.#drawnAt = now;
      this.write(`\r\u001b[2K${progressText(progress, this.bounds).slice(0, this.columns - 1)}`);
      return;
    }
    const quarters = Math.floor(4 * shareDone(progress, this.bounds));
    if (quarters <= this.#quarters) return;
    this.#quarters = quarters;
    this.write(`${progressText(progress, this.bounds)}\n`);
  }

  /** Leaves the stream as if nothing had been shown. */
  clear(): void {
    if (this.rewrite && this.#drawnAt > Number.NEGATIVE_INFINITY) this.write('\r\u001b[2K');
  }
}
