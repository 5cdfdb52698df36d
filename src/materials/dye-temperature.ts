import type { YieldTemperature } from './material-data.js';
import { numberIn, readTable } from './read-table.js';

/** How the yield of a dye falls with temperature, or null where no data are held. */
export function readYieldTemperature(dye: string): YieldTemperature | null {
  const row = readTable('dye-temperature.csv').rows.find((entry) => entry.dye === dye);
  if (row === undefined) return null;
  return {
    fallPerKelvin: numberIn(row, 'fall_per_K'),
    rangeC: [numberIn(row, 'least_C'), numberIn(row, 'most_C')],
    status: row.status,
    source: row.source,
  };
}
