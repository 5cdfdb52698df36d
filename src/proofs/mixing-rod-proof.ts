import type { RecordedMap } from '../tallies/run-tallies.js';
import type { Estimate } from './estimate.js';
import { compare } from './judge-case.js';
import { rodShare } from './method-of-images.js';
import type { Proof, ProofCase, ProofContext } from './proof.js';
import { cell, detector, ENDLESS, lambertianDisc, part, pump } from './proof-cells.js';
import { traceCell } from './trace-cell.js';

const PIXELS = 4;
/** Length over side, place of the source from the axis. */
const RODS = [
  [0.5, [0.25, 0]],
  [0.5, [0.25, 0.25]],
  [1, [0, 0]],
] as const;
/** Cells of the exit plane, counted from its corner (−x, −y): a corner, an edge, one next to the axis on either side. */
const CELLS = [
  [0, 0],
  [3, 1],
  [1, 1],
  [2, 2],
] as const;

export const mixingRodProof: Proof = {
  name: 'Mixing rod',
  law: 'irradiance behind a square rod with perfect walls is the sum over all mirror images of the source',
  source: 'method of images; point values in the mixing-rod table, five decimals',
  status: 'exact',
  async run(context) {
    const cases: ProofCase[] = [];
    for (const [length, source] of RODS) cases.push(...(await rod(context, length, source)));
    return cases;
  },
};

async function rod(context: ProofContext, length: number, source: readonly [number, number]): Promise<ProofCase[]> {
  const title = `rod of length ${length}, source at (${source.join(', ')})`;
  const tallies = await traceCell(
    context,
    cell(title, {
      media: [],
      parts: [part('rod', 'air', { kind: 'box', size: [1, 1, length] }, { faces: ENDLESS })],
      pumps: [pump([source[0], source[1], 1e-9 - length / 2], [0, 0, 1], lambertianDisc(1e-5))],
      detectors: [detector('end', { kind: 'face', face: 'rod.top' }, [PIXELS, PIXELS])],
      exit: 'rod.top',
    }),
  );
  const map = tallies.maps.find(({ where }) => where === 'end');
  if (!map) throw new Error('the detector at the end of the rod has no map');
  return CELLS.map(([i, j]) => {
    const edges = (cellIndex: number): [number, number] => [cellIndex / PIXELS - 0.5, (cellIndex + 1) / PIXELS - 0.5];
    const expected = rodShare(length, source, edges(i), edges(j));
    return compare(`share of cell (${i}, ${j}), ${title}`, 'Σ images', cellShare(map, i, j), expected, 1e-6);
  });
}

/**
 * Share of the map's light in the cell whose centre is at (i, j) of the design's own x and y. Every history leaves one photon
 * at most, so the count is binomial; evenly spread starts only make the true error smaller.
 */
function cellShare(map: RecordedMap, i: number, j: number): Estimate {
  const { frame, shape, energy } = map;
  if (!frame) throw new Error('a flat map has a frame');
  const value = energy[0].map((half, index) => half + energy[1][index]);
  const total = value.reduce((sum, cellEnergy) => sum + cellEnergy, 0);
  const along = (axis: readonly number[], offset: number): number =>
    axis[0] * ((i + 0.5) / PIXELS - 0.5 - frame.origin[0]) + axis[1] * ((j + 0.5) / PIXELS - 0.5 - frame.origin[1]) - offset;
  const u = Math.floor(along(frame.u, map.extent[0][0]) * PIXELS);
  const v = Math.floor(along(frame.v, map.extent[1][0]) * PIXELS);
  const share = value[u + shape[0] * v] / total;
  const quantum = EV_PER_PHOTON;
  return { value: share, standardError: Math.sqrt((share * (1 - share) * quantum) / total) };
}
