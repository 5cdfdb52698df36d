import type { DissolvedDye } from '../design/description.js';
import { selfQuenching } from '../materials/self-quenching.js';
import { fateShare } from './estimate.js';
import { compare } from './judge-case.js';
import type { Proof, ProofCase } from './proof.js';
import { cell, dye, medium, part, pump, thinBeam, twoColour } from './proof-cells.js';
import { slotsOf } from './slots-of.js';
import { traceCell } from './trace-cell.js';

/** Strength, mol/L; (1 − f)/(1 − αf) of fluorescein with R₀ 5.05 nm, K 5 L/mol, and the share of single molecules. */
const ROWS = [
  [1e-3, 0.99702, 0.9902],
  [1e-2, 0.57413, 0.91608],
  [3e-2, 0.06985, 0.8054],
] as const;
const ROUNDING = 2e-5;
const DILUTE = 0.97;

export const quenchingProof: Proof = {
  name: 'Yield against strength',
  law: 'φ/φ₀ = (c_M/c)(1 − f(γ))/(1 − αf(γ)): transfer to dark dimers; what it takes is the ledger’s “quenched”',
  source: 'Bojarski, J. Lumin. 5 413 (1972); values evaluated apart from this program',
  status: 'computed here',
  async run(context) {
    const cases: ProofCase[] = [];
    for (const [strength, hopping, singles] of ROWS) {
      const law = { kind: 'transfer-to-dimers', radiusNm: 5.05, dimerRadiusNm: 5.05, pairing: 5 } as const;
      const { factor } = selfQuenching(law, strength);
      const quenched: DissolvedDye = { ...dye('dye', twoColour(50, 0), DILUTE * factor), diluteYield: DILUTE };
      const tallies = await traceCell(
        context,
        cell(`quenching at ${strength} mol/L`, {
          media: [medium('bath', 1.36, { dyes: [quenched] }), medium('matched', 1.36)],
          around: 'matched',
          parts: [part('cell', 'bath', { kind: 'box', size: [2, 2, 2] })],
          pumps: [pump([0, 0, 2], [0, 0, -1], thinBeam())],
          exit: 'cell.top',
        }),
        0.5,
      );
      const expected = DILUTE * (1 - hopping * singles);
      const share = fateShare(tallies, slotsOf({ fate: 'quenched' }));
      cases.push(compare(`quenched at ${1000 * strength} mmol/L`, 'φ₀(1 − φ/φ₀)', share, expected, ROUNDING));
      const lost = fateShare(tallies, slotsOf({ fate: 'lost-in-dye' }));
      cases.push(compare(`not re-emitted even if dilute, ${1000 * strength} mmol/L`, '1 − φ₀', lost, 1 - DILUTE));
    }
    return cases;
  },
};
