import { fateShare, figureMean } from './estimate.js';
import { compare } from './judge-case.js';
import type { Proof, ProofCase } from './proof.js';
import { cell, lambertianDisc, medium, part, pump } from './proof-cells.js';
import { slotsOf } from './slots-of.js';
import { traceCell } from './trace-cell.js';

/** Index, hemispherical reflectance from air, the same from inside. Six decimals from the closed form of Walsh (1926). */
const ROWS = [
  [1.33, 0.065931, 0.471949],
  [1.5, 0.091778, 0.596346],
] as const;
const ROUNDING = 5e-7;
/** Distance of the source from the face, mm: so near that a face of 40 mm catches all but one ray in 10⁸. */
const NEAR_MM = 0.002;

export const diffuseFresnelProof: Proof = {
  name: 'Fresnel reflection of diffuse light',
  law: 'R of Lambertian light on a plane face, from outside and from inside: 1 − r_i = (1 − r_e)/n²',
  source: 'Walsh (1926) closed form; Duntley, J. Opt. Soc. Am. 32 61 (1942)',
  status: 'computed here',
  async run(context) {
    const cases: ProofCase[] = [];
    for (const [index, external, internal] of ROWS) {
      const block = part(
        'block',
        'glass',
        { kind: 'box', size: [40, 40, 10] },
        { faces: { '*': 'black', top: 'clear' } },
      );
      const contents = {
        media: [medium('glass', index)],
        parts: [block],
        exit: 'block.top',
      };
      const outside = await traceCell(
        context,
        cell(`diffuse from air, n ${index}`, {
          ...contents,
          pumps: [pump([0, 0, 5 + NEAR_MM], [0, 0, -1], lambertianDisc(0.01))],
        }),
      );
      const inside = await traceCell(
        context,
        cell(`diffuse from inside, n ${index}`, {
          ...contents,
          pumps: [pump([0, 0, 5 - NEAR_MM], [0, 0, 1], lambertianDisc(0.01))],
        }),
      );
      cases.push(
        compare(
          `diffuse R from air onto n = ${index}`,
          'Duntley 1942; printed 0.066 (1.33), 0.092 (1.5)',
          fateShare(outside, slotsOf({ fate: 'reflected-at-entry', where: 'block.top' })),
          external,
          ROUNDING,
        ),
        compare(
          `diffuse T from inside n = ${index}`,
          '1 − r_i; printed r_i 0.472 (1.33), 0.596 (1.5)',
          figureMean(inside, { leakPhotons: 1 }),
          1 - internal,
          ROUNDING,
        ),
      );
    }
    return cases;
  },
};
