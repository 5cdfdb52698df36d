/** Beads in a medium: what one of them takes out of a beam. */
import { mieEfficiencies, mieSeries } from './mie.js';

export interface BeadScattering {
  /** Cross sections of one bead, mm². */
  readonly scattering: number;
  readonly absorption: number;
  /** Mean cosine of the scattering angle; 0 where nothing is scattered. */
  readonly anisotropy: number;
}

/** The sphere's size, 2π · radius/wavelength in the medium; `radius` in mm, `nm` outside any medium. */
export const beadSize = (radius: number, indexAround: number, nm: number): number =>
  (2 * Math.PI * radius * 1e6 * indexAround) / nm;

/** A sphere of `radius` mm and complex index n − ik. What is around is taken as clear, as Mie's series has it. */
export function beadScattering(radius: number, n: number, k: number, indexAround: number, nm: number): BeadScattering {
  const series = mieSeries(beadSize(radius, indexAround, nm), n / indexAround, k / indexAround);
  const { extinction, scattering, anisotropy } = mieEfficiencies(series);
  const area = Math.PI * radius * radius;
  return {
    scattering: area * scattering,
    // Rounding may leave a clear bead a little less than nothing.
    absorption: k > 0 ? area * Math.max(0, extinction - scattering) : 0,
    anisotropy: scattering > 0 ? anisotropy : 0,
  };
}
