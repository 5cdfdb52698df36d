/** Spectra from files beside the design -> extinction and emission, with what looks wrong told. */
import { linearCurve } from '../numerics/interpolate.js';
import { noiseOf, redBaseline } from '../numerics/red-baseline.js';
import type { Curve } from '../units/curve.js';
import type { EmissionDescription } from './description.js';
import type { DesignPath } from './fault.js';
import { type FileSpectrum, readSpectrum, type SpectrumValues } from './read-spectrum.js';
import type { Reading } from './reading.js';
import { EMISSION_VALUES, type EmissionFile, type EmissionValues, type ExtinctionFile } from './spectrum-fields.js';

export interface OwnExtinction {
  /** Decadic, L/(mol cm). */
  readonly curve: Curve;
  readonly rangeNm: readonly [number, number];
  /** What was done to the file's values, for people to read. */
  readonly notes: readonly string[];
}

/** Values below zero by more than this many standard deviations of the noise, and this share of the peak, are no noise. */
const NOISE_DEVIATIONS = 4;
const NOISE_SHARE = 0.005;
/** The tail begins where the band has fallen to this share of its peak. */
const TAIL_SHARE = 0.01;
/** kT at 25 °C, 1/cm: the e-fold of a thermal tail (Kennard and Stepanov's relation, from memory). */
const THERMAL_PER_CM = 207;

export function readExtinction(fields: ExtinctionFile, dye: string, reading: Reading): OwnExtinction | null {
  const path = [...fields.path, 'file'];
  const spectrum = readSpectrum(fields.file, path, reading);
  if (spectrum === null) return null;
  const decadic = molarExtinction(spectrum, fields, reading);
  if (decadic === null || !withinNoise(spectrum, decadic)) return null;
  const { nm } = spectrum;
  const rangeNm = [nm[0], nm[nm.length - 1]] as const;
  const found = redBaseline(nm, decadic);
  if (found === null) return { curve: extinctionCurve(nm, decadic), rangeNm, notes: [] };
  const level = `${Number(found.level.toPrecision(3))} L/(mol cm)`;
  const share = `${((100 * found.level) / Math.max(...decadic)).toPrecision(2)} % of the peak`;
  if (fields.baseline === 'subtract') {
    const values = decadic.map((value) => value - found.level);
    const notes = [
      `${dye}: an instrument baseline of ${level} (${share}) is taken off, and the red tail falls by e in 207 cm⁻¹ (kT)`,
    ];
    return { curve: thermalTail(nm, values), rangeNm, notes };
  }
  if (fields.baseline === null) {
    const perMm = (Math.LN10 * 1e-3 * found.level) / 10;
    reading.report({
      code: 'caution',
      severity: 'warning',
      path,
      problem:
        'the red end of this spectrum is flat instead of zero: an instrument baseline, which will count as absorption of the emitted light',
      found: `${level}, ${share}, from ${Math.round(found.fromNm)} nm on; ${Number(perMm.toPrecision(2))} /mm at 1 mmol/L`,
      expected: 'a tail that falls to zero',
      suggestion: 'say baseline: subtract, or baseline: keep',
    });
  }
  return { curve: extinctionCurve(nm, decadic), rangeNm, notes: [] };
}

const extinctionCurve = (nm: readonly number[], values: readonly number[]): Curve =>
  linearCurve(
    nm,
    values.map((value) => Math.max(0, value)),
    { below: 'hold', above: 'zero' },
  );

/** Beyond the point where the red edge comes below a share of the peak, the curve falls on by e in kT, in wavenumber. */
function thermalTail(nm: readonly number[], values: readonly number[]): Curve {
  const peak = Math.max(...values);
  const from = nm.findIndex((_, i) => i > values.indexOf(peak) && values[i] < TAIL_SHARE * peak);
  const curve = extinctionCurve(nm, values);
  if (from < 0) return curve;
  const [start, height] = [nm[from - 1], Math.max(0, values[from - 1])];
  return (x) => (x <= start ? curve(x) : height * Math.exp(-(1e7 / start - 1e7 / x) / THERMAL_PER_CM));
}

