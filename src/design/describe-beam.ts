/** What a pump sends out, as written -> beam and colour of the description. */
import type { BeamDescription, FarField, Outline, PumpSpectrum, Vector2 } from './description.js';
import type { DesignPath } from './fault.js';
import type { OutlineFields, PumpRecord } from './pump-fields.js';
import { farFieldTable, rayTable, spectrumTable } from './pump-tables.js';
import type { Reading } from './reading.js';

export function describeOutline({ rectangle, disc }: Pick<OutlineFields, 'rectangle' | 'disc'>): Outline {
  if (rectangle !== null) return { kind: 'rectangle', size: rectangle };
  return { kind: 'disc', radius: disc ?? Number.NaN };
}

/** null after reporting. */
export function describeBeam(pump: PumpRecord, path: DesignPath, reading: Reading): BeamDescription | null {
  const { diodes, patch, gaussian, lambertian, rays, lens, divergence } = pump;
  const misplace = (field: string, given: unknown, owner: string) => {
    if (given === null) return;
    const problem = `${field} belongs to ${owner}`;
    reading.report({ code: 'unknown-key', path: [...path, field], problem, found: field });
  };
  if (diodes === null) misplace('lens', lens, 'a bank of diodes');
  if (diodes === null && patch === null) {
    misplace('divergence', divergence, 'diodes or a patch');
    misplace('far-field', pump['far-field'], 'diodes or a patch');
    misplace('fast-axis', pump['fast-axis'], 'diodes or a patch');
  }
  if (divergence !== null) misplace('far-field', pump['far-field'], 'a pump without `divergence`');
  const farField = describeFarField(pump, path, reading);
  if (diodes !== null) {
    if (divergence === null && pump['far-field'] === null) {
      const expected = 'the far field [fast, slow] such as [30 deg, 8 deg], or far-field: FILE';
      const problem = 'a required field is missing';
      reading.report({ code: 'missing', path: [...path, 'divergence'], problem, expected });
    }
    const { across, along, pitch, stack, pointing } = diodes;
    return {
      kind: 'diodes',
      across,
      along,
      pitch,
      divergence: alongAxes(pump),
      farField,
      stack,
      pointing,
      lens: describeLens(lens, path, reading),
    };
  }
  if (patch !== null) {
    return { kind: 'patch', outline: describeOutline(patch), divergence: alongAxes(pump), farField };
  }
  if (gaussian !== null) return { kind: 'gaussian', radius: gaussian.radius, halfAngle: gaussian['half-angle'] };
  if (rays !== null) {
    const table = rayTable(rays, [...path, 'rays'], reading);
    return table && { kind: 'rays', rays: table };
  }
  return lambertian && { kind: 'lambertian', outline: describeOutline(lambertian) };
}

/** Colour of a pump: its line, or the photon mean of its spectrum or rays. null after reporting. */
export function describeColour(
  pump: PumpRecord,
  beam: BeamDescription,
  path: DesignPath,
  reading: Reading,
): { wavelengthNm: number; linewidthNm: number; spectrum: PumpSpectrum | null } | null {
  const { wavelength, spectrum: file, linewidth } = pump;
  const ownColours = beam.kind === 'rays' ? beam.rays.wavelengthNm : null;
  const given = [
    ...(wavelength === null ? [] : ['wavelength']),
    ...(file === null ? [] : ['spectrum']),
    ...(ownColours === null ? [] : ['the column wavelength_nm']),
  ];
  if (given.length !== 1) {
    const problem = given.length === 0 ? 'the pump has no wavelength' : 'the pump has its wavelength twice';
    const code = given.length === 0 ? 'missing' : 'unknown-key';
    const found = given.length === 0 ? {} : { found: given.join(' and ') };
    reading.report({ code, path, problem, ...found, expected: 'one of wavelength, spectrum' });
    return null;
  }
  if (wavelength !== null) return { wavelengthNm: wavelength, linewidthNm: linewidth, spectrum: null };
  if (linewidth !== 0) {
    const problem = 'linewidth belongs to a pump with `wavelength`';
    reading.report({ code: 'unknown-key', path: [...path, 'linewidth'], problem, found: 'linewidth' });
  }
  if (beam.kind === 'rays' && ownColours !== null) {
    return { wavelengthNm: photonMean(ownColours, beam.rays.watts), linewidthNm: 0, spectrum: null };
  }
  const spectrum = file === null ? null : spectrumTable(file, [...path, 'spectrum'], reading);
  return spectrum && { wavelengthNm: spectrum.meanNm, linewidthNm: 0, spectrum };
}

function photonMean(nm: readonly number[], watts: readonly number[]): number {
  const photons = watts.map((watt, i) => watt * nm[i]);
  const all = photons.reduce((a, b) => a + b, 0);
  return photons.reduce((sum, count, i) => sum + count * nm[i], 0) / all;
}

function describeFarField(pump: PumpRecord, path: DesignPath, reading: Reading): FarField | null {
  const file = pump['far-field'];
  if (file === null) return null;
  return farFieldTable(file, pump['fast-axis'] === 'across', [...path, 'far-field'], reading);
}

/** From [fast, slow] to [u (across), v (along)]. */
function alongAxes(pump: PumpRecord): Vector2 {
  const [fast, slow] = pump.divergence ?? [0, 0];
  return pump['fast-axis'] === 'across' ? [fast, slow] : [slow, fast];
}

function describeLens(lens: PumpRecord['lens'], path: DesignPath, reading: Reading) {
  if (lens === null) return null;
  if (lens['focal-length'] === 0) {
    const problem = 'a lens of focal length zero cannot be';
    const expected = 'a focal length above or below 0 mm';
    reading.report({ code: 'range', path: [...path, 'lens', 'focal-length'], problem, found: '0 mm', expected });
  }
  return { focalLength: lens['focal-length'], distance: lens.distance };
}
