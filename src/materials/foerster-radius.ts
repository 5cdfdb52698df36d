import type { Curve } from '../units/curve.js';

/**
 * Overlap integral J = ∫F ε λ⁴ dλ / ∫F dλ, L/(mol cm) nm⁴, by the trapezoidal rule.
 * @param photonsPerNm emission of the donor, relative @param extinction of the acceptor, decadic, L/(mol cm)
 */
export function overlapIntegral(
  photonsPerNm: Curve,
  extinction: Curve,
  fromNm: number,
  toNm: number,
  stepNm = 0.5,
): number {
  let overlap = 0;
  let photons = 0;
  const steps = Math.max(1, Math.round((toNm - fromNm) / stepNm));
  for (let i = 0; i <= steps; i++) {
    const nm = fromNm + ((toNm - fromNm) * i) / steps;
    const weight = (i === 0 || i === steps ? 0.5 : 1) * Math.max(0, photonsPerNm(nm));
    photons += weight;
    overlap += weight * Math.max(0, extinction(nm)) * nm ** 4;
  }
  return photons > 0 ? overlap / photons : 0;
}

/** Distance at which a transfer is as likely as any other decay, nm: 0.02108 (κ² φ n⁻⁴ J)^(1/6) (Förster, Ann. Phys. 437 55 (1948)). */
export function foersterRadius(overlap: number, quantumYield: number, index: number, orientation = 2 / 3): number {
  return 0.02108 * ((orientation * quantumYield * overlap) / index ** 4) ** (1 / 6);
}
