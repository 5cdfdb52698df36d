/** Dyes of the design and of the library -> what a medium holds of them. */

import { formShares } from '../materials/acid-base.js';
import { dyeNames } from '../materials/library.js';
import { type QuenchingLaw, selfQuenching } from '../materials/self-quenching.js';
import { activationEnergy, yieldAtTemperature } from '../materials/thermal-yield.js';
import type { Curve } from '../units/curve.js';
import type { DissolvedDye, QuenchingDescription } from './description.js';
import type { Dye, Host } from './dye.js';
import type { DesignPath } from './fault.js';
import type { Named } from './form-record.js';
import { libraryDye } from './library-dye.js';
import type { DyeStrength } from './media-fields.js';
import { checkReference } from './names.js';
import type { Reading } from './reading.js';

/** A dye in its medium: one entry, or one for each protolytic form; and what was taken for granted. */
export interface Dissolved {
  readonly dyes: readonly DissolvedDye[];
  readonly notes: readonly string[];
}

/** The dye at its strength; nothing after reporting why not. */
export function dissolveDye(
  { name, path, value: strength }: Named<DyeStrength>,
  ownDyes: ReadonlyMap<string, Dye>,
  host: Host,
  reading: Reading,
): Dissolved {
  const own = ownDyes.get(name);
  const names = [...ownDyes.keys(), ...dyeNames()];
  if (own === undefined && !checkReference({ name, path }, names, 'no dye has this name', reading, 'key')) {
    return { dyes: [], notes: [] };
  }
  const dye = own ?? libraryDye(name, path, host, reading);
  const warm = atTemperature(name, dye, host, path, reading);
  if (dye.absorption !== null) {
    const { absorption } = dye;
    if (strength.kind !== 'number' && !Number.isNaN(strength.value)) {
      reportStrength('a plain factor, for the dye is given by its absorption', path, reading);
    }
    const given = {
      name,
      quantumYield: warm.factor * dye.quantumYield,
      emission: dye.emission,
      lifetimeNs: dye.lifetimeNs,
      ...stability(dye),
    };
    const dyes = [{ ...given, concentration: null, absorption: (nm: number) => absorption(nm) * strength.value }];
    return { dyes, notes: [...dye.notes, ...warm.notes] };
  }
  const concentration = molarConcentration(strength, dye, path, reading);
  const quenched =
    host.quenching && Number.isFinite(concentration) && concentration >= 0 ? quench(dye, concentration) : null;
  const forms = presentForms(name, dye, host);
  const dyes = forms.map(({ share, extinction, quantumYield, lifetimeNs, ...rest }): DissolvedDye => {
    const dilute = warm.factor * quantumYield;
    const moving = quenched === null ? 1 : quenched.factor / Math.max(1e-300, 1 - quenched.dimerShare);
    return {
      ...rest,
      concentration: share * concentration,
      absorption: molarAbsorption(extinction, share * concentration),
      quantumYield: dilute * (quenched?.factor ?? 1),
      ...(quenched === null ? {} : { diluteYield: dilute, quenching: quenched }),
      emission: dye.emission,
      ...stability(dye),
      // What takes light away at the same rate of emission shortens the lifetime as much; dimers are dark from the start.
      lifetimeNs: lifetimeNs === null ? null : lifetimeNs * warm.factor * moving,
    };
  });
  const mixed = forms.length > 1 || forms[0]?.formOf !== undefined ? [formNote(name, forms, host)] : [];
  return { dyes, notes: [...dye.notes, ...mixed, ...warm.notes] };
}

const stability = ({ molarMassGPerMol, bleachYield, triplet }: Dye) => ({ molarMassGPerMol, bleachYield, triplet });

/** 1 cm⁻¹ = 0.1 mm⁻¹; decadic to Napierian by ln 10. */
function molarAbsorption(extinction: Curve | null, concentration: number): Curve {
  const scale = (Math.LN10 * concentration) / 10;
  return (nm) => scale * (extinction?.(nm) ?? Number.NaN);
}

interface PresentForm {
  readonly name: string;
  readonly formOf?: string;
  readonly share: number;
  readonly extinction: Curve | null;
  readonly quantumYield: number;
  readonly lifetimeNs: number | null;
}

