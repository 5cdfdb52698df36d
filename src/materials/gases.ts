import { type MaterialData, unknownName } from './material-data.js';

export const gasNames = (): readonly string[] => ['air'];

/**
 * Air has index 1 exactly: the indices of solvents and solids in the library are relative to air.
 * @throws RangeError for an unknown name.
 */
export function readGas(name: string): MaterialData {
  if (name !== 'air') throw unknownName('gas', name, gasNames());
  return {
    name,
    kind: 'gas',
    index: () => 1,
    absorption: () => 0,
    thermal: null,
    rangeNm: [200, 2000],
    source: 'by definition: all indices are relative to air',
    status: 'exact by definition',
  };
}
