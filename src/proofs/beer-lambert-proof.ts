import { fateShare, figureMean } from './estimate.js';
import { compare } from './judge-case.js';
import type { Proof, ProofCase } from './proof.js';
import { cell, dye, ENDLESS, medium, part, pump, thinBeam } from './proof-cells.js';
import { slotsOf } from './slots-of.js';
import { traceCell } from './trace-cell.js';

const DEPTH_MM = 10;
const DEPTHS = [0.5, 2, 5] as const;
/** How the absorption is shared between two dark dyes and the solvent. */
const SHARES = { weak: 0.3, strong: 0.5, solvent: 0.2 } as const;

export const beerLambertProof: Proof = {
  name: 'Beer–Lambert transmission',
  law: 'T = exp(−µd); what absorbs is drawn in proportion to its own µ',
  source: 'Bouguer–Lambert–Beer law, in any textbook of optics',
  status: 'exact',
  async run(context) {
    const cases: ProofCase[] = [];
    for (const depth of DEPTHS) {
      const absorption = depth / DEPTH_MM;
      const tallies = await traceCell(
        context,
        cell(`optical depth ${depth}`, {
          media: [
            medium('bath', 1.36, {
              absorption: absorption * SHARES.solvent,
              dyes: [dye('weak', absorption * SHARES.weak, 0), dye('strong', absorption * SHARES.strong, 0)],
            }),
            medium('matched', 1.36),
          ],
          around: 'matched',
          parts: [part('bath', 'bath', { kind: 'box', size: [4, 4, DEPTH_MM] }, { faces: ENDLESS })],
          pumps: [pump([0, 0, -DEPTH_MM / 2 - 1], [0, 0, 1], thinBeam(1))],
          exit: 'bath.top',
        }),
      );
      cases.push(
        compare(
          `transmission at optical depth ${depth}`,
          'exp(−µd)',
          figureMean(tallies, { leakPhotons: 1 }),
          Math.exp(-depth),
        ),
      );
      if (depth !== 2) continue;
      for (const [name, share] of Object.entries(SHARES)) {
        const absorbed = fateShare(
          tallies,
          slotsOf(name === 'solvent' ? { fate: 'absorbed-by-solvent' } : { fate: 'lost-in-dye', by: name }),
        );
        cases.push(
          compare(
            `absorbed by the ${name}${name === 'solvent' ? '' : ' dye'}, optical depth 2`,
            '(µ_i/µ)(1 − exp(−µd))',
            absorbed,
            share * -Math.expm1(-depth),
          ),
        );
      }
    }
    return cases;
  },
};
