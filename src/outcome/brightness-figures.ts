/**
 * The exit's brightness beside the thermodynamic bound of a fluorescent concentrator: E. Yablonovitch, J. Opt. Soc. Am. 70 1362 (1980),
 * B₂/B₁ ≤ (ν₂/ν₁)² exp[h(ν₁ − ν₂)/kT], B photons per time, étendue (n² area and projected solid angle) and bandwidth of frequency, 1 the
 * pump and 2 the emission; for fields of few photons a mode. From memory.
 */
import type { Figure } from '../record/run-record.js';
import type { TraceResult } from '../trace/trace-result.js';
import { BOLTZMANN_J_PER_K, photonEnergyJ, SPEED_OF_LIGHT_M_PER_S } from '../units/constants.js';
import type { ErrorBars } from './error-bars.js';
import type { ExitFigureName } from './exit-figures.js';
import { pumpBandwidth, pumpEtendue } from './pump-brightness.js';

export type BrightnessFigureName = 'pumpEtendue' | 'brightnessRatio' | 'brightnessBound' | 'brightnessBoundShare';

const TEMPERATURE_K = 298.15;
/** Photons of the exit spectrum that make a band: 5 % noise. */
const PHOTONS_PER_BAND = 400;

interface Pump {
  readonly name: string;
  readonly nm: number;
  readonly widthNm: number;
  readonly etendue: number;
  /** Photons per launched photon, per étendue and THz. */
  readonly brightness: number;
}

export function brightnessFigures(
  result: TraceResult,
  bars: ErrorBars,
  exit: Record<ExitFigureName, Figure>,
): Record<BrightnessFigureName, Figure> {
  const pump = brightestPump(result);
  if (typeof pump === 'string') return unbounded(result, pump);
  const known = pumpFigure(pump.etendue, pump.name);
  const effective = exit.exitEffectiveEtendue;
  const etendue = effective.value === null ? exit.exitEtendue : effective;
  if (etendue.value === null) return { ...nothing(etendue.note ?? 'no étendue of the exit'), pumpEtendue: known };
  const band = nearestBand(result, bars.histories, pump, etendue.value);
  if (band === null) {
    return { ...nothing(`fewer than ${PHOTONS_PER_BAND} photons by the exit`), pumpEtendue: known };
  }
  const relative = Math.hypot(1 / Math.sqrt(band.photons), (etendue.standardError ?? 0) / etendue.value);
  const short = (value: number) => Number(value.toPrecision(4));
  const where = `photons per étendue and bandwidth, not power; exit at ${short(band.nm)} nm, where it comes nearest to the bound, over pump ${pump.name}`;
  const over =
    band.share * (1 - 4 * relative) > 1
      ? '; above the bound: no real dye has this absorption and this emission at 25 °C'
      : '';
  return {
    pumpEtendue: known,
    brightnessRatio: { value: band.ratio, standardError: band.ratio * relative, unit: '', note: where },
    brightnessBound: {
      value: band.ratio / band.share,
      standardError: null,
      unit: '',
      note: `(ν2/ν1)² exp(h(ν1 − ν2)/kT) at 25 °C, pump ${short(pump.nm)} nm, ${short(pump.widthNm)} nm wide; photons`,
    },
    brightnessBoundShare: {
      value: band.share,
      standardError: band.share * relative,
      unit: '',
      note: `at ${short(band.nm)} nm, the band of the exit that comes nearest${over}`,
    },
  };
}

