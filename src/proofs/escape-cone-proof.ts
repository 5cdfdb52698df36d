import { figureRatio } from './estimate.js';
import { glowing, innerSource } from './inner-source.js';
import { compare } from './judge-case.js';
import type { Proof, ProofCase } from './proof.js';
import { cell, part } from './proof-cells.js';
import { traceCell } from './trace-cell.js';

/** Index, share of isotropic light that leaves through one face at its first meeting, Fresnel losses counted (six decimals). */
const FIRST_PASS = [
  [1.33, 0.157671],
  [1.5168, 0.111601],
] as const;
/** A plate 400 times as wide as thick: light within a hair of the critical angle reaches its black rim instead. */
const WIDE_MM = 400;
const RIM_LOSS = 1e-4;

export const escapeConeProof: Proof = {
  name: 'Escape cone of an isotropic emitter',
  law: 'one face lets out (1 − √(1 − 1/n²))/2; Fresnel losses come back until the plate has let out 1 − √(1 − 1/n²)',
  source: 'Weber & Lambe, Appl. Opt. 15 2299 (1976); first pass by quadrature of the Fresnel law',
  status: 'computed here',
  async run(context) {
    const cases: ProofCase[] = [];
    for (const [index, expected] of FIRST_PASS) {
      const tallies = await traceCell(
        context,
        cell(`first pass, n ${index}`, {
          media: [glowing('glass', index)],
          parts: [
            part('block', 'glass', { kind: 'box', size: [40, 40, 2] }, { faces: { '*': 'black', top: 'clear' } }),
          ],
          pumps: [innerSource()],
          exit: 'block.top',
        }),
      );
      cases.push(
        compare(
          `out of one face at the first meeting, n = ${index}`,
          '½∫(1 − R(µ))dµ over the cone',
          figureRatio(tallies, { exitPhotons: 1 }, { emissions: 1 }),
          expected,
          5e-7,
        ),
      );
    }
    const index = 1.5168;
    const plate = await traceCell(
      context,
      cell('wide plate', {
        media: [glowing('glass', index)],
        parts: [
          part(
            'plate',
            'glass',
            { kind: 'box', size: [WIDE_MM, WIDE_MM, 1] },
            {
              faces: { '*': 'black', top: 'clear', bottom: 'perfect' },
            },
          ),
        ],
        pumps: [innerSource()],
        exit: 'plate.top',
      }),
      0.4,
    );
    cases.push(
      compare(
        `out of a wide plate on a perfect mirror, n = ${index}`,
        '1 − √(1 − 1/n²)',
        figureRatio(plate, { exitPhotons: 1 }, { emissions: 1 }),
        1 - Math.sqrt(1 - 1 / index ** 2),
        RIM_LOSS,
      ),
    );
    return cases;
  },
};
