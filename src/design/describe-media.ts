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
import { type Dye, describeOwnDye, dissolveDye } from './describe-dyes.js';
import { describeScatterer } from './describe-scatterers.js';
import type { MediumDescription } from './description.js';
import type { DesignRecord } from './design-fields.js';
import type { DesignPath } from './fault.js';
import type { Named } from './form-record.js';
import type { Reference } from './form-scalars.js';
import type { MediumEntry, MediumRecord } from './media-fields.js';
import { checkReference } from './names.js';
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
  const host = { base: base?.base ?? 'custom', pH: fields.pH };
  const dyes = fields.dyes.flatMap((dye) => dissolveDye(dye, ownDyes, host, reading) ?? []);
  const hostDensity = base?.thermal?.densityKgPerM3 ?? null;
  const scatterers = fields.scatterers.flatMap((entry) => describeScatterer(entry, hostDensity, reading) ?? []);
  const { reservoir } = fields;
  if (base && reservoir !== null && base.kind !== 'liquid') reportMisplaced('reservoir', 'a liquid', path, reading);
  return base && { name, path, ...base, dyes, scatterers, reservoirMm3: reservoir };
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
  const base = solvent === null ? named(solid, 'solid', reading) : named(solvent, 'solvent', reading);
  return base && { ...base, ...(absorption === null ? {} : { absorption: pointCurve(absorption, 'hold') }) };
}

function named(material: Reference | null, kind: 'solid' | 'solvent', reading: Reading): Base | null {
  if (material === null) return null;
  const names = kind === 'solid' ? solidNames() : solventNames();
  if (!checkReference(material, names, `no ${kind} of the library has this name`, reading)) return null;
  return libraryMaterial(material.name);
}

function reportMisplaced(field: string, owner: string, path: DesignPath, reading: Reading): void {
  reading.report({
    code: 'unknown-key',
    path: [...path, field],
    problem: `${field} belongs to ${owner}`,
    found: field,
  });
}
