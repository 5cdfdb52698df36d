import { EV_NM } from '../units/constants.js';
import { compare } from './judge-case.js';
import { mapCells } from './map-cells.js';
import { rodShare } from './method-of-images.js';
import type { Proof, ProofCase, ProofContext } from './proof.js';
import { cell, detector, ENDLESS, lambertianDisc, PUMP_NM, part, pump } from './proof-cells.js';
import { traceCell } from './trace-cell.js';

const PIXELS = 4;
/** The map lies this far inside the end, so that the exit does not swallow the light first. */
const BEFORE_END_MM = 1e-4;
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
      detectors: [
        detector(
          'end',
          {
            kind: 'plane',
            at: [0, 0, length / 2 - BEFORE_END_MM],
            normal: [0, 0, 1],
            outline: { kind: 'rectangle', size: [1, 1] },
          },
          [PIXELS, PIXELS],
        ),
      ],
      exit: 'rod.top',
    }),
  );
  const cells = mapCells(tallies.maps, 'end');
  const total = cells.reduce((sum, { energy }) => sum + energy, 0);
  const photons = total / (EV_NM / PUMP_NM);
  return CELLS.map(([i, j]) => {
    const edges = (index: number): [number, number] => [index / PIXELS - 0.5, (index + 1) / PIXELS - 0.5];
    const holds = (at: number, [low, high]: [number, number]): boolean => at > low && at < high;
    const found = cells.find(({ centre }) => holds(centre[0], edges(i)) && holds(centre[1], edges(j)));
    const share = (found?.energy ?? Number.NaN) / total;
    // Every history leaves one photon at most, so the count is binomial; evenly spread starts only make the true error smaller.
    const measured = { value: share, standardError: Math.sqrt((share * (1 - share)) / photons) };
    return compare(
      `share of cell (${i}, ${j}), ${title}`,
      'Σ images',
      measured,
      rodShare(length, source, edges(i), edges(j)),
      1e-6,
    );
  });
}
