import type { RecordedMap } from '../tallies/run-tallies.js';

/** One cell of a flat map: where its centre is in the design, and the photon energy that fell on it, eV. */
export interface MapCell {
  readonly centre: readonly [number, number, number];
  readonly energy: number;
}

/**
 * The cells of a flat map, both halves together.
 * @throws Error when there is no such map: the proof's cell asked for it.
 */
export function mapCells(maps: readonly RecordedMap[], where: string): readonly MapCell[] {
  const map = maps.find((one) => one.where === where && one.what === 'detector');
  if (!map?.frame) throw new Error(`no flat map of the detector "${where}"`);
  const { origin, u, v } = map.frame;
  const [across, along] = map.shape;
  const [stepU, stepV] = map.extent.map(([low, high], axis) => (high - low) / map.shape[axis]);
  return Array.from({ length: across * along }, (_, index) => {
    const a = ((index % across) + 0.5) * stepU;
    const b = (Math.floor(index / across) + 0.5) * stepV;
    const place = (axis: 0 | 1 | 2): number => origin[axis] + a * u[axis] + b * v[axis];
    return { centre: [place(0), place(1), place(2)], energy: map.energy[0][index] + map.energy[1][index] };
  });
}
