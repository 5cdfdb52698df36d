/** Dyes given in the design itself. */
import { mirrorImage } from '../materials/mirror-image.js';
import { naturalLifetime } from '../materials/natural-lifetime.js';
import type { QuenchingLaw } from '../materials/self-quenching.js';
import type { Curve } from '../units/curve.js';
import type { DissolvedDye, EmissionDescription, GivenConstant } from './description.js';
import type { Dye } from './dye.js';
import type { Named } from './form-record.js';
import type { DyeRecord, EmissionEntry, ExtinctionEntry } from './media-fields.js';
import { readEmission, readExtinction } from './own-spectra.js';
import { checkAscending, pointCurve } from './point-curve.js';
import type { Reading } from './reading.js';
import type { SpectralRows } from './spectral-form.js';
import type { QuenchingRecord } from './spectrum-fields.js';

const NOWHERE: Curve = () => Number.NaN;

export function describeOwnDye({ name, path, value }: Named<DyeRecord>, reading: Reading): Dye {
  const { extinction, absorption, emission } = value;
  checkAscending(absorption ?? [], [...path, 'absorption'], reading);
  const read = extinction === null ? null : ownExtinction(extinction, name, [...path, 'extinction'], reading);
  const dye: Dye = {
    extinction: read?.curve ?? null,
    absorption: absorption && pointCurve(absorption, 'hold'),
    emission: ownEmission(emission, [...path, 'emission'], reading),
    quantumYield: value.yield,
    lifetimeNs: value.lifetime,
    molarMassGPerMol: value['molar-mass'],
    forms: [],
    quenching: value.quenching === null ? null : ownQuenching(value.quenching),
    temperature: null,
    bleachYield: ownConstant(value['bleach-yield']),
    triplet: ownTriplet(value, path, reading) ?? null,
    notes: read?.notes ?? [],
  };
  if (read !== null && read.rangeNm !== null) checkSense(dye, read.curve, read.rangeNm, path, reading);
  return dye;
}

interface Extinction {
  readonly curve: Curve;
  readonly rangeNm: readonly [number, number] | null;
  readonly notes: readonly string[];
}

function ownExtinction(
  entry: ExtinctionEntry,
  name: string,
  path: Named<unknown>['path'],
  reading: Reading,
): Extinction {
  if (entry.kind === 'file') {
    return readExtinction(entry.fields, name, reading) ?? { curve: NOWHERE, rangeNm: null, notes: [] };
  }
  checkAscending(entry.rows, path, reading);
  return { curve: pointCurve(entry.rows, 'hold'), rangeNm: rangeOf(entry.rows), notes: [] };
}

/** A list of a few corners is a sketch, of which no lifetime can be asked. */
const SKETCH_ROWS = 8;

function rangeOf(rows: SpectralRows): readonly [number, number] | null {
  const [first, last] = [rows[0]?.[0] ?? null, rows[rows.length - 1]?.[0] ?? null];
  return rows.length < SKETCH_ROWS || first === null || last === null || !(last > first) ? null : [first, last];
}

function ownEmission(entry: EmissionEntry, path: Named<unknown>['path'], reading: Reading): EmissionDescription {
  if (entry.kind === 'file') {
    return readEmission(entry.fields, reading) ?? { kind: 'line', wavelengthNm: Number.NaN };
  }
  const { rows } = entry;
  checkAscending(rows, path, reading);
  if (rows.length > 1 && rows.every(([, photons]) => photons === 0)) {
    const problem = 'the emission is zero at every wavelength';
    reading.report({ code: 'range', path, problem, expected: 'some photons per nm above 0' });
  }
  const [from, to] = [rows[0]?.[0] ?? Number.NaN, rows[rows.length - 1]?.[0] ?? Number.NaN];
  if (rows.length === 1) return { kind: 'line', wavelengthNm: from };
  return { kind: 'spectrum', photonsPerNm: pointCurve(rows, 'zero'), fromNm: from, toNm: to };
}

