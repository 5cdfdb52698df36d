import { fateShare, figureMean } from './estimate.js';
import { compare } from './judge-case.js';
import type { Proof, ProofCase } from './proof.js';
import { cell, dye, ENDLESS, medium, part, pump, thinBeam, twoColour } from './proof-cells.js';
import { slotsOf } from './slots-of.js';
import { traceCell } from './trace-cell.js';

/** Pump depth, depth at the emission wavelength, yield; emitted through the front and the back, emissions per pump photon. */
const ROWS = [
  [1, 0.2, 0.9, 0.284602, 0.265044, 0.742271],
  [3, 1, 0.97, 0.538003, 0.343105, 2.234402],
  [3, 3, 0.9, 0.395824, 0.164781, 3.506467],
] as const;
const ROUNDING = 1e-6;

export const twoColourSlabProof: Proof = {
  name: 'Pumped slab with reabsorption',
  law: 'G = φ[τ_p exp(−τ_p x) + (τ_e/2)∫E₁(τ_e|x − y|)G dy]: source of emission in a matched slab pumped along its normal',
  source:
    'own Nyström solution of the integral equation (800 nodes); its one-colour case agrees with the slab tables to 1e-6',
  status: 'computed here',
  async run(context) {
    const cases: ProofCase[] = [];
    for (const [pumpDepth, ownDepth, quantumYield, front, back, generated] of ROWS) {
      const tallies = await traceCell(
        context,
        cell(`depths ${pumpDepth} and ${ownDepth}, yield ${quantumYield}`, {
          media: [
            medium('dyed', 1.36, { dyes: [dye('dye', twoColour(pumpDepth, ownDepth), quantumYield)] }),
            medium('matched', 1.36),
          ],
          around: 'matched',
          parts: [part('slab', 'dyed', { kind: 'box', size: [10, 10, 1] }, { faces: ENDLESS })],
          pumps: [pump([0, 0, 1], [0, 0, -1], thinBeam())],
          exit: 'slab.bottom',
        }),
        0.5,
      );
      const where = `pump depth ${pumpDepth}, own depth ${ownDepth}, yield ${quantumYield}`;
      const table = 'two-colour slab table';
      const leftFront = fateShare(tallies, slotsOf({ fate: 'left-elsewhere', light: 'emitted', where: 'slab.top' }));
      cases.push(
        compare(`emitted through the pumped face, ${where}`, table, leftFront, front, ROUNDING),
        compare(
          `emitted through the far face, ${where}`,
          table,
          figureMean(tallies, { exitPhotons: 1 }),
          back,
          ROUNDING,
        ),
        compare(
          `emissions per pump photon, ${where}`,
          table,
          figureMean(tallies, { emissions: 1 }),
          generated,
          ROUNDING,
        ),
      );
    }
    return cases;
  },
};
