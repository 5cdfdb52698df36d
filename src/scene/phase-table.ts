/** How a bead spreads light, as a table to draw from: cosines of the scattering angle at even steps of the cumulative probability. */
import { type MieSeries, mieIntensity } from '../optics/mie.js';
import { PHASE } from './scene-layout.js';

/** Panels per term of the series: its intensity has as many lobes as terms, so each lobe is cut into this many. */
const PANELS_PER_TERM = 8;
const LEAST_PANELS = 256;

export const phasePanels = ({ order }: MieSeries): number => Math.max(LEAST_PANELS, PANELS_PER_TERM * order);

/**
 * PHASE.cells + 1 rising cosines from −1 to 1, light equally probable between each two. Drawn linearly between them, the mean cosine is
 * that of the series to a few parts in 10⁵.
 */
export function phaseTable(series: MieSeries): Float64Array {
  const panels = phasePanels(series);
  // Edges even in angle, from straight back to straight ahead.
  const cosine = Float64Array.from({ length: panels + 1 }, (_, i) => -Math.cos((Math.PI * i) / panels));
  const cumulative = new Float64Array(panels + 1);
  let low = density(series, 0);
  for (let i = 0; i < panels; i++) {
    const high = density(series, (i + 1) / panels);
    // Simpson's rule over the angle.
    cumulative[i + 1] = cumulative[i] + low + 4 * density(series, (i + 0.5) / panels) + high;
    low = high;
  }
  const table = new Float64Array(PHASE.cells + 1);
  const total = cumulative[panels];
  let panel = 0;
  for (let cell = 0; cell <= PHASE.cells; cell++) {
    const wanted = (total * cell) / PHASE.cells;
    while (panel < panels - 1 && cumulative[panel + 1] < wanted) panel++;
    const width = cumulative[panel + 1] - cumulative[panel];
    const share = width > 0 ? Math.min(1, (wanted - cumulative[panel]) / width) : 0;
    table[cell] = cosine[panel] + share * (cosine[panel + 1] - cosine[panel]);
  }
  table[0] = -1;
  table[PHASE.cells] = 1;
  return table;
}

/** Probability per angle, not normalised, at a share of the way from straight back to straight ahead. */
function density(series: MieSeries, share: number): number {
  const angle = Math.PI * share;
  return Math.sin(angle) * mieIntensity(series, -Math.cos(angle));
}
