/**
 * Sobol points in up to 8 dimensions (Sobol 1967; direction numbers of Joe & Kuo, SIAM J. Sci. Comput. 30 2635 (2008),
 * from memory, held by the net property in the tests), shifted digitally at random (Cranley & Patterson in base 2: Matoušek 1998),
 * which keeps every average unbiased and the net property intact.
 */
export const SOBOL_DIMENSIONS = 8;
const BITS = 32;
const TO_UNIT = 2 ** -32;

/** Degree, inner coefficients and first direction integers of dimensions 2 to 8. */
const PRIMITIVE: readonly { readonly degree: number; readonly inner: number; readonly start: readonly number[] }[] = [
  { degree: 1, inner: 0, start: [1] },
  { degree: 2, inner: 1, start: [1, 3] },
  { degree: 3, inner: 1, start: [1, 3, 1] },
  { degree: 3, inner: 2, start: [1, 1, 1] },
  { degree: 4, inner: 1, start: [1, 1, 3, 3] },
  { degree: 4, inner: 4, start: [1, 3, 5, 13] },
  { degree: 5, inner: 2, start: [1, 1, 5, 5, 17] },
];

function directionNumbers(): Int32Array {
  const table = new Int32Array(SOBOL_DIMENSIONS * BITS);
  for (let bit = 0; bit < BITS; bit++) table[bit] = 1 << (BITS - 1 - bit);
  PRIMITIVE.forEach(({ degree, inner, start }, index) => {
    const row = (index + 1) * BITS;
    for (let bit = 0; bit < BITS; bit++) {
      if (bit < degree) {
        table[row + bit] = start[bit] << (BITS - 1 - bit);
        continue;
      }
      let value = table[row + bit - degree] ^ (table[row + bit - degree] >>> degree);
      for (let k = 1; k < degree; k++) {
        if ((inner >>> (degree - 1 - k)) & 1) value ^= table[row + bit - k];
      }
      table[row + bit] = value;
    }
  });
  return table;
}

const DIRECTIONS = directionNumbers();

/** Makes `points` (length SOBOL_DIMENSIONS) the first point: the random shift itself. */
export function startSobol(points: Int32Array, shift: Int32Array): void {
  for (let dimension = 0; dimension < SOBOL_DIMENSIONS; dimension++) points[dimension] = shift[dimension];
}

/** Steps from point `index` to `index + 1` (Gray-code order: Antonov & Saleev 1979). */
export function stepSobol(points: Int32Array, index: number): void {
  // Lowest zero bit of index.
  const bit = 31 - Math.clz32(~index & (index + 1));
  for (let dimension = 0; dimension < SOBOL_DIMENSIONS; dimension++)
    points[dimension] ^= DIRECTIONS[dimension * BITS + bit];
}

/** Coordinate of the current point in (0, 1). */
export function sobolUnit(points: Int32Array, dimension: number): number {
  return ((points[dimension] >>> 0) + 0.5) * TO_UNIT;
}
