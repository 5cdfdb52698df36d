/** Directions of light that a surface spreads. All write the direction into `ray` [3..5]. */
import { nextUnit } from '../numerics/random-stream.js';
import { SPREAD } from '../scene/scene-layout.js';

/** Draws are repeated until one leaves on the right side of the surface; past this many the unscattered direction is kept. */
const ATTEMPTS = 1000;

/** Cosine law about the unit normal g, on the side it points to. */
export function scatterLambertian(ray: Float64Array, gx: number, gy: number, gz: number, random: Int32Array): void {
  const r2 = nextUnit(random);
  const r = Math.sqrt(r2);
  const angle = 2 * Math.PI * nextUnit(random);
  tilt(ray, gx, gy, gz, r * Math.cos(angle), r * Math.sin(angle), Math.sqrt(1 - r2));
}

/**
 * Spreads the direction in `ray` about itself; it stays on the side of the surface that the unit normal g points to.
 * Gaussian: radiant intensity exp(−4 ln2 θ²/FWHM²), `width` the FWHM; top hat: even inside the half angle `width`.
 */
export function scatterAbout(
  ray: Float64Array,
  spread: number,
  width: number,
  gx: number,
  gy: number,
  gz: number,
  random: Int32Array,
): void {
  const dx = ray[3];
  const dy = ray[4];
  const dz = ray[5];
  for (let attempt = 0; attempt < ATTEMPTS; attempt++) {
    const angle = spread === SPREAD.gaussian ? gaussianPolar(width, random) : topHatPolar(width, random);
    const turn = 2 * Math.PI * nextUnit(random);
    const s = Math.sin(angle);
    tilt(ray, dx, dy, dz, s * Math.cos(turn), s * Math.sin(turn), Math.cos(angle));
    if (ray[3] * gx + ray[4] * gy + ray[5] * gz > 0) return;
  }
  ray[3] = dx;
  ray[4] = dy;
  ray[5] = dz;
}

/**
 * As `scatterAbout` with two widths: Gaussian exp(−4 ln2 (θ_u²/U² + θ_v²/V²)), U and V the full widths; top hat: even inside the ellipse of
 * half angles U and V. (θ_u, θ_v) is the polar angle about the direction in `ray`, cut up along v, which is `axes` [axis…] seen along that
 * direction, and u across it.
 */
export function scatterOval(
  ray: Float64Array,
  topHat: boolean,
  widthU: number,
  widthV: number,
  axes: Float64Array,
  axis: number,
  gx: number,
  gy: number,
  gz: number,
  random: Int32Array,
): void {
  const dx = ray[3];
  const dy = ray[4];
  const dz = ray[5];
  let [vx, vy, vz] = axes.subarray(axis, axis + 3);
  const along = vx * dx + vy * dy + vz * dz;
  vx -= along * dx;
  vy -= along * dy;
  vz -= along * dz;
  const length = Math.sqrt(vx * vx + vy * vy + vz * vz);
  if (length < 1e-9) {
    // Along v itself there is no u: any frame will do.
    tilt(ray, dx, dy, dz, 1, 0, 0);
    [vx, vy, vz] = ray.subarray(3, 6);
  } else {
    vx /= length;
    vy /= length;
    vz /= length;
  }
  const ux = vy * dz - vz * dy;
  const uy = vz * dx - vx * dz;
  const uz = vx * dy - vy * dx;
  for (let attempt = 0; attempt < ATTEMPTS; attempt++) {
    // A pair in the disc, or of normal variates (Box and Muller, Ann. Math. Stat. 29 610 (1958)).
    const unit = nextUnit(random);
    const radius = topHat ? Math.sqrt(unit) : Math.sqrt(-Math.log(unit) / (4 * Math.LN2));
    const turn = 2 * Math.PI * nextUnit(random);
    const angleU = widthU * radius * Math.cos(turn);
    const angleV = widthV * radius * Math.sin(turn);
    const angle = Math.sqrt(angleU * angleU + angleV * angleV);
    // Even per angle, thinned to even per solid angle.
    if (angle >= Math.PI || nextUnit(random) * angle > Math.sin(angle)) continue;
    const perAngle = angle > 0 ? Math.sin(angle) / angle : 1;
    const a = angleU * perAngle;
    const b = angleV * perAngle;
    const c = Math.cos(angle);
    const x = a * ux + b * vx + c * dx;
    const y = a * uy + b * vy + c * dy;
    const z = a * uz + b * vz + c * dz;
    if (x * gx + y * gy + z * gz <= 0) continue;
    const norm = 1 / Math.sqrt(x * x + y * y + z * z);
    ray[3] = x * norm;
    ray[4] = y * norm;
    ray[5] = z * norm;
    return;
  }
  ray[3] = dx;
  ray[4] = dy;
  ray[5] = dz;
}

/** Density exp(−4 ln2 θ²/FWHM²)·sin θ: Rayleigh draws thinned by sin θ/θ. */
function gaussianPolar(fwhm: number, random: Int32Array): number {
  const sigma = fwhm / (2 * Math.sqrt(2 * Math.LN2));
  for (;;) {
    const angle = sigma * Math.sqrt(-2 * Math.log(nextUnit(random)));
    if (angle < Math.PI && nextUnit(random) * angle <= Math.sin(angle)) return angle;
  }
}

function topHatPolar(half: number, random: Int32Array): number {
  return Math.acos(1 - nextUnit(random) * (1 - Math.cos(half)));
}

/** Direction a·s + b·t + c·w about the unit vector w (Duff et al., J. Comput. Graph. Tech. 6 1 (2017): frame without branches). */
function tilt(ray: Float64Array, wx: number, wy: number, wz: number, a: number, b: number, c: number): void {
  const sign = wz >= 0 ? 1 : -1;
  const p = -1 / (sign + wz);
  const q = wx * wy * p;
  const x = a * (1 + sign * wx * wx * p) + b * q + c * wx;
  const y = a * sign * q + b * (sign + wy * wy * p) + c * wy;
  const z = -a * sign * wx - b * wy + c * wz;
  const norm = 1 / Math.sqrt(x * x + y * y + z * z);
  ray[3] = x * norm;
  ray[4] = y * norm;
  ray[5] = z * norm;
}
