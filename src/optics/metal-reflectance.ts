/**
 * Unpolarised Fresnel reflectance of an opaque metal, exact and in real numbers (Born & Wolf, Principles of Optics, §14.2;
 * Stratton, Electromagnetic Theory, §9.8). The normal component of the wave vector in the metal, over that in vacuum and the
 * outer index, is u − iv with (u − iv)² = ((n − ik)/nIncident)² − sin²; of it only u and |u − iv|² are needed.
 * @param nIncident refractive index of the transparent medium the light comes from
 * @param n real part of the metal's index n − ik
 * @param k imaginary part, not negative
 * @param cosIncident cosine of the angle of incidence, 0..1
 * @returns reflected share; what is left is absorbed
 */
export function metalReflectance(nIncident: number, n: number, k: number, cosIncident: number): number {
  const cos2 = cosIncident * cosIncident;
  const sin2 = 1 - cos2;
  const real = (n * n - k * k) / (nIncident * nIncident) - sin2;
  const imaginary = (2 * n * k) / (nIncident * nIncident);
  const modulus = Math.sqrt(real * real + imaginary * imaginary);
  const u = Math.sqrt(Math.max(0, 0.5 * (modulus + real)));
  const cross = 2 * cosIncident * u;
  const perpendicular = (cos2 + modulus - cross) / (cos2 + modulus + cross);
  // R∥/R⊥, times cos² above and below so that grazing light divides by nothing.
  const sum = sin2 * sin2 + cos2 * modulus;
  const parallel = (perpendicular * (sum - sin2 * cross)) / (sum + sin2 * cross);
  return 0.5 * (perpendicular + parallel);
}