/** Forms with a smaller share of the molecules are left out. */
const LEAST_SHARE = 1e-3;

/** The forms at the pH of the host; the dye as it is where its forms are not known or one is all but alone and has the dye's own data. */
function presentForms(name: string, { forms, extinction, quantumYield, lifetimeNs }: Dye, { pH }: Host): PresentForm[] {
  const whole: PresentForm = { name, share: 1, extinction, quantumYield, lifetimeNs };
  if (forms.length === 0 || pH === null || !Number.isFinite(pH)) return [whole];
  const shares = formShares(
    pH,
    forms.flatMap(({ pKa }) => pKa ?? []),
  );
  const present = shares.map((share) => (share >= LEAST_SHARE ? share : 0));
  const total = present.reduce((a, b) => a + b, 0);
  const last = forms.length - 1;
  if (present[last] === total) return [whole];
  return forms.flatMap((form, i): PresentForm[] =>
    present[i] === 0
      ? []
      : [
          {
            name: `${name} ${form.name}`,
            formOf: name,
            share: present[i] / total,
            extinction: form.extinction,
            quantumYield: form.quantumYield,
            lifetimeNs: i === last ? lifetimeNs : null,
          },
        ],
  );
}

function formNote(name: string, forms: readonly PresentForm[], { pH }: Host): string {
  const shares = forms.map(
    (form) => `${Number((100 * form.share).toPrecision(3))} % ${form.name.slice(name.length + 1)}`,
  );
  return (
    `${name} at pH ${pH} is ${shares.join(', ')} (pKa, extinctions and yields: Sjöback, Nygren & Kubista 1995; other band shapes are a model). ` +
    'Each form has its measured yield, which holds what it gives to another form while excited; all emit one spectrum. Forms below 0.1 % are left out'
  );
}

function quench({ quenching }: Dye, concentration: number): QuenchingDescription | null {
  if (quenching === null) return null;
  const { law, most, source } = quenching;
  return { ...selfQuenching(law, concentration), law: lawWords(law), source, strength: concentration, most };
}

function lawWords(law: QuenchingLaw): string {
  switch (law.kind) {
    case 'transfer-to-dimers':
      return `transfer to dark dimers, R₀ ${law.radiusNm} nm, K ${law.pairing} L/mol`;
    case 'half-strength':
      return '1/(1 + (c/c½)²)';
    case 'stern-volmer':
      return '1/(1 + K c)';
    case 'perrin':
      return 'exp(−c/c₀)';
  }
}

/** Where data are taken to hold when the design says no temperature, °C. */
const USUAL_C = 25;

/** Factor on the yield at the temperature of the host. */
function atTemperature(
  name: string,
  { temperature, quantumYield }: Dye,
  { temperatureC }: Host,
  path: DesignPath,
  reading: Reading,
): { factor: number; notes: readonly string[] } {
  if (temperatureC === null || !Number.isFinite(temperatureC) || Math.abs(temperatureC - USUAL_C) < 0.01)
    return { factor: 1, notes: [] };
  if (temperature === null) {
    return { factor: 1, notes: [`${name}: no data on its yield against temperature, taken as near 25 °C`] };
  }
  const { fallPerKelvin, rangeC, status } = temperature;
  if (temperatureC < rangeC[0] || temperatureC > rangeC[1]) {
    reading.report({
      code: 'caution',
      severity: 'warning',
      path,
      problem: `the yield of ${name} against temperature is carried on beyond its data`,
      found: `${Number(temperatureC.toPrecision(4))} °C`,
      expected: `${rangeC[0]} to ${rangeC[1]} °C`,
    });
  }
  const warm = yieldAtTemperature(quantumYield, activationEnergy(quantumYield, fallPerKelvin), temperatureC);
  const words = `${name}: yield ${Number((100 * warm).toPrecision(3))} % at ${Number(temperatureC.toPrecision(4))} °C, ${100 * quantumYield} % at 25 °C (${status})`;
  return { factor: warm / quantumYield, notes: [words] };
}

function molarConcentration(strength: DyeStrength, dye: Dye, path: DesignPath, reading: Reading): number {
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

function reportStrength(expected: string, path: DesignPath, reading: Reading): void {
  reading.report({ code: 'quantity', path, problem: 'the strength is of the wrong kind for this dye', expected });
}
