/**
 * Share of parallel light that gets through a narrowing wedge of perfect mirrors, in the plane across its walls: unfolded about the apex, the
 * images of the narrow end are the sides of a regular polygon, and a ray passes if its straight line meets one of them (Williamson,
 * J. Opt. Soc. Am. 42 712, 1952). Shares nothing with the tracer.
 */

const LINES = 20_000;

/**
 * @param narrow half width of the narrow end
 * @param wide half width of the wide end, which the light fills evenly
 * @param height between the ends
 * @param angle of the light from the axis, rad
 */
export function throughWedge(narrow: number, wide: number, height: number, angle: number): number {
  const halfApex = Math.atan((wide - narrow) / height);
  const [nearEnd, farEnd] = [narrow / Math.tan(halfApex), wide / Math.tan(halfApex)];
  const [dx, dz] = [Math.sin(angle), -Math.cos(angle)];
  let passed = 0;
  for (let i = 0; i < LINES; i++) {
    const x = wide * ((2 * (i + 0.5)) / LINES - 1);
    if (meetsAnImage(x, farEnd, dx, dz, nearEnd, narrow, halfApex)) passed++;
  }
  return passed / LINES;
}

/** Image k of the narrow end is turned about the apex by twice the half angle of the wedge, k times over. */
function meetsAnImage(
  x: number,
  z: number,
  dx: number,
  dz: number,
  near: number,
  narrow: number,
  half: number,
): boolean {
  const images = Math.floor(Math.PI / (2 * half));
  for (let k = -images; k <= images; k++) {
    const [c, s] = [Math.cos(2 * k * half), Math.sin(2 * k * half)];
    // Seen in the frame of the image, its end lies at height `near`.
    const [px, pz] = [c * x - s * z, s * x + c * z];
    const [ux, uz] = [c * dx - s * dz, s * dx + c * dz];
    const t = (near - pz) / uz;
    if (t > 0 && Math.abs(px + t * ux) <= narrow) return true;
  }
  return false;
}
