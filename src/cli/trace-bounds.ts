import type { TraceDefaults } from '../design/description.js';

/** Histories of a trace that nobody bounded: some 0.2 % on a bright cell, in seconds. */
const HISTORIES_BY_DEFAULT = 200_000;
/** Bound that is there only so that a wanted precision that cannot be reached ends one day. */
const HISTORIES_WHEN_OTHERWISE_BOUND = 1e9;

/** What the command line asks for. */
export interface WantedBounds {
  readonly histories?: number;
  readonly precision?: number;
  /** Seconds. */
  readonly for?: number;
}

/** When a trace ends; whichever comes first. */
export interface TraceBounds {
  readonly histories: number;
  readonly precision: number | null;
  readonly seconds: number | null;
}

/** The command line's bounds; if it names none, the design's; if that names none, a default number of histories. */
export function traceBounds(wanted: WantedBounds, design: TraceDefaults): TraceBounds {
  const { histories, precision, for: seconds } = wanted;
  if (histories !== undefined || precision !== undefined || seconds !== undefined) {
    return {
      histories: histories ?? HISTORIES_WHEN_OTHERWISE_BOUND,
      precision: precision ?? null,
      seconds: seconds ?? null,
    };
  }
  const otherwise = design.precision === null ? HISTORIES_BY_DEFAULT : HISTORIES_WHEN_OTHERWISE_BOUND;
  return { histories: design.histories ?? otherwise, precision: design.precision, seconds: null };
}