function molarExtinction(spectrum: FileSpectrum, fields: ExtinctionFile, reading: Reading): number[] | null {
  const { values, what, stated, lines, complain } = spectrum;
  if (what === 'extinction') return [...values];
  if (what !== 'absorbance' && what !== 'transmittance') {
    const problem = 'these values are not an absorption';
    complain(lines[0], {
      code: 'quantity',
      problem,
      found: stated,
      expected: 'extinction_L_per_mol_cm, absorbance or transmittance',
    });
    return null;
  }
  const { concentration, cuvette: length } = fields;
  for (const [name, value] of [
    ['concentration', concentration],
    ['cuvette', length],
  ] as const) {
    if (value !== null) continue;
    const problem = `${what} becomes a molar extinction only with the concentration and the path it was measured at`;
    reading.report({ code: 'missing', path: fields.path, problem, found: `no ${name}`, expected: `\`${name}\`` });
  }
  if (concentration === null || length === null) return null;
  const blocked = what === 'transmittance' ? values.findIndex((value) => !(value > 0)) : -1;
  if (blocked >= 0) {
    const problem = 'a transmittance of zero or less has no absorbance';
    complain(lines[blocked], { code: 'range', problem, found: `${values[blocked]} at ${spectrum.nm[blocked]} nm` });
    return null;
  }
  const perAbsorbance = 1 / (concentration * (length / 10));
  return values.map((value) => (what === 'absorbance' ? value : -Math.log10(value)) * perAbsorbance);
}

/** False after reporting values so far below zero that noise cannot be the reason. */
function withinNoise({ nm, lines, complain }: FileSpectrum, values: readonly number[]): boolean {
  const peak = Math.max(...values);
  if (!(peak > 0)) {
    complain(lines[0], { code: 'range', problem: 'the spectrum is nowhere above zero', expected: 'a peak' });
    return false;
  }
  const limit = -Math.max(NOISE_DEVIATIONS * noiseOf(values), NOISE_SHARE * peak);
  const worst = values.reduce((least, value, i) => (value < values[least] ? i : least), 0);
  if (values[worst] >= limit) return true;
  complain(lines[worst], {
    code: 'range',
    problem: 'the spectrum goes below zero by more than its noise',
    found: `${((100 * values[worst]) / peak).toPrecision(3)} % of the peak at ${Number(nm[worst].toPrecision(5))} nm`,
    expected: `at least ${((100 * limit) / peak).toPrecision(2)} % of the peak`,
    suggestion: 'a blank measured anew, or the range cut to where the dye absorbs',
  });
  return false;
}

const isEmission = (what: SpectrumValues | null): what is EmissionValues =>
  EMISSION_VALUES.some((each) => each === what);

export function readEmission(fields: EmissionFile, reading: Reading): EmissionDescription | null {
  const path: DesignPath = [...fields.path, 'file'];
  const spectrum = readSpectrum(fields.file, path, reading);
  if (spectrum === null) return null;
  const { nm, values, lines, complain } = spectrum;
  const stated = isEmission(spectrum.what) ? spectrum.what : null;
  if (spectrum.what !== null && stated === null) {
    complain(lines[0], {
      code: 'quantity',
      problem: 'these values are not an emission',
      found: spectrum.stated,
      expected: 'an emission',
    });
    return null;
  }
  if (stated !== null && fields.values !== null && stated !== fields.values) {
    const problem = 'the design and the file say different things of the values';
    complain(lines[0], {
      code: 'quantity',
      problem,
      found: `${stated} in the file`,
      expected: `${fields.values}, as in the design`,
    });
    return null;
  }
  const what = stated ?? fields.values;
  if (what === null) {
    const problem = 'it is not said what the values of the emission are: photons or energy, per nm or per wavenumber';
    reading.report({
      code: 'quantity',
      path: fields.path,
      problem,
      found: spectrum.stated,
      expected: `\`values\`: ${EMISSION_VALUES.join(', ')}`,
    });
    return null;
  }
  if (!withinNoise(spectrum, values)) return null;
  const photons = values.map((value, i) => Math.max(0, value) * photonsPerNm(what, nm[i]));
  const top = Math.max(...photons);
  const curve = linearCurve(
    nm,
    photons.map((value) => value / top),
    { below: 'zero', above: 'zero' },
  );
  return { kind: 'spectrum', photonsPerNm: curve, fromNm: nm[0], toNm: nm[nm.length - 1] };
}

/** Factor to photons per nm, but for a constant: a photon's energy goes as 1/λ, a step of wavenumber as dλ/λ². */
function photonsPerNm(what: EmissionValues, nm: number): number {
  switch (what) {
    case 'photons-per-nm':
      return 1;
    case 'energy-per-nm':
      return nm;
    case 'photons-per-wavenumber':
      return 1 / (nm * nm);
    case 'energy-per-wavenumber':
      return 1 / nm;
  }
}
