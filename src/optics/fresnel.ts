/**
 * Unpolarised Fresnel reflectance of a smooth interface between two transparent media (Born & Wolf, Principles of Optics, §1.5).
 * Whether light gets through must be decided by the same bits here and where it is refracted: keep `sine2` as it is written.
 * @param nIncident refractive index on the side the light comes from
 * @param nTransmitted refractive index beyond
 * @param cosIncident cosine of the angle of incidence, 0..1
 * @returns reflected share, 1 beyond the critical angle
 */
export function fresnelReflectance(nIncident: number, nTransmitted: number, cosIncident: number): number {
  const ratio = nIncident / nTransmitted;
  const sine2 = ratio * ratio * (1 - cosIncident * cosIncident);
  if (sine2 >= 1) return 1;
  const cosTransmitted = Math.sqrt(1 - sine2);
  const a = nIncident * cosIncident;
  const b = nTransmitted * cosTransmitted;
  const c = nIncident * cosTransmitted;
  const d = nTransmitted * cosIncident;
  const s = (a - b) / (a + b);
  const p = (d - c) / (d + c);
  return 0.5 * (s * s + p * p);
}
