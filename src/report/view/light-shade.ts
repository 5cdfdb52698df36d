/** Colours of light as lines on a page: hue kept, brightness held within what can be told from the paper. */

export type Rgb = readonly [number, number, number];

/** Lines on light paper stay below, on dark paper above; between them they are seen on both. Relative luminance. */
export const ON_LIGHT: readonly [number, number] = [0, 0.27];
export const ON_DARK: readonly [number, number] = [0.16, 1];
export const ON_BOTH: readonly [number, number] = [0.16, 0.27];

/** sRGB bytes to sRGB bytes of a luminance within the bounds: darkened by a factor, lightened towards white. */
export function shade([red, green, blue]: Rgb, [least, most]: readonly [number, number]): Rgb {
  const linear = [red, green, blue].map((byte) => toLinear(byte / 255));
  const bright = luminance(linear);
  if (bright > most) return bytes(linear.map((value) => (value * most) / bright));
  if (bright < least) {
    const share = (least - bright) / (1 - bright);
    return bytes(linear.map((value) => value + (1 - value) * share));
  }
  return [red, green, blue];
}

/** Relative luminance of linear red, green, blue (IEC 61966-2-1). */
export const luminance = ([red, green, blue]: readonly number[]): number =>
  0.2126 * red + 0.7152 * green + 0.0722 * blue;

const bytes = (linear: readonly number[]): Rgb => {
  const [red, green, blue] = linear.map((value) => Math.round(255 * fromLinear(value)));
  return [red, green, blue];
};

const toLinear = (value: number): number => (value <= 0.04045 ? value / 12.92 : ((value + 0.055) / 1.055) ** 2.4);
const fromLinear = (value: number): number => (value <= 0.0031308 ? 12.92 * value : 1.055 * value ** (1 / 2.4) - 0.055);
