/** How bright a pump is: what its light fills in place, direction and wavelength. */
import type { BeamDescription, Outline, PumpDescription } from '../design/description.js';

/** FWHM over standard deviation of a Gaussian. */
const FWHM_PER_SIGMA = 2 * Math.sqrt(2 * Math.log(2));
/** Effective width (∫f)²/∫f² of a Gaussian over its standard deviation. */
const WIDTH_PER_SIGMA = 2 * Math.sqrt(Math.PI);

/**
 * Étendue of a pump in air, mm² sr: area times effective solid angle, both as (∫f)²/∫f² of Gaussian profiles. A bank counts with
 * its pitch as if its emitters touched, which is more than they fill: its brightness is then understated and a bound from it stricter.
 * @returns null for ray files, of which nothing but rays is known
 */
export function pumpEtendue(beam: BeamDescription): number | null {
  switch (beam.kind) {
    case 'lambertian':
      return Math.PI * outlineArea(beam.outline);
    case 'patch':
      return outlineArea(beam.outline) * solidAngle(beam);
    case 'gaussian':
      // Profile exp(−2 r²/w²): standard deviation w/2, effective area π w²; the same in angle.
      return Math.PI * beam.radius ** 2 * Math.min(Math.PI, Math.PI * beam.halfAngle ** 2);
    case 'diodes':
      return beam.across * beam.along * (beam.stack?.rows ?? 1) * beam.pitch[0] * beam.pitch[1] * solidAngle(beam);
    case 'rays':
      return null;
  }
}

function outlineArea(outline: Outline): number {
  return outline.kind === 'disc' ? Math.PI * outline.radius ** 2 : outline.size[0] * outline.size[1];
}

type Divergent = Extract<BeamDescription, { kind: 'patch' | 'diodes' }>;

/** sr; no more than a half space holds. */
function solidAngle({ divergence, farField }: Divergent): number {
  const [u, v] = farField
    ? [farField.u, farField.v].map((cut) => effectiveWidth(farField.anglesRad, cut))
    : divergence.map((fwhm) => (WIDTH_PER_SIGMA * fwhm) / FWHM_PER_SIGMA);
  return Math.min(Math.PI, u * v);
}

/** Effective width of a pump's spectrum, nm; 0 for a line. */
export function pumpBandwidth({ linewidthNm, spectrum, beam }: PumpDescription): number {
  if (spectrum) {
    const steps = 400;
    const nm = Array.from(
      { length: steps + 1 },
      (_, i) => spectrum.fromNm + (i / steps) * (spectrum.toNm - spectrum.fromNm),
    );
    return effectiveWidth(nm, nm.map(spectrum.photonsPerNm));
  }
  if (beam.kind === 'rays' && beam.rays.wavelengthNm !== null) return 0;
  return (WIDTH_PER_SIGMA * linewidthNm) / FWHM_PER_SIGMA;
}

/** (∫f)²/∫f² of values joined by straight lines. */
function effectiveWidth(at: readonly number[], values: readonly number[]): number {
  let sum = 0;
  let squares = 0;
  for (let i = 1; i < at.length; i++) {
    const step = at[i] - at[i - 1];
    const [a, b] = [values[i - 1], values[i]];
    sum += (step * (a + b)) / 2;
    squares += (step * (a * a + a * b + b * b)) / 3;
  }
  return squares > 0 ? sum ** 2 / squares : 0;
}
