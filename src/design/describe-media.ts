/** Media as written -> media with curves; library materials are added under their own names where they are used. */
import {
  gasNames,
  type MaterialData,
  readGas,
  readSolid,
  readSolvent,
  solidNames,
  solventNames,
} from '../materials/library.js';
import { dissolveDye } from './describe-dyes.js';
import { describeScatterer } from './describe-scatterers.js';
import type { MediumDescription } from './description.js';
import type { DesignRecord } from './design-fields.js';
import type { Dye, Host } from './dye.js';
import type { DesignPath } from './fault.js';
import type { Named } from './form-record.js';
import type { Reference } from './form-scalars.js';
import type { MediumEntry, MediumRecord } from './media-fields.js';
import { mixSolvents } from './mix-solvents.js';
import { checkReference } from './names.js';
import { describeOwnDye } from './own-dye.js';
import { checkAscending, pointCurve } from './point-curve.js';
import type { Reading } from './reading.js';

type Base = Omit<MediumDescription, 'name' | 'path' | 'dyes' | 'scatterers'>;

/** All media of the design, and the library materials that parts and surroundings name directly. */
export function describeMedia(design: DesignRecord, reading: Reading): Map<string, MediumDescription> {
  const dyes = new Map(design.dyes.map((entry) => [entry.name, describeOwnDye(entry, reading)]));
  const media = new Map<string, MediumDescription>();
  for (const entry of design.media) {
    const medium = describeMedium(entry, dyes, reading);
    if (medium !== null) media.set(entry.name, medium);
  }
  const declared = design.media.map(({ name }) => name);
  const used = [...design.parts.map(({ value }) => value.medium), design.surroundings];
  for (const medium of used) {
    if (declared.includes(medium.name)) continue;
    const names = [...declared, ...libraryNames()];
    const problem = 'no medium of the design and no material of the library has this name';
    if (!checkReference(medium, names, problem, reading)) continue;
    const base = libraryMaterial(medium.name);
    if (base !== null)
      media.set(medium.name, { name: medium.name, path: medium.path, ...base, dyes: [], scatterers: [] });
  }
  return media;
}

const libraryNames = (): string[] => [...solventNames(), ...solidNames(), ...gasNames()];

function libraryMaterial(name: string): Base | null {
  if (solventNames().includes(name)) return fromLibrary(readSolvent(name));
  if (solidNames().includes(name)) return fromLibrary(readSolid(name));
  if (gasNames().includes(name)) return fromLibrary(readGas(name));
  return null;
}

const fromLibrary = ({ name, kind, index, absorption, thermal }: MaterialData): Base => ({
  kind,
  base: name,
  index,
  absorption,
  thermal,
});

function describeMedium(
  { name, path, value }: Named<MediumEntry>,
  ownDyes: ReadonlyMap<string, Dye>,
  reading: Reading,
): MediumDescription | null {
  if (value.kind === 'library') {
    if (!checkReference(value.material, libraryNames(), 'no material of the library has this name', reading))
      return null;
    const base = libraryMaterial(value.material.name);
    return base && { name, path, ...base, dyes: [], scatterers: [] };
  }
  const { fields } = value;
  const base = describeBase(fields, path, reading);
  // The dyes are looked at even when the base is unknown, so that all faults come at once.
  const host = hostOf(base, fields);
  const dissolved = fields.dyes.map((dye) => dissolveDye(dye, ownDyes, host, reading));
  const hostDensity = base?.thermal?.densityKgPerM3 ?? null;
  const scatterers = fields.scatterers.flatMap((entry) => describeScatterer(entry, hostDensity, reading) ?? []);
  const { reservoir } = fields;
  if (base && reservoir !== null && base.kind !== 'liquid') reportMisplaced('reservoir', 'a liquid', path, reading);
  if (base === null) return null;
  const notes = [...(base.notes ?? []), ...dissolved.flatMap((one) => one.notes)];
  return {
    name,
    path,
    ...base,
    dyes: dissolved.flatMap(({ dyes }) => dyes),
    scatterers,
    reservoirMm3: reservoir,
    ...(notes.length === 0 ? {} : { notes }),
    ...(fields.quenching === 'off' ? { quenching: 'off' } : {}),
  };
}

const KELVIN = 273.15;
const celsius = ({ temperature }: MediumRecord): number | null => (temperature === null ? null : temperature - KELVIN);

function hostOf(base: Base | null, fields: MediumRecord): Host {
  const most = base?.mixture?.reduce((a, b) => (b.share > a.share ? b : a));
  const name = most?.solvent ?? base?.base ?? 'custom';
  return {
    base: name,
    words: base?.mixture !== undefined ? base.base : name === 'custom' ? 'a material of your own' : name,
    pure: base?.mixture === undefined,
    kind: base?.kind ?? 'liquid',
    pH: fields.pH,
    temperatureC: celsius(fields),
    quenching: fields.quenching === 'on',
  };
}

