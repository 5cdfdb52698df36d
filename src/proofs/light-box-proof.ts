import { fateShare, figureMean } from './estimate.js';
import { compare } from './judge-case.js';
import type { Proof, ProofCase } from './proof.js';
import { cell, diffuser, ENDLESS, part, pump, thinBeam } from './proof-cells.js';
import { slotsOf } from './slots-of.js';
import { traceCell } from './trace-cell.js';

/** White floor, diffusing sheet: reflectances and transmittance. */
const FLOOR = 0.9;
const SHEET = { reflects: 0.6, transmits: 0.35 } as const;

/**
 * Cube of diffuse walls with one face open, floor lit evenly at right angles: wall reflectance, share that leaves. Radiosity
 * on 5 × 24² patches with exact patch-to-patch view factors, extrapolated to no patches at all.
 */
const CUBES = [
  [0.5, 0.155175],
  [0.9, 0.615835],
  [0.98, 0.897075],
] as const;
const CUBE_ERROR = 3e-5;

export const lightBoxProof: Proof = {
  name: 'White boxes',
  law: 'a flat box lets out tρ/(1 − ρr): multiplier 1/(1 − ρr); a cube obeys its radiosity equation',
  source:
    'geometric series; radiosity (Siegel & Howell, Thermal Radiation Heat Transfer) solved independently, no printed table known to us',
  status: 'computed here',
  async run(context) {
    const cases: ProofCase[] = [];
    const flat = await traceCell(
      context,
      cell('flat box', {
        media: [],
        finishes: [diffuser('floor', FLOOR), diffuser('sheet', SHEET.reflects, SHEET.transmits)],
        parts: [
          part(
            'box',
            'air',
            { kind: 'box', size: [10, 10, 1] },
            {
              faces: { ...ENDLESS, bottom: 'floor', top: 'sheet' },
            },
          ),
        ],
        pumps: [pump([0, 0, 0], [0, 0, -1], thinBeam())],
        exit: 'box.top',
      }),
    );
    const multiplier = 1 / (1 - FLOOR * SHEET.reflects);
    const absorbedAt = (face: string) => fateShare(flat, slotsOf({ fate: 'absorbed-by-finish', where: `box.${face}` }));
    cases.push(
      compare(
        'out of a flat box',
        'ρt/(1 − ρr)',
        figureMean(flat, { leakPhotons: 1 }),
        FLOOR * SHEET.transmits * multiplier,
      ),
      compare('absorbed by its floor', '(1 − ρ)/(1 − ρr)', absorbedAt('bottom'), (1 - FLOOR) * multiplier),
      compare(
        'absorbed by its sheet',
        'ρ(1 − r − t)/(1 − ρr)',
        absorbedAt('top'),
        FLOOR * (1 - SHEET.reflects - SHEET.transmits) * multiplier,
      ),
    );
    for (const [reflectance, expected] of CUBES) {
      const tallies = await traceCell(
        context,
        cell(`cube ${reflectance}`, {
          media: [],
          finishes: [diffuser('white', reflectance)],
          parts: [part('cube', 'air', { kind: 'box', size: [1, 1, 1] }, { faces: { '*': 'white', top: 'clear' } })],
          pumps: [
            pump([0, 0, 0], [0, 0, -1], {
              kind: 'patch',
              outline: { kind: 'rectangle', size: [1 - 1e-9, 1 - 1e-9] },
              divergence: [0, 0],
            }),
          ],
          exit: 'cube.top',
        }),
      );
      cases.push(
        compare(
          `out of a white cube, ρ = ${reflectance}`,
          'radiosity',
          figureMean(tallies, { leakPhotons: 1 }),
          expected,
          CUBE_ERROR,
        ),
      );
    }
    return cases;
  },
};
