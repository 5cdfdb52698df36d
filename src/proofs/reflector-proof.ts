import type { ShapeDescription, Vector2, Vector3 } from '../design/description.js';
import { fateShare } from './estimate.js';
import { radians } from './fresnel-law.js';
import { compare } from './judge-case.js';
import type { Proof, ProofCase, ProofContext } from './proof.js';
import { cell, detector, part, piece, pump } from './proof-cells.js';
import { slotsOf } from './slots-of.js';
import { traceCell } from './trace-cell.js';
import { throughWedge } from './unfolded-taper.js';

/** Of the hole at the focus that all light must find. */
const PINHOLE_MM = 1e-5;

export const reflectorProof: Proof = {
  name: 'Reflectors',
  law: 'a paraboloid brings axial light to its focus; a compound parabolic trough passes all light within its half angle and none beyond; a taper what meets its images',
  source:
    'conic sections; Welford & Winston, High Collection Nonimaging Optics (1989), ch. 4; Williamson, J. Opt. Soc. Am. 42 712 (1952), from memory',
  status: 'exact',
  async run(context) {
    const cases: ProofCase[] = [await paraboloid(context, 4), await paraboloid(context, 7)];
    for (const share of [0, 0.5, 0.99, 1.01, 1.5]) cases.push(await concentrator(context, 'trough', 40, share));
    // In the crossed form the other walls only steepen a tilt: what comes straight passes, what is beyond the angle never does.
    for (const share of [0, 1.01, 1.5]) cases.push(await concentrator(context, 'square', null, share));
    // Axial light meets the round wall in planes of the axis, where it is the same curve.
    cases.push(await concentrator(context, 'round', null, 0));
    for (const degrees of [5, 15, 20, 30]) cases.push(await taper(context, degrees));
    return cases;
  },
};

/** Parallel light down a taper with two slanting walls; what turns back leaves by the wide end. */
async function taper(context: ProofContext, degrees: number): Promise<ProofCase> {
  const [narrow, wide, height] = [1, 3, 10];
  const angle = radians(degrees);
  const title = `mirrored taper of 3 to 1, light at ${degrees}°`;
  const end = (half: number): Vector2[] => [
    [-half, -20],
    [half, -20],
    [half, 20],
    [-half, 20],
  ];
  const down: Vector3 = [Math.sin(angle), 0, -Math.cos(angle)];
  const back = 5;
  const tallies = await traceCell(
    context,
    cell(title, {
      media: [],
      parts: [
        part(
          'taper',
          'air',
          { kind: 'frustum', bottom: end(narrow), top: end(wide), height, sides: ['front', 'right', 'back', 'left'] },
          { faces: { left: 'perfect', right: 'perfect' } },
        ),
      ],
      pumps: [
        pump([-back * down[0], 0, height / 2 - back * down[2]], down, {
          kind: 'patch',
          outline: { kind: 'rectangle', size: [2, 2 * wide * Math.cos(angle) * 0.9999] },
          divergence: [0, 0],
        }),
      ],
      exit: 'taper.bottom',
    }),
    0.5,
  );
  return compare(
    `comes through, ${title}`,
    'lines that meet the polygon of images',
    fateShare(tallies, slotsOf({ where: 'taper.bottom' })),
    throughWedge(narrow, wide, height, angle),
    // The beam stops a hair within the wide end.
    2e-4,
  );
}

/** A mirrored bowl taken out of a block; a beam beside the axis must leave through a pinhole at the focus. */
async function paraboloid(context: ProofContext, beside: number): Promise<ProofCase> {
  const bowl: ShapeDescription = { kind: 'paraboloid', focalLength: 5, height: 8 };
  const title = `paraboloid of focal length 5, beam ${beside} mm beside the axis`;
  const tallies = await traceCell(
    context,
    cell(title, {
      media: [],
      parts: [
        part(
          'block',
          'air',
          [
            piece(
              { kind: 'cylinder', radius: 14, height: 10 },
              { minus: [piece(bowl, { name: 'bowl', at: [0, 0, 1] })] },
            ),
          ],
          { faces: { 'bowl.bowl': 'perfect' } },
        ),
      ],
      pumps: [
        pump([beside, 0, 30], [0, 0, -1], { kind: 'patch', outline: { kind: 'disc', radius: 1 }, divergence: [0, 0] }),
      ],
      detectors: [
        // The vertex lies at −3.
        detector(
          'pinhole',
          { kind: 'plane', at: [0, 0, 2], normal: [0, 0, 1], outline: { kind: 'disc', radius: PINHOLE_MM } },
          [1, 1],
        ),
      ],
      exit: 'pinhole',
    }),
    0.2,
  );
  return compare(
    `through a pinhole of 10 nm at the focus, ${title}`,
    '1',
    fateShare(tallies, slotsOf({ where: 'pinhole' })),
    1,
  );
}

/** Parallel light that fills the large end; the share that comes out of the small one. */
async function concentrator(
  context: ProofContext,
  form: 'trough' | 'square' | 'round',
  length: number | null,
  share: number,
): Promise<ProofCase> {
  const halfAngle = radians(25);
  const smallEnd = 2;
  const large = smallEnd / Math.sin(halfAngle);
  const height = (smallEnd + large) / Math.tan(halfAngle);
  const angle = share * halfAngle;
  const title = `${form} of 25°, light at ${share} of that`;
  const down: Vector3 = [Math.sin(angle), 0, -Math.cos(angle)];
  const back = 5;
  const tallies = await traceCell(
    context,
    cell(title, {
      media: [],
      parts: [
        part(
          'trough',
          'air',
          { kind: 'concentrator', form, halfAngle, smallEnd, height, length, slices: 40 },
          { faces: { '*': 'perfect', top: 'clear', bottom: 'clear' } },
        ),
      ],
      pumps: [
        pump([-back * down[0], 0, height / 2 - back * down[2]], down, {
          kind: 'patch',
          outline:
            form === 'round'
              ? { kind: 'disc', radius: large * 0.9999 }
              : { kind: 'rectangle', size: sides(form, large, angle) },
          divergence: [0, 0],
        }),
      ],
      exit: 'trough.bottom',
    }),
    0.1,
  );
  return compare(
    `comes through, ${title}`,
    share < 1 ? '1 within the half angle' : '0 beyond it',
    fateShare(tallies, slotsOf({ where: 'trough.bottom' })),
    share < 1 ? 1 : 0,
  );
}

/** A hair within the large end, as seen along the beam: u lies along y, v in the plane of the tilt. */
function sides(form: 'trough' | 'square', large: number, angle: number): [number, number] {
  const tilt = 2 * large * Math.cos(angle) * 0.9999;
  const along = form === 'square' ? 2 * large * 0.9999 : 2;
  return [along, tilt];
}
