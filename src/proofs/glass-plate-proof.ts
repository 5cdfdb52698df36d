import type { Description } from '../design/description.js';
import { fateShare, figureMean } from './estimate.js';
import { AT_ONCE } from './inner-source.js';
import { compare } from './judge-case.js';
import type { Proof, ProofCase } from './proof.js';
import { cell, dye, EMISSION_NM, ENDLESS, medium, part, pump, twoColour } from './proof-cells.js';
import { traceCell } from './trace-cell.js';

/** Index of the plate in its surroundings of 1, depth of the whole plate, yield, share that leaves through both faces. */
const ROWS = [
  [1.36, 0.5, 0, 0.23177],
  [1.36, 1, 0.9, 0.68193],
  [1.36, 5, 0.95, 0.49499],
  [1.5, 1, 0.99, 0.94229],
  [1.5, 2, 0.5, 0.16665],
] as const;
/** The same without surface reflection: Case, de Hoffmann & Placzek (1953) at yield 0. */
const MATCHED_ROWS = [
  [1, 0, 0.390308],
  [2, 0.9, 0.743179],
] as const;

export const glassPlateProof: Proof = {
  name: 'Dyed plate lit evenly inside',
  law: 'share of isotropic light, started evenly through a plate, that leaves after total reflection and re-emission',
  source:
    'own discrete-ordinates solution with Fresnel faces (5 decimals); matched faces: Case, de Hoffmann & Placzek, Introduction to the Theory of Neutron Diffusion (1953)',
  status: 'computed here',
  async run(context) {
    const cases: ProofCase[] = [];
    for (const [index, depth, quantumYield, expected] of ROWS) {
      // By symmetry a plate of half the depth on a perfect mirror lets out the same share, all of it through one face.
      const tallies = await traceCell(context, plate(index, 1, depth / 2, quantumYield, 'perfect'), 0.3);
      const label = `leaves a plate of n = ${index}, depth ${depth}, yield ${quantumYield}`;
      cases.push(compare(label, 'plate table, mirrored half', figureMean(tallies, { exitPhotons: 1 }), expected, 1e-5));
    }
    for (const [depth, quantumYield, expected] of MATCHED_ROWS) {
      const tallies = await traceCell(context, plate(1.36, 1.36, depth, quantumYield), 0.5);
      const left = fateShare(
        tallies,
        ({ fate, light }) => light === 'emitted' && (fate === 'left-by-exit' || fate === 'left-elsewhere'),
      );
      const label = `leaves a matched plate of depth ${depth}, yield ${quantumYield}`;
      cases.push(
        compare(label, quantumYield === 0 ? '(1 − 2E₃(τ))/2τ' : 'slab table, by reciprocity', left, expected, 1e-6),
      );
    }
    return cases;
  },
};

/**
 * A sheet of pump light as high as the plate is thick runs along it and is taken at once: the first emission is even across
 * the thickness, whatever the depth along the sheet, because the side mirrors make the plate endless.
 */
function plate(index: number, around: number, depth: number, quantumYield: number, bottom = 'clear'): Description {
  const dyes = [dye('starter', twoColour(AT_ONCE, 0), 1), dye('dye', twoColour(0, depth), quantumYield, EMISSION_NM)];
  return cell(`plate n ${index} in ${around}, depth ${depth}, yield ${quantumYield}`, {
    media: [medium('dyed', index, { dyes }), medium('outside', around)],
    around: 'outside',
    parts: [part('plate', 'dyed', { kind: 'box', size: [10, 10, 1] }, { faces: { ...ENDLESS, bottom } })],
    pumps: [
      pump([0, 0, 0], [1, 0, 0], {
        kind: 'patch',
        outline: { kind: 'rectangle', size: [1 - 1e-9, 1 - 1e-9] },
        divergence: [0, 0],
      }),
    ],
    exit: 'plate.top',
  });
}
