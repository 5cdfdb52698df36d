import { encode } from 'fast-png';
import { PALETTE, paletteIndex } from './palette.js';

/** A plane of values: index u + cellsU·v, NaN where there is nothing. */
export interface Plane {
  readonly cellsU: number;
  readonly cellsV: number;
  readonly values: ArrayLike<number>;
}

/** One pixel per cell, v upward, coloured from 0 to `maximum`; see-through where there is nothing. A data: URL of a PNG. */
export function planePng({ cellsU, cellsV, values }: Plane, maximum: number): string {
  const data = new Uint8Array(cellsU * cellsV * 4);
  for (let v = 0; v < cellsV; v++) {
    for (let u = 0; u < cellsU; u++) {
      const value = values[u + cellsU * v];
      if (!Number.isFinite(value)) continue;
      const colour = 3 * paletteIndex(maximum > 0 ? value / maximum : 0);
      const pixel = 4 * (u + cellsU * (cellsV - 1 - v));
      data.set(PALETTE.subarray(colour, colour + 3), pixel);
      data[pixel + 3] = 255;
    }
  }
  return pngUrl(cellsU, cellsV, data);
}

/** @param data red, green, blue, alpha of each pixel, rows from the top. */
export function pngUrl(width: number, height: number, data: Uint8Array): string {
  return `data:image/png;base64,${Buffer.from(encode({ width, height, data, channels: 4, depth: 8 })).toString('base64')}`;
}