function describeBase(fields: MediumRecord, path: DesignPath, reading: Reading): Base | null {
  const { solvent, solid, index, kind, pH, absorption } = fields;
  checkAscending(absorption ?? [], [...path, 'absorption'], reading);
  if (pH !== null && solvent === null && index === null) reportMisplaced('pH', 'a solvent', path, reading);
  if (kind !== null && index === null) reportMisplaced('kind', 'a material given by its index', path, reading);
  if (index !== null) {
    checkAscending(index, [...path, 'index'], reading);
    return {
      kind: kind ?? 'liquid',
      base: 'custom',
      index: pointCurve(index, 'hold'),
      absorption: absorption === null ? () => 0 : pointCurve(absorption, 'hold'),
      thermal: null,
    };
  }
  const celsiusNow = celsius(fields);
  const base =
    solvent === null
      ? named(solid, reading)
      : solvent.kind === 'one'
        ? describeSolvent(solvent.one, celsiusNow, reading)
        : describeMixture(solvent.shares, celsiusNow, [...path, 'solvent'], reading);
  if (base?.thermal?.boilingPointC != null && celsiusNow !== null && celsiusNow >= base.thermal.boilingPointC) {
    const found = `${Number(celsiusNow.toPrecision(4))} °C`;
    const expected = `below ${base.thermal.boilingPointC} °C, where ${base.base} boils at 101.325 kPa`;
    reading.report({
      code: 'range',
      path: [...path, 'temperature'],
      problem: 'the liquid would boil',
      found,
      expected,
    });
  }
  return base && { ...base, ...(absorption === null ? {} : { absorption: pointCurve(absorption, 'hold') }) };
}

function named(material: Reference | null, reading: Reading): Base | null {
  if (material === null) return null;
  if (!checkReference(material, solidNames(), 'no solid of the library has this name', reading)) return null;
  return libraryMaterial(material.name);
}

const knownSolvent = (solvent: Reference, reading: Reading, at?: 'key'): boolean =>
  checkReference(solvent, solventNames(), 'no solvent of the library has this name', reading, at);

function describeSolvent(solvent: Reference, temperatureC: number | null, reading: Reading): Base | null {
  if (!knownSolvent(solvent, reading)) return null;
  const warm = solventAt(solvent.name, temperatureC);
  const cold = warm.thermal?.indexPerKelvin ?? null;
  const notes =
    temperatureC !== null && cold === null
      ? [`${solvent.name}: index taken as near 25 °C, its change is not held`]
      : [];
  return { ...fromLibrary(warm), ...(notes.length === 0 ? {} : { notes }) };
}

/** Where library data hold, °C. */
const DATA_C = 25;

/** A solvent at a temperature: its index moves by dn/dT, and heating starts from there; all else stays as at 25 °C. */
function solventAt(name: string, temperatureC: number | null): MaterialData {
  const data = readSolvent(name);
  if (temperatureC === null || !Number.isFinite(temperatureC)) return data;
  const shift = (data.thermal?.indexPerKelvin ?? 0) * (temperatureC - DATA_C);
  const thermal = data.thermal && { ...data.thermal, temperatureC };
  return { ...data, index: (nm) => data.index(nm) + shift, thermal };
}

/** What shares may miss of 100 %: rounding of thirds. */
const SHARE_SLACK = 2e-3;

function describeMixture(
  shares: readonly Named<number>[],
  temperatureC: number | null,
  path: DesignPath,
  reading: Reading,
): Base | null {
  const known = shares.filter((share) => knownSolvent(share, reading, 'key'));
  const sum = shares.reduce((total, { value }) => total + value, 0);
  if (shares.length < 2 || Math.abs(sum - 1) > SHARE_SLACK) {
    const problem =
      shares.length < 2 ? 'a mixture needs two solvents' : 'the shares of the solvents do not sum to 100 %';
    const found = shares.length < 2 ? `${shares.length}` : `${Number((100 * sum).toPrecision(4))} %`;
    if (!Number.isNaN(sum))
      reading.report({ code: 'range', path, problem, found, expected: 'shares by volume that sum to 100 %' });
    return null;
  }
  if (known.length < shares.length) return null;
  return mixSolvents(
    shares.map(({ name, value }) => ({ solvent: name, share: value / sum })),
    (name) => solventAt(name, temperatureC),
  );
}

function reportMisplaced(field: string, owner: string, path: DesignPath, reading: Reading): void {
  reading.report({
    code: 'unknown-key',
    path: [...path, field],
    problem: `${field} belongs to ${owner}`,
    found: field,
  });
}
