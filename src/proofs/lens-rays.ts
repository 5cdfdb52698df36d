/**
 * Rays in the plane of the axis through one lens, after Kingslake & Johnson, Lens Design Fundamentals (2010), ch. 2: height and angle from
 * surface to surface, each met by Newton's method on its sag and bent by Snell's law on angles. Shares nothing with the tracer.
 */

/** Radius of curvature, positive with its centre behind the surface; null is flat. */
export interface OpticalSurface {
  readonly radius: number | null;
  readonly conic: number;
}

export interface MeridionalRay {
  readonly height: number;
  /** Place along the axis from the first vertex. */
  readonly along: number;
  /** From the axis, positive away from it, rad. */
  readonly angle: number;
}

function sag({ radius, conic }: OpticalSurface, height: number): number {
  if (radius === null) return 0;
  const curvature = 1 / radius;
  return (curvature * height ** 2) / (1 + Math.sqrt(1 - (1 + conic) * (curvature * height) ** 2));
}

function slope({ radius, conic }: OpticalSurface, height: number): number {
  if (radius === null) return 0;
  const curvature = 1 / radius;
  return (curvature * height) / Math.sqrt(1 - (1 + conic) * (curvature * height) ** 2);
}

/** The ray behind the lens that comes in at a height and an angle; vertices at 0 and `thickness`, air outside. */
export function throughLens(
  first: OpticalSurface,
  second: OpticalSurface,
  thickness: number,
  index: number,
  height: number,
  angle = 0,
): MeridionalRay {
  const start = { height, along: -thickness, angle };
  const inside = refract(start, first, 0, 1, index);
  return refract(inside, second, thickness, index, 1);
}

function refract(ray: MeridionalRay, surface: OpticalSurface, vertex: number, before: number, after: number) {
  const tangent = Math.tan(ray.angle);
  let along = vertex;
  for (let step = 0; step < 50; step++) {
    const height = ray.height + (along - ray.along) * tangent;
    const miss = along - vertex - sag(surface, height);
    along -= miss / (1 - slope(surface, height) * tangent);
    if (Math.abs(miss) < 1e-14) break;
  }
  const height = ray.height + (along - ray.along) * tangent;
  // The normal leans towards the axis by this where the surface bulges towards the light.
  const normal = -Math.atan(slope(surface, height));
  const incidence = ray.angle - normal;
  return { height, along, angle: normal + Math.asin((before / after) * Math.sin(incidence)) };
}

/** Height at a place behind the lens. */
export const heightAt = (ray: MeridionalRay, along: number): number =>
  ray.height + (along - ray.along) * Math.tan(ray.angle);

/** 1/f = (n − 1)(1/R₁ − 1/R₂ + (n − 1)t/(n R₁ R₂)): Born & Wolf §4.4.3. */
export function focalLength(first: OpticalSurface, second: OpticalSurface, thickness: number, index: number): number {
  const [a, b] = [first, second].map(({ radius }) => (radius === null ? 0 : 1 / radius));
  return 1 / ((index - 1) * (a - b + ((index - 1) * thickness * a * b) / index));
}

/** From the last vertex to the focus: f(1 − (n − 1)t/(n R₁)). */
export function backFocus(first: OpticalSurface, second: OpticalSurface, thickness: number, index: number): number {
  const curvature = first.radius === null ? 0 : 1 / first.radius;
  return focalLength(first, second, thickness, index) * (1 - ((index - 1) * thickness * curvature) / index);
}
