/** The way of one history, for pictures. */
import type { FateSlot } from '../tallies/run-tallies.js';

export interface TracedPath {
  /** How it ended. */
  readonly end: FateSlot;
  /** x, y, z of every turn of the path, mm, from the pump on: 3 numbers a point, at least two points. */
  readonly points: readonly number[];
  /** Wavelength along each segment, nm: one fewer than points. It changes where a dye emitted anew. */
  readonly wavelengthsNm: readonly number[];
  /** The first segments were pump light: their number. */
  readonly pumpSegments: number;
  /** The path had more turns than are kept: its middle is missing after this point; −1 when it is whole. */
  readonly cutAfter: number;
}