function ownQuenching(fields: QuenchingRecord): Dye['quenching'] {
  const { 'half-at': half, 'stern-volmer': constant, perrin, 'transfer-radius': radius, pairing } = fields;
  const law: QuenchingLaw =
    half !== null
      ? { kind: 'half-strength', half }
      : constant !== null
        ? { kind: 'stern-volmer', constant }
        : perrin !== null
          ? { kind: 'perrin', critical: perrin }
          : {
              kind: 'transfer-to-dimers',
              radiusNm: radius ?? Number.NaN,
              dimerRadiusNm: radius ?? Number.NaN,
              pairing,
            };
  return { law, most: Number.POSITIVE_INFINITY, source: 'constants of the design' };
}

/** Index at which the lifetime is worked out: it goes as 1/n², which the allowed factor covers for other liquids. */
const USUAL_INDEX = 1.36;
const LIFETIME_FACTOR = 2;
/** All dyes of the library are above 0.95. */
const LEAST_LIKENESS = 0.75;

/** Warns where spectra, yield and lifetime do not fit each other. */
function checkSense(
  { emission, quantumYield, lifetimeNs }: Dye,
  extinction: Curve,
  range: readonly [number, number],
  path: Named<unknown>['path'],
  reading: Reading,
): void {
  if (emission.kind === 'line' || Number.isNaN(quantumYield)) return;
  const emitted = [emission.fromNm, emission.toNm] as const;
  const caution = (problem: string, found: string, expected: string, field: string) =>
    reading.report({ code: 'caution', severity: 'warning', path: [...path, field], problem, found, expected });
  const natural = naturalLifetime(extinction, emission.photonsPerNm, emitted, range, USUAL_INDEX);
  if (lifetimeNs !== null && natural !== null && quantumYield > 0) {
    const ratio = lifetimeNs / (natural * quantumYield);
    if (ratio > LIFETIME_FACTOR || ratio < 1 / LIFETIME_FACTOR) {
      const words = `${Number((natural * quantumYield).toPrecision(2))} ns from the spectra (Strickler & Berg)`;
      caution(
        'lifetime, yield and spectra of this dye do not fit each other',
        `${lifetimeNs} ns`,
        `about ${words}`,
        'lifetime',
      );
    }
  }
  const image = mirrorImage(extinction, emission.photonsPerNm, emitted, range);
  if (image === null) return;
  if (image.shiftPerCm < 0) {
    const found = `the emission peaks ${Math.round(-image.shiftPerCm)} cm⁻¹ to the blue of the absorption`;
    caution(
      'this dye would emit bluer light than it absorbs',
      found,
      'emission to the red of the absorption',
      'emission',
    );
  } else if (image.likeness < LEAST_LIKENESS) {
    const found = `likeness ${image.likeness.toFixed(2)}`;
    caution(
      'the emission is no mirror image of the absorption band',
      found,
      `${LEAST_LIKENESS} or more, as of most dyes`,
      'emission',
    );
  }
}

const ownConstant = (value: number | null): GivenConstant | null =>
  value === null ? null : { value, low: value, high: value, origin: 'as given in the design' };

function ownTriplet(value: DyeRecord, path: Named<unknown>['path'], reading: Reading): DissolvedDye['triplet'] {
  const [share, lifetime] = [value['triplet-yield'], value['triplet-lifetime']];
  const [given, missing] =
    share === null ? ['triplet-lifetime', 'triplet-yield'] : ['triplet-yield', 'triplet-lifetime'];
  if ((share === null) !== (lifetime === null)) {
    const problem = `${given} says nothing without ${missing}`;
    reading.report({ code: 'missing', path: [...path, given], problem, expected: `both, or neither` });
  }
  if (share !== null && value.yield + share > 1) {
    const problem = 'more excitations end as light and in the triplet than there are';
    const found = `yield ${value.yield} and triplet yield ${share}`;
    reading.report({
      code: 'range',
      path: [...path, 'triplet-yield'],
      problem,
      found,
      expected: 'a sum of 100 % or less',
    });
  }
  const [yields, lasts] = [ownConstant(share), ownConstant(lifetime)];
  return yields && lasts && { yield: yields, lifetimeNs: lasts };
}
