/** Dyes of the design and of the library -> what a medium holds of them. */
import { dyeNames, dyeSolvents, type RangedConstant, readDye, readPhotostability } from '../materials/library.js';
import type { Curve } from '../units/curve.js';
import type { DissolvedDye, EmissionDescription, GivenConstant } from './description.js';
import type { Named } from './form-record.js';
import type { DyeRecord, DyeStrength } from './media-fields.js';
import { checkReference } from './names.js';
import { nearestSolvent } from './nearest-solvent.js';
import { checkAscending, pointCurve } from './point-curve.js';
import type { Reading } from './reading.js';

/** A dye before it is given a strength. */
export interface Dye {
  /** Decadic molar extinction, L/(mol cm), or Napierian absorption at strength 1, 1/mm. */
  readonly extinction: Curve | null;
  readonly absorption: Curve | null;
  readonly emission: EmissionDescription;
  readonly quantumYield: number;
  readonly lifetimeNs: number | null;
  readonly molarMassGPerMol: number | null;
  readonly bleachYield: GivenConstant | null;
  readonly triplet: DissolvedDye['triplet'];
}

export function describeOwnDye({ path, value }: Named<DyeRecord>, reading: Reading): Dye {
  const { extinction, absorption, emission } = value;
  checkAscending(extinction ?? absorption ?? [], [...path, extinction === null ? 'absorption' : 'extinction'], reading);
  checkAscending(emission, [...path, 'emission'], reading);
  if (emission.length > 1 && emission.every(([, photons]) => photons === 0)) {
    const problem = 'the emission is zero at every wavelength';
    reading.report({ code: 'range', path: [...path, 'emission'], problem, expected: 'some photons per nm above 0' });
  }
  return {
    extinction: extinction && pointCurve(extinction, 'hold'),
    absorption: absorption && pointCurve(absorption, 'hold'),
    emission: describeEmission(emission),
    quantumYield: value.yield,
    lifetimeNs: value.lifetime,
    molarMassGPerMol: value['molar-mass'],
    bleachYield: ownConstant(value['bleach-yield']),
    triplet: ownTriplet(value, path, reading),
  };
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

function describeEmission(rows: DyeRecord['emission']): EmissionDescription {
  const [from, to] = [rows[0]?.[0] ?? Number.NaN, rows[rows.length - 1]?.[0] ?? Number.NaN];
  if (rows.length === 1) return { kind: 'line', wavelengthNm: from };
  return { kind: 'spectrum', photonsPerNm: pointCurve(rows, 'zero'), fromNm: from, toNm: to };
}

/** What the dye is dissolved in; `pH` only for solvents. */
export interface Host {
  readonly base: string;
  readonly pH: number | null;
}

/** The dye at its strength, or null after reporting why not. */
export function dissolveDye(
  { name, path, value: strength }: Named<DyeStrength>,
  ownDyes: ReadonlyMap<string, Dye>,
  host: Host,
  reading: Reading,
): DissolvedDye | null {
  const own = ownDyes.get(name);
  const names = [...ownDyes.keys(), ...dyeNames()];
  if (own === undefined && !checkReference({ name, path }, names, 'no dye has this name', reading, 'key')) return null;
  const dye = own ?? libraryDye(name, path, host, reading);
  const { emission, quantumYield, lifetimeNs, molarMassGPerMol, bleachYield, triplet = null } = dye;
  const given = { name, quantumYield, emission, lifetimeNs, molarMassGPerMol, bleachYield, triplet };
  if (dye.absorption !== null) {
    const { absorption } = dye;
    if (strength.kind !== 'number' && !Number.isNaN(strength.value)) {
      reportStrength('a plain factor, for the dye is given by its absorption', path, reading);
    }
    return { ...given, concentration: null, absorption: (nm) => absorption(nm) * strength.value };
  }
  const concentration = molarConcentration(strength, dye, path, reading);
  const { extinction } = dye;
  // 1 cm⁻¹ = 0.1 mm⁻¹; decadic to Napierian by ln 10.
  const scale = (Math.LN10 * concentration) / 10;
  return { ...given, concentration, absorption: (nm) => scale * (extinction?.(nm) ?? Number.NaN) };
}

function molarConcentration(strength: DyeStrength, dye: Dye, path: Named<unknown>['path'], reading: Reading): number {
  if (strength.kind === 'concentration') return strength.value;
  if (strength.kind === 'massConcentration') {
    if (dye.molarMassGPerMol !== null) return strength.value / dye.molarMassGPerMol;
    const problem = 'a strength in mass per volume needs the molar mass of the dye';
    reading.report({ code: 'missing', path, problem, expected: '`molar-mass` of the dye, or a strength in mol/L' });
  } else if (!Number.isNaN(strength.value)) {
    reportStrength('a concentration such as 0.2 mmol/L or 60 mg/L', path, reading);
  }
  return Number.NaN;
}

function reportStrength(expected: string, path: Named<unknown>['path'], reading: Reading): void {
  reading.report({ code: 'quantity', path, problem: 'the strength is of the wrong kind for this dye', expected });
}

function libraryDye(name: string, path: Named<unknown>['path'], { base, pH }: Host, reading: Reading): Dye {
  const measured = dyeSolvents(name);
  const solvent = measured.includes(base) ? base : nearestSolvent(base, measured);
  const data = readDye(name, solvent);
  if (solvent !== base) {
    const host = base === 'custom' ? 'a material of your own' : base;
    reading.report({
      code: 'caution',
      severity: 'warning',
      path,
      problem: `the library has no spectra of ${name} in ${host}; those in ${solvent} are used, peaks and yield may differ`,
      found: host,
      expected: measured.join(', '),
    });
  }
  if (data.pHRange !== null) cautionAboutPH(name, data.pHRange, pH, path, reading);
  return {
    extinction: data.extinction,
    absorption: null,
    emission: { kind: 'spectrum', ...data.emission },
    quantumYield: data.quantumYield,
    lifetimeNs: data.lifetimeNs,
    molarMassGPerMol: data.molarMassGPerMol,
    ...libraryStability(name, base),
  };
}

function libraryStability(name: string, solvent: string): Pick<Dye, 'bleachYield' | 'triplet'> {
  const { bleachYield, triplet } = readPhotostability(name, solvent);
  const given = ({ value, low, high, measuredIn, status }: RangedConstant): GivenConstant => ({
    value,
    low,
    high,
    origin: `of ${measuredIn}; ${status}`,
  });
  return {
    bleachYield: bleachYield && given(bleachYield),
    triplet: triplet && { yield: given(triplet.yield), lifetimeNs: given(triplet.lifetimeNs) },
  };
}

function cautionAboutPH(
  name: string,
  [low, high]: readonly [number, number],
  pH: number | null,
  path: Named<unknown>['path'],
  reading: Reading,
): void {
  // A pH that cannot be has been told already.
  if (pH !== null && (Number.isNaN(pH) || pH < 0 || pH > 14 || (pH >= low && pH <= high))) return;
  reading.report({
    code: 'caution',
    severity: 'warning',
    path,
    problem: `yield and spectra of ${name} are those of the form it has between pH ${low} and pH ${high}`,
    found: pH === null ? 'no pH' : `pH ${pH}`,
    expected: `pH ${low} to ${high}`,
  });
}
