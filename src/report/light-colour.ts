/** Colour of light on a screen: CIE 1931 chromaticity -> sRGB (IEC 61966-2-1). */

/** Linear red, green, blue of X, Y, Z (IEC 61966-2-1, D65 white). */
const FROM_XYZ = [
  [3.2406, -1.5372, -0.4986],
  [-0.9689, 1.8758, 0.0415],
  [0.0557, -0.204, 1.057],
] as const;

/** Bytes red, green, blue of a chromaticity at the greatest brightness the screen has; light outside its gamut loses saturation. */
export function screenColour(x: number, y: number): readonly [number, number, number] {
  if (!(y > 0)) return [0, 0, 0];
  const xyz = [x / y, 1, (1 - x - y) / y];
  const linear = FROM_XYZ.map((row) => row[0] * xyz[0] + row[1] * xyz[1] + row[2] * xyz[2]);
  const lowest = Math.min(0, ...linear);
  const lifted = linear.map((value) => value - lowest);
  const highest = Math.max(...lifted, Number.MIN_VALUE);
  const [red, green, blue] = lifted.map((value) => Math.round(255 * gamma(value / highest)));
  return [red, green, blue];
}

/** The same as #rrggbb. */
export function screenHex(x: number, y: number): string {
  return `#${screenColour(x, y)
    .map((byte) => byte.toString(16).padStart(2, '0'))
    .join('')}`;
}

function gamma(linear: number): number {
  return linear <= 0.0031308 ? 12.92 * linear : 1.055 * linear ** (1 / 2.4) - 0.055;
}
