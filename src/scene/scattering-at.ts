/** What a scatterer does in its medium at one wavelength. */
import type { MediumDescription, ScattererDescription } from '../design/description.js';
import { type BeadScattering, beadScattering } from '../optics/bead-scattering.js';

/** Coefficients in 1/mm and the mean cosine of the scattering angle. */
export function scatteringAt(scatterer: ScattererDescription, medium: MediumDescription, nm: number): BeadScattering {
  if (scatterer.kind === 'henyey-greenstein') {
    return { scattering: scatterer.coefficient(nm), absorption: 0, anisotropy: scatterer.anisotropy(nm) };
  }
  const { radius, index, extinction, volumeFraction } = scatterer;
  const bead = beadScattering(radius, index(nm), extinction(nm), medium.index(nm), nm);
  const perMm3 = volumeFraction / ((4 / 3) * Math.PI * radius ** 3);
  return {
    scattering: perMm3 * bead.scattering,
    absorption: perMm3 * bead.absorption,
    anisotropy: bead.anisotropy,
  };
}

/** Absorption of a medium with its dyes and beads, 1/mm. */
export function absorptionAt(medium: MediumDescription, nm: number): number {
  const beads = medium.scatterers.reduce((sum, scatterer) => sum + scatteringAt(scatterer, medium, nm).absorption, 0);
  return medium.dyes.reduce((sum, dye) => sum + dye.absorption(nm), medium.absorption(nm) + beads);
}
