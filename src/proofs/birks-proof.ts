import { figureRatio } from './estimate.js';
import { compare } from './judge-case.js';
import type { Proof, ProofCase } from './proof.js';
import { cell, dye, medium, part, pump, thinBeam, twoColour } from './proof-cells.js';
import { traceCell } from './trace-cell.js';

/** Depth of the cell at the emission wavelength across 1 mm, yield of the dye. */
const ROWS = [
  [0.5, 0.95],
  [2, 0.9],
  [8, 0.7],
] as const;
/** Index-matched all round, so that light leaves where it meets a face. */
const CUBE_MM = 1;

export const birksProof: Proof = {
  name: 'Yield of a dye that takes its own light back',
  law: "Φ' = Φ(1 − a)/(1 − aΦ), a the share of emitted photons that is absorbed again",
  source: 'Birks, Photophysics of Aromatic Molecules (1970), from memory; a as counted in the same trace',
  status: 'exact',
  async run(context) {
    const cases: ProofCase[] = [];
    for (const [depth, quantumYield] of ROWS) {
      const tallies = await traceCell(
        context,
        cell(`Birks, depth ${depth}, yield ${quantumYield}`, {
          media: [
            medium('dyed', 1.36, { dyes: [dye('dye', twoColour(3, depth), quantumYield)] }),
            medium('matched', 1.36),
          ],
          around: 'matched',
          parts: [part('cube', 'dyed', { kind: 'box', size: [CUBE_MM, CUBE_MM, CUBE_MM] })],
          pumps: [pump([0, 0, 1], [0, 0, -1], thinBeam(0.2))],
          exit: 'cube.bottom',
        }),
        0.5,
      );
      const again = figureRatio(tallies, { reabsorptions: 1 }, { emissions: 1 }).value;
      // What leaves: emitted photons that nothing took back.
      const apparent = figureRatio(tallies, { emissions: 1, reabsorptions: -1 }, { pumpAbsorbed: 1 });
      const expected = (quantumYield * (1 - again)) / (1 - again * quantumYield);
      const label = `photons out per pump photon absorbed, depth ${depth}, yield ${quantumYield}, a = ${again.toFixed(3)}`;
      cases.push(compare(label, 'Φ(1 − a)/(1 − aΦ)', apparent, expected));
      const lengthened = figureRatio(tallies, { dyeAbsorptions: 1 }, { pumpAbsorbed: 1 });
      cases.push(
        compare(
          `excitations per pump photon absorbed, depth ${depth}, yield ${quantumYield}`,
          '1/(1 − aΦ)',
          lengthened,
          1 / (1 - again * quantumYield),
        ),
      );
    }
    return cases;
  },
};
