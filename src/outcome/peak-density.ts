/** Peak absorbed power density and how soon still liquid boils there. */
import type { Description, MediumDescription } from '../design/description.js';
import type { Fate, RunTallies } from '../tallies/run-tallies.js';
import type { Estimate } from './error-bars.js';
import { type MapField, soundCells } from './map-field.js';

/** Photons of a voxel whose noise, 5 %, does not decide which voxel is the fullest. */
const PLENTY = 400;

/**
 * The largest voxel value, W/cm³. The voxel is chosen with one half of the histories and valued with the other, both ways, so that the luckiest
 * voxel is not taken for the hottest. Where voxels hold few photons, chance picks one that is not quite the hottest and the value may read low;
 * `note` then says so.
 * @param field with measure in at least one cell
 */
export function peakDensity(field: MapField): Estimate & { readonly note?: string } {
  const cells = soundCells(field);
  const [even, odd] = field.halves;
  const peakOf = (values: Float64Array) => cells.reduce((best, i) => (values[i] > values[best] ? i : best), cells[0]);
  if (even === null || odd === null) {
    const peak = peakOf(field.values);
    const note = 'too few histories to choose the voxel by one half and value it by the other';
    return { value: field.values[peak], standardError: errorAt(field, peak, field.values), note };
  }
  const first = peakOf(even);
  const second = peakOf(odd);
  const errors = [errorAt(field, first, odd), errorAt(field, second, even)];
  const photons = (field.counts[first] + field.counts[second]) / 2;
  return {
    value: (odd[first] + even[second]) / 2,
    standardError: errors.every((error) => error !== null) ? Math.hypot(...errors) / 2 : null,
    ...(photons < PLENTY ? { note: `about ${Math.round(photons)} photons in it` } : {}),
  };
}

/** Poisson error of a value, of one photon at least: a half that saw none in the voxel is not sure of zero. */
function errorAt({ counts, values }: MapField, cell: number, of: Float64Array): number | null {
  if (!(counts[cell] > 0)) return null;
  // What one photon adds to the value; to that of a half, twice as much.
  const onePhoton = ((of === values ? 1 : 2) * values[cell]) / counts[cell];
  return onePhoton * Math.sqrt(Math.max(1, of[cell] / onePhoton));
}

export interface BoilingTime {
  readonly value: number | null;
  readonly standardError: number | null;
  readonly note: string;
}

/**
 * Adiabatic time for still liquid at the peak to reach its boiling point: t = ρ c (T_boil − T₀)/q, with q the peak density times the
 * share of absorbed pump power that becomes heat in the dyed parts over the whole run. Of several dyed liquids, the one that boils soonest.
 * @param absorbedPumpEv eV of pump light absorbed in the dyed parts
 */
export function timeToBoiling(
  peak: Estimate,
  description: Description,
  tallies: RunTallies,
  absorbedPumpEv: number,
): BoilingTime {
  const unknown = (note: string): BoilingTime => ({ value: null, standardError: null, note });
  const dyed = dyedParts(description);
  const [liquid] = dyed.flatMap(({ medium }) => heatOf(medium)).toSorted((a, b) => a.joulesPerM3 - b.joulesPerM3);
  if (liquid === undefined) return unknown('no dyed liquid with heat data and a boiling point');
  if (!(peak.value > 0)) return unknown('peak density unknown');
  let heatEv = 0;
  tallies.slots.forEach(({ fate, where }, i) => {
    // A jacket of clear water that takes up light does not heat the dyed liquid.
    if (HEAT.has(fate) && dyed.some(({ part }) => part === where)) {
      heatEv += tallies.moments.sum[2 * i + 1];
    }
  });
  const heatShare = heatEv / absorbedPumpEv;
  const wattsPerM3 = peak.value * 1e6 * heatShare;
  if (!(wattsPerM3 > 0)) return unknown('no heat in the liquid');
  const seconds = liquid.joulesPerM3 / wattsPerM3;
  const relative = peak.standardError === null ? null : peak.standardError / peak.value;
  return {
    value: seconds,
    standardError: relative === null ? null : seconds * relative,
    note:
      `${liquid.name} at rest, ${liquid.from} to ${liquid.to} °C, no heat carried away; ` +
      `${(100 * heatShare).toPrecision(3)} % of absorbed pump power is heat`,
  };
}

const HEAT: ReadonlySet<Fate> = new Set([
  'lost-in-dye',
  'quenched',
  'stokes-heat',
  'absorbed-by-solvent',
  'absorbed-by-solid',
]);

function dyedParts({ parts, media }: Description): { part: string; medium: MediumDescription }[] {
  return parts.flatMap(({ name: part, medium: name }) => {
    const medium = media.get(name);
    return medium !== undefined && medium.dyes.length > 0 ? [{ part, medium }] : [];
  });
}

/** ρ c (T_boil − T₀) of a liquid: heat that brings it to the boil; nothing for a medium without such data. */
function heatOf({ kind, base, thermal }: MediumDescription) {
  if (kind !== 'liquid' || thermal === null || thermal.boilingPointC === null) return [];
  const { densityKgPerM3, specificHeatJPerKgK, temperatureC: from, boilingPointC: to } = thermal;
  return [{ name: base, from, to, joulesPerM3: densityKgPerM3 * specificHeatJPerKgK * Math.max(0, to - from) }];
}
