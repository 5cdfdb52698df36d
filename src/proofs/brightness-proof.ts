import { formShares } from '../materials/acid-base.js';
import { readDye } from '../materials/library.js';
import { figureRatio } from './estimate.js';
import { compare } from './judge-case.js';
import type { Proof, ProofCase } from './proof.js';
import { cell, dye, medium, part, pump, thinBeam, twoColour } from './proof-cells.js';
import { traceCell } from './trace-cell.js';

/** pH; Σ fraction · yield of the four forms of fluorescein, were they to absorb alike. */
const ROWS = [
  [2, 0.23479],
  [4, 0.3226],
  [5.5, 0.42183],
  [6.5, 0.67141],
  [8, 0.91532],
] as const;
const ROUNDING = 1e-5;

export const brightnessProof: Proof = {
  name: 'Brightness against pH',
  law: 'Σ xᵢ φᵢ over the forms, xᵢ by Henderson and Hasselbalch; all forms made to absorb alike',
  source:
    'pKa and yields: Sjöback, Nygren & Kubista, Spectrochim. Acta A 51 L7 (1995); shares evaluated apart from this program',
  status: 'verified',
  async run(context) {
    const { forms } = readDye('fluorescein', 'water');
    const cases: ProofCase[] = [];
    for (const [pH, expected] of ROWS) {
      const shares = formShares(
        pH,
        forms.flatMap(({ pKa }) => pKa ?? []),
      );
      const dyes = forms.map(({ name, quantumYield }, i) => dye(name, twoColour(50 * shares[i], 0), quantumYield));
      const tallies = await traceCell(
        context,
        cell(`brightness at pH ${pH}`, {
          media: [medium('bath', 1.33, { dyes }), medium('matched', 1.33)],
          around: 'matched',
          parts: [part('cell', 'bath', { kind: 'box', size: [2, 2, 2] })],
          pumps: [pump([0, 0, 2], [0, 0, -1], thinBeam())],
          exit: 'cell.top',
        }),
        0.5,
      );
      const emitted = figureRatio(tallies, { emissions: 1 }, { pumpAbsorbed: 1 });
      cases.push(compare(`emitted per pump photon absorbed, pH ${pH}`, 'Σ xᵢ φᵢ', emitted, expected, ROUNDING));
    }
    return cases;
  },
};
