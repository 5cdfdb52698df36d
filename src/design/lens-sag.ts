/** Depths of lens surfaces behind their vertices, for the design's checks and for the scene alike. */
import type { LensDescription, LensSurface } from './description.js';

export interface SideSags {
  /** Depth of the rim behind the vertex, towards the middle of the glass for what bulges; negative for what is hollow, mm. */
  readonly rim: number;
}

/** Depth at the distance ρ from the axis, mm, positive where the surface bulges; NaN where an ellipsoid has ended. */
export function surfaceSag(surface: LensSurface, distance: number): number {
  if (surface.kind === 'flat') return 0;
  const { radius, conic } = surface;
  const rest = radius ** 2 - (1 + conic) * distance ** 2;
  const root = rest < 0 && rest > -1e-12 * radius ** 2 ? 0 : Math.sqrt(rest);
  const sag = distance ** 2 / (radius + root);
  return surface.kind === 'bulges' ? sag : -sag;
}

/** Largest distance from the axis, or from the middle plane of a cylinder, at which the glass still is, mm. */
export function lensReach({ outline, profile }: Pick<LensDescription, 'outline' | 'profile'>): number {
  if (outline.kind === 'disc') return outline.radius;
  const [width, height] = outline.size;
  return profile === 'round' ? Math.hypot(width, height) / 2 : profile === 'upright' ? width / 2 : height / 2;
}

export function lensSags(lens: LensDescription): { readonly front: SideSags; readonly back: SideSags } {
  const reach = lensReach(lens);
  return { front: { rim: surfaceSag(lens.front, reach) }, back: { rim: surfaceSag(lens.back, reach) } };
}

/** Thinnest place between axis and rim, mm. */
export function leastThickness(lens: LensDescription): number {
  const reach = lensReach(lens);
  const steps = 200;
  let least = lens.thickness;
  for (let i = 1; i <= steps; i++) {
    const at = (reach * i) / steps;
    least = Math.min(least, lens.thickness - surfaceSag(lens.front, at) - surfaceSag(lens.back, at));
  }
  return least;
}
