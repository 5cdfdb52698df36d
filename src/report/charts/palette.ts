import { interpolateCividis } from 'd3-scale-chromatic';

const STEPS = 256;

/**
 * Colours of the maps, dark to light: cividis, perceptually even and alike for readers with and without colour-blindness
 * (Nuñez, Anderton, Renslow 2018, PLoS ONE 13(7): e0199239). STEPS × 3 bytes.
 */
export const PALETTE: Uint8Array = Uint8Array.from(
  Array.from({ length: STEPS }, (_, i) => rgbOf(interpolateCividis(i / (STEPS - 1)))).flat(),
);

/** Index into the palette of a share from 0 to 1. */
export function paletteIndex(share: number): number {
  return Math.min(STEPS - 1, Math.max(0, Math.floor(share * STEPS)));
}

/** Colour of a share from 0 to 1, for SVG. */
export function paletteColour(share: number): string {
  const at = 3 * paletteIndex(share);
  return `#${[...PALETTE.subarray(at, at + 3)].map((byte) => byte.toString(16).padStart(2, '0')).join('')}`;
}

function rgbOf(text: string): number[] {
  return (text.match(/\d+/g) ?? []).map(Number);
}
