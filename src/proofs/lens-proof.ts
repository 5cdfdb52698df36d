import type { LensDescription, LensSurface, Vector3 } from '../design/description.js';
import { compare } from './judge-case.js';
import { backFocus, heightAt, type OpticalSurface, throughLens } from './lens-rays.js';
import { mapCells } from './map-cells.js';
import type { Proof, ProofCase, ProofContext } from './proof.js';
import { cell, detector, medium, part, pump, thinBeam } from './proof-cells.js';
import { traceCell } from './trace-cell.js';

const INDEX = 1.5168;
/** Pixels of the screen on which the ray is sought. */
const PIXELS = 4001;
const PIXEL_MM = 2e-4;

type Bend = readonly ['bulges' | 'hollow', radius: number, conic: number] | null;

interface Lens {
  readonly label: string;
  readonly front: Bend;
  readonly back: Bend;
  readonly thickness: number;
  /** Distances of the rays from the axis. */
  readonly heights: readonly number[];
}

const LENSES: readonly Lens[] = [
  {
    label: 'plano-convex, curved side first',
    front: ['bulges', 26, 0],
    back: null,
    thickness: 6,
    heights: [0.1, 6, 9],
  },
  { label: 'plano-convex, flat side first', front: null, back: ['bulges', 26, 0], thickness: 6, heights: [0.1, 6, 9] },
  { label: 'biconvex', front: ['bulges', 40, 0], back: ['bulges', 30, 0], thickness: 8, heights: [0.1, 8] },
  { label: 'meniscus', front: ['bulges', 20, 0], back: ['hollow', 45, 0], thickness: 5, heights: [0.1, 6] },
  {
    label: 'ellipsoid and hollow hyperboloid',
    front: ['bulges', 20, -0.6],
    back: ['hollow', 60, -3],
    thickness: 5,
    heights: [0.1, 7],
  },
  {
    label: 'thick, far half of the ball cut off',
    front: ['bulges', 12, 0],
    back: null,
    thickness: 22,
    heights: [0.1, 5],
  },
];

const surfaceOf = (bend: Bend): LensSurface =>
  bend === null ? { kind: 'flat' } : { kind: bend[0], radius: bend[1], conic: bend[2] };

/** Centre behind the surface: positive. A front that bulges and a back that is hollow have it there. */
const opticalOf = (bend: Bend, first: boolean): OpticalSurface =>
  bend === null
    ? { radius: null, conic: 0 }
    : { radius: (bend[0] === 'bulges') === first ? bend[1] : -bend[1], conic: bend[2] };

export const lensProof: Proof = {
  name: 'Lenses',
  law: 'rays near the axis meet at the back focus of a thick lens; others miss it by the spherical aberration of an exact ray',
  source: 'Born & Wolf, Principles of Optics, §4.4; Kingslake & Johnson, Lens Design Fundamentals (2010), ch. 2',
  status: 'computed here',
  async run(context) {
    const cases: ProofCase[] = [];
    for (const lens of LENSES) {
      for (const height of lens.heights) cases.push(await ray(context, lens, height));
    }
    cases.push(...(await stigmatic(context)));
    return cases;
  },
};

/** Height at which a ray that comes in parallel to the axis crosses the plane of the focus. */
async function ray(context: ProofContext, lens: Lens, height: number): Promise<ProofCase> {
  const [first, second] = [opticalOf(lens.front, true), opticalOf(lens.back, false)];
  const { thickness } = lens;
  const focus = backFocus(first, second, thickness, INDEX);
  const expected = heightAt(throughLens(first, second, thickness, INDEX, height), thickness + focus);
  const found = await crossing(context, lens, height, focus, expected);
  const near = height < 1;
  return compare(
    `${lens.label}, ray ${height} mm from the axis, mm off the axis at the focus`,
    near ? 'f(1 − (n − 1)t/(n R₁))' : 'exact meridional ray',
    { value: found, standardError: 0 },
    near ? 0 : expected,
    // Next to the axis the aberration is of the third power of the height: far below the width of a pixel.
    PIXEL_MM / 2,
  );
}

async function crossing(
  context: ProofContext,
  { label, front, back, thickness }: Lens,
  height: number,
  focus: number,
  near: number,
): Promise<number> {
  const shape: LensDescription = {
    kind: 'lens',
    outline: { kind: 'disc', radius: 10 },
    thickness,
    profile: 'round',
    front: surfaceOf(front),
    back: surfaceOf(back),
  };
  // The own centre is that of the bounding box, which a hollow back widens beyond its vertex.
  const backVertex = backVertexOf(shape);
  const size = PIXELS * PIXEL_MM;
  // The middle of a pixel on the axis, the screen near where the ray is wanted.
  const middle = PIXEL_MM * Math.round(near / PIXEL_MM);
  const centre: Vector3 = [middle, backVertex + focus, 0];
  const tallies = await traceCell(
    context,
    cell(`${label}, ${height} mm`, {
      media: [medium('glass', INDEX)],
      parts: [part('lens', 'glass', shape)],
      pumps: [pump([height, -40, 0], [0, 1, 0], thinBeam(1e-7))],
      detectors: [
        detector(
          'screen',
          { kind: 'plane', at: centre, normal: [0, 1, 0], outline: { kind: 'rectangle', size: [size, 1] } },
          [PIXELS, 1],
        ),
      ],
      exit: 'lens.edge',
    }),
    0.02,
  );
  // Ghosts of light reflected twice are weaker than the ray.
  const [brightest] = mapCells(tallies.maps, 'screen').toSorted((a, b) => b.energy - a.energy);
  return brightest.energy > 0 ? brightest.centre[0] : Number.NaN;
}

function backVertexOf(shape: LensDescription): number {
  const rim = (surface: LensSurface): number => {
    if (surface.kind === 'flat') return 0;
    const { radius, conic } = surface;
    const depth = 100 / (radius + Math.sqrt(radius ** 2 - (1 + conic) * 100));
    return surface.kind === 'bulges' ? depth : -depth;
  };
  const low = Math.min(0, rim(shape.front));
  const high = Math.max(shape.thickness, shape.thickness - rim(shape.back));
  return shape.thickness - (low + high) / 2;
}

/** Conicoids that bring parallel light to one point: k = −n² behind the glass, k = −1/n² within it. */
async function stigmatic(context: ProofContext): Promise<ProofCase[]> {
  const hyperbolic: Lens = {
    label: 'flat and hyperboloid of k = −n²',
    front: null,
    back: ['bulges', 12, -(INDEX ** 2)],
    thickness: 8,
    heights: [],
  };
  const focus = 12 / (INDEX - 1);
  const cases: ProofCase[] = [];
  for (const height of [3, 8]) {
    const found = await crossing(context, hyperbolic, height, focus, 0);
    const label = `${hyperbolic.label}, ray ${height} mm from the axis, mm off the axis at R/(n − 1)`;
    cases.push(compare(label, '0, exactly', { value: found, standardError: 0 }, 0, PIXEL_MM / 2));
  }
  return cases;
}