/** The pump that allows most, or why there is no finite bound. */
function brightestPump({ description }: TraceResult): Pump | string {
  const photons = description.pumps.map(({ power, wavelengthNm }) => power * wavelengthNm);
  const all = photons.reduce((a, b) => a + b, 0);
  const surroundings = description.media.get(description.surroundings);
  let best: Pump | null = null;
  for (const [i, pump] of description.pumps.entries()) {
    const { name, wavelengthNm: nm, beam } = pump;
    const area = pumpEtendue(beam);
    if (area === null) return `pump ${name} is a ray file, whose étendue is not known`;
    if (!(area > 0)) return `pump ${name} has no étendue, so no bound is finite`;
    const widthNm = pumpBandwidth(pump);
    if (!(widthNm > 0)) return `pump ${name} is a sharp line without bandwidth, so no bound is finite`;
    const etendue = area * (surroundings?.index(nm) ?? 1) ** 2;
    const brightness = photons[i] / all / (etendue * widthTHz(nm, widthNm));
    const one = { name, nm, widthNm, etendue, brightness };
    if (best === null || allowed(one, nm) > allowed(best, nm)) best = one;
  }
  return best ?? 'the design has no pump';
}

const THZ = 1e-12;
/** Width in frequency, THz, of a small width in wavelength. */
const widthTHz = (nm: number, widthNm: number): number => ((SPEED_OF_LIGHT_M_PER_S * widthNm) / nm ** 2) * 1e9 * THZ;

/** Most photons per étendue and THz at a wavelength. */
function allowed({ nm: pumpNm, brightness }: Pump, nm: number): number {
  const shift = (photonEnergyJ(pumpNm) - photonEnergyJ(nm)) / (BOLTZMANN_J_PER_K * TEMPERATURE_K);
  return brightness * (pumpNm / nm) ** 2 * Math.exp(shift);
}

interface Band {
  readonly nm: number;
  readonly photons: number;
  readonly ratio: number;
  readonly share: number;
}

/** Of bands of the exit spectrum with photons enough, the one that comes nearest to the bound. */
function nearestBand({ tallies }: TraceResult, histories: number, pump: Pump, etendue: number): Band | null {
  const spectrum = tallies.spectra.find(({ what }) => what === 'exit');
  if (spectrum === undefined) return null;
  const nm = tallies.wavelengthsNm;
  let nearest: Band | null = null;
  let photons = 0;
  let width = 0;
  let weighed = 0;
  let overBound = 0;
  for (let i = 0; i < nm.length; i++) {
    const count = spectrum.photons[i];
    if (photons === 0 && count === 0) continue;
    const low = i > 0 ? (nm[i - 1] + nm[i]) / 2 : nm[i];
    const high = i < nm.length - 1 ? (nm[i] + nm[i + 1]) / 2 : nm[i];
    photons += count;
    weighed += count * nm[i];
    width += widthTHz(nm[i], high - low);
    overBound += count / allowed(pump, nm[i]);
    if (photons < PHOTONS_PER_BAND) continue;
    const scale = 1 / (histories * etendue * width);
    const share = overBound * scale;
    const ratio = (photons * scale) / pump.brightness;
    if (nearest === null || share > nearest.share) nearest = { nm: weighed / photons, photons, ratio, share };
    photons = 0;
    width = 0;
    weighed = 0;
    overBound = 0;
  }
  return nearest;
}

function pumpFigure(value: number | null, name: string): Figure {
  const note = `of ${name}; a bank as if its emitters filled its pitch`;
  return { value, standardError: null, unit: 'mm² sr', note };
}

function unbounded({ description }: TraceResult, why: string): Record<BrightnessFigureName, Figure> {
  const areas = description.pumps.map(({ beam }) => pumpEtendue(beam));
  const least = areas.some((area) => area === null) ? null : Math.min(...areas.map((area) => area ?? 0));
  const smallest = description.pumps[areas.indexOf(least)];
  return {
    ...nothing(why),
    pumpEtendue: smallest === undefined ? { ...nothing(why).pumpEtendue } : pumpFigure(least, smallest.name),
  };
}

function nothing(note: string): Record<BrightnessFigureName, Figure> {
  const figure = (unit: string): Figure => ({ value: null, standardError: null, unit, note });
  return {
    pumpEtendue: figure('mm² sr'),
    brightnessRatio: figure(''),
    brightnessBound: figure(''),
    brightnessBoundShare: figure(''),
  };
}
