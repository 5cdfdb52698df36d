/** Chromaticity and dominant wavelength in the CIE 1931 system (CIE 15:2004). */
import { observerTable } from '../materials/observer.js';

export const chromaticityX = (x: number, y: number, z: number): number => x / (x + y + z);
export const chromaticityY = (x: number, y: number, z: number): number => y / (x + y + z);

/**
 * Dominant wavelength, nm, of a chromaticity against the equal-energy stimulus E (x = y = 1/3), as is usual for light
 * sources: where the line from E through it meets the spectral locus. NaN for E itself and for purples, which have none.
 */
export function dominantWavelength(x: number, y: number): number {
  const dx = x - 1 / 3;
  const dy = y - 1 / 3;
  if (Math.hypot(dx, dy) < 1e-6) return Number.NaN;
  const locus = observerTable().map(({ nm, xyz: [a, b, c] }) => ({
    nm,
    sum: a + b + c,
    x: a / (a + b + c),
    y: b / (a + b + c),
  }));
  // Beyond 700 nm the locus stands still but for rounding.
  const usable = locus.filter(({ nm }) => nm >= 380 && nm <= 700);
  const side = (p: { x: number; y: number }) => dx * (p.y - 1 / 3) - dy * (p.x - 1 / 3);
  for (let i = 1; i < usable.length; i++) {
    const from = usable[i - 1];
    const to = usable[i];
    const a = side(from);
    const b = side(to);
    if (a === b || a * b > 0) continue;
    const share = a / (a - b);
    const px = from.x + (to.x - from.x) * share;
    const py = from.y + (to.y - from.y) * share;
    // The line meets the locus on both sides of E; only the one ahead counts.
    if (dx * (px - 1 / 3) + dy * (py - 1 / 3) <= 0) continue;
    // Between rows the observer is linear in X, Y, Z: a step along the chord weighs each end by its X + Y + Z.
    const along = (share * from.sum) / (share * from.sum + (1 - share) * to.sum);
    return from.nm + (to.nm - from.nm) * along;
  }
  return Number.NaN;
}
