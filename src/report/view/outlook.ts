/** From where a design is looked at. z is up; the front is towards −y. */

export interface Outlook {
  /** Round the vertical, from the front towards the right (+x), rad. */
  readonly azimuth: number;
  /** Above the horizon, rad. */
  readonly elevation: number;
}

export interface OutlookAxes {
  /** Across the picture, up the picture, and out of it towards the eye: unit vectors. */
  readonly right: readonly [number, number, number];
  readonly up: readonly [number, number, number];
  readonly toward: readonly [number, number, number];
}

const DEGREE = Math.PI / 180;
const LONG = 4;
const FLAT = 0.2;

export const FROM_FRONT: Outlook = { azimuth: 0, elevation: 0 };
export const FROM_LEFT: Outlook = { azimuth: -90 * DEGREE, elevation: 0 };
export const FROM_ABOVE: Outlook = { azimuth: 0, elevation: 90 * DEGREE };

/** A good first look at something of these sizes: its longest side lies across the picture, a flat one is seen more from above. */
export function firstOutlook([x, y, z]: readonly number[]): Outlook {
  const longest = Math.max(x, y);
  const shortest = Math.max(Math.min(x, y), longest * 1e-6);
  const turn = longest > LONG * shortest ? 22 : 32;
  const flat = z < FLAT * longest;
  const tall = z > 2 * longest;
  return { azimuth: (x >= y ? turn : 90 - turn) * DEGREE, elevation: (flat ? 36 : tall ? 14 : 24) * DEGREE };
}

export function outlookAxes({ azimuth, elevation }: Outlook): OutlookAxes {
  const [ca, sa, ce, se] = [Math.cos(azimuth), Math.sin(azimuth), Math.cos(elevation), Math.sin(elevation)];
  return { right: [ca, sa, 0], up: [-se * sa, se * ca, ce], toward: [sa * ce, -ca * ce, se] };
}

export const along = (a: readonly number[], b: readonly number[]): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];

/** The eight corners of a box. */
export function boxCorners(low: readonly number[], high: readonly number[]): readonly (readonly number[])[] {
  return Array.from({ length: 8 }, (_, i) => [0, 1, 2].map((axis) => ((i >> axis) & 1 ? high : low)[axis]));
}
