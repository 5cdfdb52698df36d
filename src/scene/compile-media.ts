/** Media -> tables over the wavelength grid. Absorber 0 of a medium is the bare solvent or solid; dyes follow. */
import type { Description, MediumDescription } from '../design/description.js';
import { type CompiledScatterers, compileScatterers } from './compile-scatterers.js';
import type { SpectrumPool } from './spectrum-pool.js';
import { cellPhotons, linePhotons, type WavelengthGrid } from './wavelength-grid.js';

export interface CompiledMedia {
  readonly names: readonly string[];
  readonly media: readonly MediumDescription[];
  readonly index: Float64Array;
  readonly attenuation: Float64Array;
  readonly maxAbsorbers: number;
  readonly absorberCount: number[];
  readonly absorberShare: Float64Array;
  /** Yield at the strength in use. */
  readonly dyeYield: Float64Array;
  /** Yield of the dilute dye; what lies between the two is quenched. */
  readonly diluteYield: Float64Array;
  readonly dyeSpectrum: Int32Array;
  readonly scatterers: CompiledScatterers;
  /** [medium · wavelengths]: share of the attenuation that scatters. */
  readonly scatterShare: Float64Array;
}

export function compileMedia(description: Description, grid: WavelengthGrid, pool: SpectrumPool): CompiledMedia {
  const used = new Set([description.surroundings, ...description.parts.map(({ medium }) => medium)]);
  const media = [...used].map((name) => {
    const medium = description.media.get(name);
    if (medium === undefined) throw new Error(`medium ${name} is not in the description`);
    return medium;
  });
  const cells = grid.nm.length;
  const maxAbsorbers = 1 + Math.max(...media.map(({ dyes }) => dyes.length));
  const index = new Float64Array(media.length * cells);
  const attenuation = new Float64Array(media.length * cells);
  const absorberShare = new Float64Array(media.length * maxAbsorbers * cells);
  const dyeYield = new Float64Array(media.length * maxAbsorbers);
  const diluteYield = new Float64Array(media.length * maxAbsorbers);
  const dyeSpectrum = new Int32Array(media.length * maxAbsorbers);
  const scatterers = compileScatterers(media, grid);
  const scatterShare = new Float64Array(media.length * cells);
  media.forEach((medium, m) => {
    medium.dyes.forEach(({ emission, quantumYield, diluteYield: dilute = quantumYield }, d) => {
      const slot = m * maxAbsorbers + d + 1;
      dyeYield[slot] = quantumYield;
      diluteYield[slot] = dilute;
      dyeSpectrum[slot] = pool.add(
        emission.kind === 'line'
          ? linePhotons(grid, emission.wavelengthNm, 0)
          : cellPhotons(grid, emission.photonsPerNm, emission.fromNm, emission.toNm),
      );
    });
    const absorbers = [medium.absorption, ...medium.dyes.map(({ absorption }) => absorption)];
    for (let w = 0; w < cells; w++) {
      const nm = grid.nm[w];
      index[m * cells + w] = medium.index(nm);
      let sum = 0;
      absorbers.forEach((absorption, a) => {
        // What beads absorb counts as absorbed by what they are in.
        const beads = a === 0 ? scatterers.absorption[m * cells + w] : 0;
        sum += Math.max(0, absorption(nm)) + beads;
        absorberShare[(m * maxAbsorbers + a) * cells + w] = sum;
      });
      const scattering = scatterers.scattering[m * cells + w];
      attenuation[m * cells + w] = sum + scattering;
      scatterShare[m * cells + w] = scattering > 0 ? scattering / (sum + scattering) : 0;
      for (let a = 0; a < absorbers.length; a++) {
        const at = (m * maxAbsorbers + a) * cells + w;
        // The last share must be exactly 1 so that no draw falls through.
        absorberShare[at] = sum > 0 && a < absorbers.length - 1 ? absorberShare[at] / sum : 1;
      }
    }
  });
  const absorberCount = media.map(({ dyes }) => dyes.length + 1);
  const names = media.map(({ name }) => name);
  return {
    names,
    media,
    index,
    attenuation,
    maxAbsorbers,
    absorberCount,
    absorberShare,
    dyeYield,
    diluteYield,
    dyeSpectrum,
    scatterers,
    scatterShare,
  };
}
