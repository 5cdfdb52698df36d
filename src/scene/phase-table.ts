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
  // Panels even in angle, from straight back to straight ahead; Simpson's rule in each.
  const edge = Float64Array.from({ length: panels + 1 }, (_, i) => density(series, i / panels));
  const cumulative = new Float64Array(panels + 1);
  for (let i = 0; i < panels; i++) {
    cumulative[i + 1] = cumulative[i] + edge[i] + 4 * density(series, (i + 0.5) / panels) + edge[i + 1];
  }
  const table = new Float64Array(PHASE.cells + 1);
  let panel = 0;
  for (let cell = 0; cell <= PHASE.cells; cell++) {
    const wanted = (cumulative[panels] * cell) / PHASE.cells;
    while (panel < panels - 1 && cumulative[panel + 1] < wanted) panel++;
    const width = cumulative[panel + 1] - cumulative[panel];
    const share = width > 0 ? Math.min(1, (wanted - cumulative[panel]) / width) : 0;
    table[cell] = -Math.cos((Math.PI * (panel + linearQuantile(edge[panel], edge[panel + 1], share))) / panels);
  }
  table[0] = -1;
  table[PHASE.cells] = 1;
  return table;
}

/** Where in 0..1 a density that runs straight from `low` to `high` has `share` of its area behind it. */
function linearQuantile(low: number, high: number, share: number): number {
  const root = Math.sqrt(low * low + share * (high * high - low * low));
  return low + root > 0 ? (share * (low + high)) / (low + root) : share;
}

/** Probability per angle, not normalised, at a share of the way from straight back to straight ahead. */
function density(series: MieSeries, share: number): number {
  const angle = Math.PI * share;
  return Math.sin(angle) * mieIntensity(series, -Math.cos(angle));
}
