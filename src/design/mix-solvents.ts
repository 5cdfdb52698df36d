/** Solvents mixed by volume -> one liquid. */
import { type MaterialData, mixtureDensity, readSolvent, type ThermalData } from '../materials/library.js';
import { mixedIndex } from '../materials/lorentz-lorenz.js';
import type { MediumDescription } from './description.js';

export interface SolventShare {
  readonly solvent: string;
  /** By volume before mixing; all sum to 1. */
  readonly share: number;
}

export type MixedSolvent = Pick<MediumDescription, 'base' | 'kind' | 'index' | 'absorption' | 'thermal'> & {
  readonly mixture: readonly SolventShare[];
  readonly notes: readonly string[];
};

/**
 * Index by Lorentz and Lorenz, absorption by volume, density from a table where one is held and else as if volumes added up, heat
 * capacity by mass, conductivity after Filippov (1955; from memory). The boiling point of a mixture is not modelled: null.
 * @param read gives each solvent, at the temperature of the mixture
 */
export function mixSolvents(
  shares: readonly SolventShare[],
  read: (name: string) => MaterialData = readSolvent,
): MixedSolvent {
  const solvents = shares.map(({ solvent, share }) => ({ ...read(solvent), share }));
  const words = shares.map(({ solvent, share }) => `${Number((100 * share).toPrecision(3))} % ${solvent}`).join(', ');
  const heats = solvents.flatMap(({ thermal, share }) => (thermal === null ? [] : [{ thermal, share }]));
  const whole = heats.length === solvents.length;
  const masses = heats.map(({ thermal, share }) => thermal.densityKgPerM3 * share);
  const mass = masses.reduce((a, b) => a + b, 0);
  const measured =
    whole && shares.length === 2 ? mixtureDensity(shares[0].solvent, shares[1].solvent, masses[0] / mass) : null;
  const shrinks = measured ?? 1;
  const filled = shares.map(({ share }) => share * shrinks);
  return {
    base: words,
    kind: 'liquid',
    index: (nm) =>
      mixedIndex(
        solvents.map(({ index }) => index(nm)),
        filled,
      ),
    absorption: (nm) => solvents.reduce((sum, { absorption }, i) => sum + filled[i] * absorption(nm), 0),
    thermal: whole
      ? mixedHeat(
          heats.map(({ thermal }) => thermal),
          masses,
          mass * shrinks,
        )
      : null,
    mixture: shares,
    notes: [
      `${words}: index by the Lorentz–Lorenz rule, absorption by volume; ${
        measured === null
          ? 'volumes taken to add up'
          : `volume shrinks by ${(100 * (1 - 1 / shrinks)).toFixed(1)} % (tables)`
      }; boiling point of a mixture not modelled, so no time to boiling`,
    ],
  };
}

function mixedHeat(
  heats: readonly ThermalData[],
  masses: readonly number[],
  densityKgPerM3: number,
): MediumDescription['thermal'] {
  const mass = masses.reduce((a, b) => a + b, 0);
  const w = masses.map((one) => one / mass);
  const sum = (value: (heat: ThermalData) => number) => heats.reduce((total, heat, i) => total + w[i] * value(heat), 0);
  // Filippov: each pair conducts worse than its mean by 0.72 w₁ w₂ of the difference.
  let lost = 0;
  for (let i = 0; i < heats.length; i++) {
    for (let j = 0; j < i; j++) {
      lost += 0.72 * w[i] * w[j] * Math.abs(heats[i].conductivityWPerMK - heats[j].conductivityWPerMK);
    }
  }
  return {
    densityKgPerM3,
    specificHeatJPerKgK: sum(({ specificHeatJPerKgK }) => specificHeatJPerKgK),
    conductivityWPerMK: sum(({ conductivityWPerMK }) => conductivityWPerMK) - lost,
    boilingPointC: null,
    temperatureC: heats[0]?.temperatureC ?? 25,
    source: `mixed from: ${heats.map(({ source }) => source).join('; ')}`,
  };
}
