/** Peak absorbed power density and how soon still liquid boils there. */
import type { Description, ThermalProperties } from '../design/description.js';
import type { RunTallies } from '../tallies/run-tallies.js';
import type { Estimate } from './error-bars.js';
import { type MapField, soundCells } from './map-field.js';

/** Photons of a voxel whose noise, 5 %, does not decide which voxel is the fullest. */
const PLENTY = 400;

/**
 * The largest voxel value, W/cm³. The voxel is chosen with one half of the histories and valued with the other, both ways, so that the luckiest
 * voxel is not taken for the hottest. Where voxels hold few photons, chance picks one that is not quite the hottest and the value may read low;
 * `note` then says so.
 */
export function peakDensity(field: MapField): Estimate & { readonly note?: string } {
  const cells = soundCells(field);
  const [even, odd] = field.halves;
  const peakOf = (values: Float64Array) => cells.reduce((best, i) => (values[i] > values[best] ? i : best), cells[0]);
  if (even === null || odd === null) {
    const peak = peakOf(field.values);
    const note = 'too few histories to choose the voxel and value it independently; reads high';
    return { value: field.values[peak], standardError: errorAt(field, peak, field.values), note };
  }
  const first = peakOf(even);
  const second = peakOf(odd);
  const errors = [errorAt(field, first, odd), errorAt(field, second, even)];
  const photons = (field.counts[first] + field.counts[second]) / 2;
  return {
    value: (odd[first] + even[second]) / 2,
    standardError: errors.every((error) => error !== null) ? Math.hypot(...errors) / 2 : null,
    ...(photons < PLENTY ? { note: `from voxels of about ${Math.round(photons)} photons; may read low` } : {}),
  };
}

/** Poisson: half of the cell's photons stand behind one half's value. */
function errorAt({ counts, values }: MapField, cell: number, of: Float64Array): number | null {
  const photons = of === values ? counts[cell] : counts[cell] / 2;
  return photons > 0 ? of[cell] / Math.sqrt(photons) : null;
}

export interface BoilingTime {
  readonly value: number | null;
  readonly standardError: number | null;
  readonly note: string;
}

/**
 * Adiabatic time for still liquid at the peak to reach its boiling point: t = ρ c (T_boil − T₀)/q, with q the peak density times the
 * share of absorbed pump power that becomes heat in the dyed liquid over the whole run.
 */
export function timeToBoiling(
  peak: Estimate,
  description: Description,
  tallies: RunTallies,
  absorbedPumpEv: number,
): BoilingTime {
  const liquid = dyedLiquid(description);
  if (liquid === null) return { value: null, standardError: null, note: 'no dyed liquid with heat data' };
  const { thermal, name } = liquid;
  const { boilingPointC } = thermal;
  if (boilingPointC === null) return { value: null, standardError: null, note: `no boiling point for ${name}` };
  let heatEv = 0;
  tallies.slots.forEach(({ fate }, i) => {
    if (fate === 'lost-in-dye' || fate === 'stokes-heat' || fate === 'absorbed-by-solvent') {
      heatEv += tallies.moments.sum[2 * i + 1];
    }
  });
  const heatShare = heatEv / absorbedPumpEv;
  const wattsPerM3 = peak.value * 1e6 * heatShare;
  if (!(wattsPerM3 > 0)) return { value: null, standardError: null, note: 'no heat in the liquid' };
  const kelvin = boilingPointC - thermal.temperatureC;
  const seconds = (thermal.densityKgPerM3 * thermal.specificHeatJPerKgK * kelvin) / wattsPerM3;
  const relative = peak.standardError === null ? null : peak.standardError / peak.value;
  return {
    value: seconds,
    standardError: relative === null ? null : seconds * relative,
    note:
      `${name} at rest from ${thermal.temperatureC} °C to ${boilingPointC} °C, no heat carried away, heat data of ${thermal.temperatureC} °C; ` +
      `${(100 * heatShare).toPrecision(3)} % of the absorbed pump power becomes heat`,
  };
}

function dyedLiquid(description: Description): { name: string; thermal: ThermalProperties } | null {
  for (const { medium: name } of description.parts) {
    const medium = description.media.get(name);
    if (medium !== undefined && medium.kind === 'liquid' && medium.dyes.length > 0 && medium.thermal !== null) {
      return { name: medium.base, thermal: medium.thermal };
    }
  }
  return null;
}
