import { figureMean, figureRatio } from './estimate.js';
import { glowing, innerSource } from './inner-source.js';
import { compare } from './judge-case.js';
import type { Proof, ProofCase } from './proof.js';
import { cell, dye, medium, part, pump, twoColour } from './proof-cells.js';
import { traceCell } from './trace-cell.js';

const INDEX = 1.5168;
const RADIUS_MM = 5;
/** Absorption on the way from the centre to the surface. */
const DEPTHS = [0, 0.4, 1.5] as const;
/** Optical radius, first-flight escape of an even isotropic source in a matched sphere. */
const EVEN = [
  [0.5, 0.707277],
  [2, 0.332418],
] as const;
/** Optical radius at the pump: so thin that the first absorption is even to a part in a thousand. */
const THIN = 0.03;

export const glassSphereProof: Proof = {
  name: 'Isotropic light in a sphere',
  law: 'from the centre (1 − R)e^(−τ)/(1 − Re^(−2τ)) leaves, R at normal incidence; evenly started, 3/(8x³)[2x² − 1 + (1 + 2x)e^(−2x)]',
  source:
    'Fresnel law and geometric series; Case, de Hoffmann & Placzek, Introduction to the Theory of Neutron Diffusion (1953)',
  status: 'exact',
  async run(context) {
    const cases: ProofCase[] = [];
    const reflectance = ((INDEX - 1) / (INDEX + 1)) ** 2;
    for (const depth of DEPTHS) {
      const tallies = await traceCell(
        context,
        cell(`centre, depth ${depth}`, {
          media: [glowing('glass', INDEX, twoColour(0, depth / RADIUS_MM))],
          parts: [part('ball', 'glass', { kind: 'sphere', radius: RADIUS_MM })],
          pumps: [innerSource()],
          exit: 'ball.surface',
        }),
        0.5,
      );
      const expected = ((1 - reflectance) * Math.exp(-depth)) / (1 - reflectance * Math.exp(-2 * depth));
      cases.push(
        compare(
          `from the centre of a glass sphere, depth ${depth}`,
          '(1 − R)e^(−τ)/(1 − Re^(−2τ))',
          figureMean(tallies, { exitPhotons: 1 }),
          expected,
          1e-6,
        ),
      );
    }
    for (const [depth, expected] of EVEN) {
      const absorption = twoColour(THIN / RADIUS_MM, 0);
      const tallies = await traceCell(
        context,
        cell(`even, depth ${depth}`, {
          media: [
            medium('dyed', 1.36, {
              absorption: twoColour(0, depth / RADIUS_MM),
              dyes: [dye('starter', absorption, 1)],
            }),
            medium('matched', 1.36),
          ],
          around: 'matched',
          parts: [part('ball', 'dyed', { kind: 'sphere', radius: RADIUS_MM })],
          pumps: [
            pump([0, 0, -20], [0, 0, 1], {
              kind: 'patch',
              outline: { kind: 'disc', radius: RADIUS_MM },
              divergence: [0, 0],
            }),
          ],
          exit: 'ball.surface',
        }),
      );
      cases.push(
        compare(
          `first flight out of a matched sphere, µR = ${depth}`,
          'Case, de Hoffmann & Placzek',
          figureRatio(tallies, { exitPhotons: 1 }, { emissions: 1 }),
          expected,
          1e-3,
        ),
      );
    }
    return cases;
  },
};
