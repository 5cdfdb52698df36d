/** What an instrument adds to a spectrum, told from its red end, where no dye absorbs any more. */
export interface RedBaseline {
  readonly level: number;
  /** Where the flat end begins, nm. */
  readonly fromNm: number;
}

/** Share of the span, and points, that the red end is judged by. */
const END_SHARE = 0.08;
const END_POINTS = 8;
/** A level below this share of the peak is none; above the other, the band itself has been cut. */
const LEAST = 2e-4;
const MOST = 0.05;

/**
 * The level of a flat red end, or null where the spectrum comes to zero or is still falling. A dye's own tail falls by e in some
 * 6 nm (kT), so it cannot be flat over the end. @param nm ascending
 */
export function redBaseline(nm: readonly number[], values: readonly number[]): RedBaseline | null {
  const peak = Math.max(...values);
  const last = nm.length - 1;
  const start = nm.findIndex((x) => x >= nm[last] - END_SHARE * (nm[last] - nm[0]));
  const from = Math.min(start, nm.length - END_POINTS);
  if (from <= values.indexOf(peak)) return null;
  const end = values.slice(from);
  const half = end.length >> 1;
  const level = median(end);
  const noise = 1.4826 * median(end.map((value) => Math.abs(value - level)));
  const fall = Math.abs(median(end.slice(0, half)) - median(end.slice(half)));
  const flat = fall <= Math.max(0.3 * Math.abs(level), 2 * noise);
  const seen = Math.abs(level) > LEAST * peak && Math.abs(level) > (4 * noise) / Math.sqrt(end.length);
  return flat && seen && Math.abs(level) < MOST * peak ? { level, fromNm: nm[from] } : null;
}

/** Noise of a smooth spectrum, as a standard deviation: from second differences, which smooth shapes leave small. */
export function noiseOf(values: readonly number[]): number {
  const differences = values.slice(2).map((value, i) => Math.abs(value - 2 * values[i + 1] + values[i]));
  return differences.length === 0 ? 0 : (1.4826 * median(differences)) / Math.sqrt(6);
}

export function median(values: readonly number[]): number {
  const sorted = values.toSorted((a, b) => a - b);
  const middle = sorted.length >> 1;
  return sorted.length % 2 === 1 ? sorted[middle] : (sorted[middle - 1] + sorted[middle]) / 2;
}
