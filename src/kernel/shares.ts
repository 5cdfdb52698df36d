/** Slots of the array `splitLight` reads and fills. */
export const enum SHARES {
  reflected = 0,
  transmitted = 1,
  index = 2,
  cosine = 3,
  indexBeyond = 4,
  // Polarised light only: shares of s and p, and the product of one amplitude with the other's conjugate.
  reflectedS = 5,
  reflectedP = 6,
  reflectedReal = 7,
  reflectedImaginary = 8,
  transmittedS = 9,
  transmittedP = 10,
  transmittedReal = 11,
  transmittedImaginary = 12,
  // Weights of the four nodes of a stack's table that lie about the angle.
  weight = 13,
  COUNT = 17,
}
