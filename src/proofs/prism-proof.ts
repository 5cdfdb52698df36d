import type { Vector3 } from '../design/description.js';
import { radians } from './fresnel-law.js';
import { compare } from './judge-case.js';
import { type MapCell, mapCells } from './map-cells.js';
import type { Proof, ProofCase, ProofContext } from './proof.js';
import { cell, detector, medium, part, pump, thinBeam } from './proof-cells.js';
import { traceCell } from './trace-cell.js';

const INDEX = 1.5168;
const APEX = radians(60);
const SIDE_MM = 20;
const HEIGHT_MM = (SIDE_MM * Math.sqrt(3)) / 2;
/** Distance of the screen, its size and the width of its pixels. */
const AWAY_MM = 500;
const SCREEN_MM = 20.1;
const PIXELS = 201;
/** One pixel seen from the prism, degrees. */
const RESOLUTION = (SCREEN_MM / PIXELS / AWAY_MM) * (180 / Math.PI);

/** Incidence on the first face, degrees; null is the symmetric passage. */
const INCIDENCES = [null, 42, 60] as const;

export const prismProof: Proof = {
  name: 'Prism',
  law: 'deviation i₁ + i₂ − A by Snell at both faces; least, 2 arcsin(n sin(A/2)) − A, for the symmetric passage',
  source: 'Born & Wolf, Principles of Optics, §4.7.2',
  status: 'exact',
  async run(context) {
    const cases: ProofCase[] = [];
    for (const incidence of INCIDENCES) cases.push(await deviate(context, incidence));
    return cases;
  },
};

async function deviate(context: ProofContext, degrees: number | null): Promise<ProofCase> {
  const first = degrees === null ? Math.asin(INDEX * Math.sin(APEX / 2)) : radians(degrees);
  const inner = APEX - Math.asin(Math.sin(first) / INDEX);
  const last = Math.asin(INDEX * Math.sin(inner));
  const deviation = first + last - APEX;
  // Apex up: outward normals of the two faces at 150° and 30°. The beam goes up to the left face, down from the right one.
  const heading = first - radians(30);
  const inside = heading - (first - Math.asin(Math.sin(first) / INDEX));
  const entry: Vector3 = [-SIDE_MM / 4, 0, 0];
  const run = SIDE_MM / 2 / (Math.cos(inside) + Math.sin(inside) / Math.sqrt(3));
  const leaving: Vector3 = [entry[0] + run * Math.cos(inside), run * Math.sin(inside), 0];
  const out = heading - deviation;
  const away: Vector3 = [Math.cos(out), Math.sin(out), 0];
  const screen: Vector3 = [leaving[0] + AWAY_MM * away[0], leaving[1] + AWAY_MM * away[1], 0];
  const further: Vector3 = [screen[0] + away[0], screen[1] + away[1], 0];
  const title = degrees === null ? 'symmetric passage' : `incidence ${degrees} deg`;
  const h = HEIGHT_MM / 2;
  const tallies = await traceCell(
    context,
    cell(title, {
      media: [medium('glass', INDEX)],
      parts: [
        part('prism', 'glass', {
          kind: 'prism',
          outline: [
            [-SIDE_MM / 2, -h],
            [SIDE_MM / 2, -h],
            [0, h],
          ],
          height: 20,
          sides: ['base', 'right', 'left'],
        }),
      ],
      pumps: [
        pump(
          [entry[0] - 5 * Math.cos(heading), -5 * Math.sin(heading), 0],
          [Math.cos(heading), Math.sin(heading), 0],
          thinBeam(1e-3),
        ),
      ],
      detectors: [
        detector('beyond', { kind: 'plane', at: further, normal: away, outline: { kind: 'disc', radius: 100 } }),
        detector(
          'screen',
          { kind: 'plane', at: screen, normal: away, outline: { kind: 'rectangle', size: [SCREEN_MM, SCREEN_MM] } },
          [PIXELS, PIXELS],
        ),
      ],
      exit: 'beyond',
    }),
    0.05,
  );
  // Measured in the plane of the drawing: the spot's place across the beam, turned anticlockwise, lessens the deviation.
  const across = spot(mapCells(tallies.maps, 'screen'), screen, [-away[1], away[0], 0]);
  const measured = ((deviation - Math.atan(across / AWAY_MM)) * 180) / Math.PI;
  return compare(
    degrees === null ? 'least deviation of a 60° prism, degrees' : `deviation at ${degrees}° incidence, degrees`,
    degrees === null ? '2 arcsin(n sin(A/2)) − A' : 'i₁ + i₂ − A',
    { value: measured, standardError: 0 },
    (deviation * 180) / Math.PI,
    RESOLUTION,
  );
}

/** Where the light lies along a direction from a centre, mm. */
function spot(cells: readonly MapCell[], centre: Vector3, direction: Vector3): number {
  let total = 0;
  let moment = 0;
  for (const { centre: at, energy } of cells) {
    total += energy;
    moment += energy * direction.reduce((sum, d, axis) => sum + d * (at[axis] - centre[axis]), 0);
  }
  return moment / total;
}
