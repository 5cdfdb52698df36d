import { fateShare } from './estimate.js';
import { glowing, innerSource } from './inner-source.js';
import { compare } from './judge-case.js';
import type { Proof, ProofCase } from './proof.js';
import { cell, ENDLESS, part } from './proof-cells.js';
import { slotsOf } from './slots-of.js';
import { traceCell } from './trace-cell.js';

/** Index, trapped share, share of the histories: each trapped photon takes thousands of reflections to be known as one. */
const BLOCKS = [
  [1.2, 0, 1 / 20],
  [1.3614, 0.064509, 1 / 40],
  [1.5168, 0.255685, 1 / 80],
] as const;

export const trappedLightProof: Proof = {
  name: 'Light trapped for ever',
  law: 'a lossless polished block keeps 3√(1 − 1/n²) − 2 (n ≥ √2; nothing below √1.5), a plate without end √(1 − 1/n²)',
  source: 'Weber & Lambe, Appl. Opt. 15 2299 (1976); below √2 overlapping cones by quadrature',
  status: 'computed here',
  async run(context) {
    const cases: ProofCase[] = [];
    for (const [index, expected, share] of BLOCKS) {
      const tallies = await traceCell(
        context,
        cell(`block, n ${index}`, {
          media: [glowing('glass', index)],
          parts: [part('block', 'glass', { kind: 'box', size: [3, 4, 5] })],
          pumps: [innerSource([0.3, 0.2, -0.1])],
          exit: 'block.top',
        }),
        share,
      );
      cases.push(
        compare(
          `trapped in a block of n = ${index} in air`,
          index === 1.2 ? 'none below n = √1.5' : 'three pairs of cones',
          fateShare(tallies, slotsOf({ fate: 'trapped' })),
          expected,
          5e-7,
        ),
      );
    }
    const plate = await traceCell(
      context,
      cell('endless plate', {
        media: [glowing('glass', 1.5168)],
        parts: [part('plate', 'glass', { kind: 'box', size: [3, 4, 5] }, { faces: ENDLESS })],
        pumps: [innerSource([0.3, 0.2, -0.1])],
        exit: 'plate.top',
      }),
      1 / 150,
    );
    cases.push(
      compare(
        'trapped in a plate without end, n = 1.5168',
        '√(1 − 1/n²)',
        fateShare(plate, slotsOf({ fate: 'trapped' })),
        Math.sqrt(1 - 1 / 1.5168 ** 2),
      ),
    );
    return cases;
  },
};
