/** Scatterers of the media -> coefficients over the wavelength grid, and what their directions are drawn from. */
import type { MediumDescription, ScattererDescription } from '../design/description.js';
import { beadSize } from '../optics/bead-scattering.js';
import { type MieSeries, mieSeries } from '../optics/mie.js';
import { phasePanels, phaseTable } from './phase-table.js';
import { scatteringAt } from './scattering-at.js';
import { PHASE } from './scene-layout.js';
import type { WavelengthGrid } from './wavelength-grid.js';

export interface CompiledScatterers {
  readonly maxScatterers: number;
  readonly count: number[];
  /** [(medium · maxScatterers + scatterer) · wavelengths]: cumulative share of the medium's scattering. */
  readonly share: Float64Array;
  /** As in the scene. */
  readonly table: Int32Array;
  readonly value: Float64Array;
  readonly cosines: number[];
  /** [medium · wavelengths]: 1/mm of all scatterers of a medium, and what its beads absorb. */
  readonly scattering: Float64Array;
  readonly absorption: Float64Array;
}

/** Directions are tabulated at this many wavelengths, and mixed between two of them. */
const MOST_KNOTS = 33;
const LEAST_KNOTS = 5;
/** Terms of series, summed over angles and knots, that one scatterer may cost: about a second. */
const MOST_TERMS = 2e8;

/** What a scatterer does in its medium, per wavelength of the grid. */
interface Coefficients {
  readonly scattering: Float64Array;
  readonly absorption: Float64Array;
}

export function compileScatterers(media: readonly MediumDescription[], grid: WavelengthGrid): CompiledScatterers {
  const cells = grid.nm.length;
  const maxScatterers = Math.max(0, ...media.map(({ scatterers }) => scatterers.length));
  const rows = media.length * maxScatterers * cells;
  const compiled: CompiledScatterers = {
    maxScatterers,
    count: media.map(({ scatterers }) => scatterers.length),
    share: new Float64Array(rows).fill(1),
    table: new Int32Array(rows).fill(PHASE.henyeyGreenstein),
    value: new Float64Array(rows),
    cosines: [],
    scattering: new Float64Array(media.length * cells),
    absorption: new Float64Array(media.length * cells),
  };
  media.forEach((medium, m) => {
    medium.scatterers.forEach((scatterer, s) => {
      const { scattering, absorption } = coefficients(scatterer, medium, grid);
      const first = (m * maxScatterers + s) * cells;
      for (let w = 0; w < cells; w++) {
        compiled.scattering[m * cells + w] += scattering[w];
        compiled.absorption[m * cells + w] += absorption[w];
        compiled.share[first + w] = compiled.scattering[m * cells + w];
      }
      if (scatterer.kind === 'beads') tabulate(compiled, scatterer, medium, grid, first);
      else compiled.value.set(grid.nm.map(scatterer.anisotropy), first);
    });
    for (let s = 0; s < medium.scatterers.length; s++) {
      for (let w = 0; w < cells; w++) {
        const at = (m * maxScatterers + s) * cells + w;
        const sum = compiled.scattering[m * cells + w];
        // The last share must be exactly 1 so that no draw falls through.
        compiled.share[at] = sum > 0 && s < medium.scatterers.length - 1 ? compiled.share[at] / sum : 1;
      }
    }
  });
  return compiled;
}

function coefficients(
  scatterer: ScattererDescription,
  medium: MediumDescription,
  { nm }: WavelengthGrid,
): Coefficients {
  const scattering = new Float64Array(nm.length);
  const absorption = new Float64Array(nm.length);
  nm.forEach((at, w) => {
    const found = scatteringAt(scatterer, medium, at);
    scattering[w] = found.scattering;
    absorption[w] = found.absorption;
  });
  return { scattering, absorption };
}

/**
 * Tables at knots, evenly spaced over the wavelengths. Between two, light is drawn from either with the odds of a straight line, so that
 * the distribution itself is interpolated.
 */
function tabulate(
  out: CompiledScatterers,
  scatterer: Extract<ScattererDescription, { kind: 'beads' }>,
  medium: MediumDescription,
  { nm }: WavelengthGrid,
  first: number,
): void {
  const { radius, index, extinction } = scatterer;
  const seriesAt = (at: number) => {
    const around = medium.index(at);
    return mieSeries(beadSize(radius, around, at), index(at) / around, extinction(at) / around);
  };
  const [low, high] = [nm[0], nm[nm.length - 1]];
  const longest = seriesAt(low);
  const affordable = Math.floor(MOST_TERMS / (2 * phasePanels(longest) * longest.order));
  const knots = Math.max(LEAST_KNOTS, Math.min(MOST_KNOTS, affordable));
  const stride = PHASE.cells + 1;
  const base = out.cosines.length;
  const step = (high - low) / (knots - 1);
  for (let knot = 0; knot < knots; knot++) {
    for (const cosine of knownTable(scatterer, seriesAt(low + knot * step))) out.cosines.push(cosine);
  }
  nm.forEach((at, w) => {
    const knot = Math.min(knots - 2, Math.floor((at - low) / step));
    out.table[first + w] = base + knot * stride;
    out.value[first + w] = (at - low) / step - knot;
  });
}

/** A scene is compiled several times in a run; large beads take a second each time. */
const known = new WeakMap<ScattererDescription, Map<string, Float64Array>>();

function knownTable(scatterer: ScattererDescription, series: MieSeries): Float64Array {
  const tables = known.get(scatterer) ?? new Map<string, Float64Array>();
  known.set(scatterer, tables);
  // The first coefficients tell spheres of one size apart by their index.
  const key = [series.size, ...series.a.subarray(0, 4), ...series.b.subarray(0, 4)].join(' ');
  const table = tables.get(key) ?? phaseTable(series);
  tables.set(key, table);
  return table;
}
