import { linearCurve } from '../numerics/interpolate.js';
import { numberIn, readTable } from './read-table.js';

/**
 * Density over that of an ideal mixture (volumes that add up), as measured, or null where no table is held.
 * @param massShare of `first`
 */
export function mixtureDensity(first: string, second: string, massShare: number): number | null {
  const rows = readTable('mixture-density.csv').rows;
  const own = rows.filter((row) => row.first === first && row.second === second);
  if (own.length === 0) {
    const turned = rows.some((row) => row.first === second && row.second === first);
    return turned ? mixtureDensity(second, first, 1 - massShare) : null;
  }
  const shares = own.map((row) => numberIn(row, 'mass_share_of_first'));
  const densities = own.map((row) => numberIn(row, 'density_kg_per_m3'));
  const [lowest, highest] = [densities[0], densities[densities.length - 1]];
  const excess = shares.map((share, i) => densities[i] * (share / highest + (1 - share) / lowest));
  return linearCurve(shares, excess, { below: 'hold', above: 'hold' })(massShare);
}
