/** The law written out for the proofs in the sine and tangent form, which the tracer does not use. */

export const radians = (degrees: number): number => (degrees * Math.PI) / 180;

/**
 * Unpolarised power reflectance of a plane between indices n1 (where the light is) and n2.
 * Born & Wolf, Principles of Optics, §1.5.2, eqs (21a) and (33): R∥ = tan²(i−t)/tan²(i+t), R⊥ = sin²(i−t)/sin²(i+t).
 * @param incidence angle in the first medium, rad
 */
export function fresnelReflectance(n1: number, n2: number, incidence: number): number {
  if (incidence < 1e-6) return ((n1 - n2) / (n1 + n2)) ** 2;
  const sine = (n1 / n2) * Math.sin(incidence);
  if (sine >= 1) return 1;
  const refraction = Math.asin(sine);
  const perpendicular = (Math.sin(incidence - refraction) / Math.sin(incidence + refraction)) ** 2;
  const parallel = (Math.tan(incidence - refraction) / Math.tan(incidence + refraction)) ** 2;
  return (perpendicular + parallel) / 2;
}

/**
 * Unpolarised power reflectance of an opaque metal n − ik in a transparent medium of index n0, in real numbers:
 * Born & Wolf §14.2 (there with u, v); R⊥ and R∥ share a and b, the real and imaginary part of the normal component.
 */
export function metalReflectance(n0: number, n: number, k: number, incidence: number): number {
  const sine = Math.sin(incidence);
  const cosine = Math.cos(incidence);
  const real = n * n - k * k - (n0 * sine) ** 2;
  const modulus = Math.hypot(real, 2 * n * k);
  const a = Math.sqrt((modulus + real) / 2);
  const normal = n0 * cosine;
  const across = (n0 * sine * sine) / cosine;
  const perpendicular = (modulus - 2 * a * normal + normal ** 2) / (modulus + 2 * a * normal + normal ** 2);
  const ratio = (modulus - 2 * a * across + across ** 2) / (modulus + 2 * a * across + across ** 2);
  return (perpendicular * (1 + ratio)) / 2;
}
