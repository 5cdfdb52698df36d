/** Area or volume of map cells, by sampling points inside each: cells on the rim of a face or of the liquid count in part. */
import type { Vector2 } from '../design/description.js';
import { bareShare } from './bare-face.js';
import type { RecorderPlan } from './compile-recorders.js';
import type { CompiledScene } from './compile-scene.js';
import type { FacePatch } from './convex-solid.js';
import { lineOfSight } from './line-of-sight.js';
import type { FacetPatch } from './mesh/facet-patch.js';
import { facetsMeasure } from './mesh/facets-measure.js';
import { RegionGraph } from './region-graph.js';
import { revolvedStretch } from './revolved.js';
import { add, dot, scale, subtract } from './vector.js';

const SAMPLES = 8;

/** Area, mm², of each cell of a recorder's map: of a face, what of it bounds its part. */
export function mapMeasure(plan: RecorderPlan, graph: RegionGraph): Float64Array {
  const [cellsU, cellsV] = plan.cells;
  if (plan.sphere !== null) return sphereMeasure(plan.sphere, cellsU, cellsV);
  const facets = plan.face === null ? [] : facetPatches(plan.face.patch);
  if (plan.face !== null && facets.length > 0) {
    const sum = new Float64Array(cellsU * cellsV);
    for (const patch of facets) {
      const own = facetsMeasure(plan, plan.face, patch, graph);
      for (let i = 0; i < sum.length; i++) sum[i] += own[i];
    }
    return sum;
  }
  const [[uLow, uHigh], [vLow, vHigh]] = plan.extent;
  const stepU = (uHigh - uLow) / cellsU;
  const stepV = (vHigh - vLow) / cellsV;
  const density = areaDensity(plan);
  const bare = bareness(plan, density, graph);
  // A flat face is convex: a cell with its four corners on it lies on it as a whole.
  const convex = plan.outline !== null || plan.face?.patch.kind === 'polygon' || plan.face?.patch.kind === 'disc';
  const measure = new Float64Array(cellsU * cellsV);
  for (let iv = 0; iv < cellsV; iv++) {
    for (let iu = 0; iu < cellsU; iu++) {
      const left = uLow + iu * stepU;
      const low = vLow + iv * stepV;
      const open = quarters(left, low, stepU, stepV).every(([u, v]) => density(u, v) > 0 && bare(u, v) === 1);
      if (convex && open && wholeCell(density, left, low, stepU, stepV)) {
        measure[iu + cellsU * iv] = stepU * stepV;
        continue;
      }
      let sum = 0;
      for (let k = 0; k < SAMPLES * SAMPLES; k++) {
        const u = left + (((k % SAMPLES) + 0.5) / SAMPLES) * stepU;
        const v = low + ((Math.floor(k / SAMPLES) + 0.5) / SAMPLES) * stepV;
        const here = density(u, v);
        sum += open || here === 0 ? here : here * bare(u, v);
      }
      measure[iu + cellsU * iv] = (sum / SAMPLES ** 2) * stepU * stepV;
    }
  }
  return measure;
}

/** A mesh's face, or that of its copies on a grid; none for other faces. */
function facetPatches(patch: FacePatch): readonly FacetPatch[] {
  if (patch.kind === 'facets') return [patch];
  if (patch.kind !== 'group') return [];
  return patch.members.flatMap((member) => (member.kind === 'facets' ? [member] : []));
}

/** Cells of equal azimuth and polar angle on a sphere, exactly. */
function sphereMeasure(
  { radius, polar: [from, to] }: NonNullable<RecorderPlan['sphere']>,
  cellsU: number,
  cellsV: number,
): Float64Array {
  const edge = (row: number) => Math.cos(from + ((to - from) * row) / cellsV);
  const measure = new Float64Array(cellsU * cellsV);
  for (let row = 0; row < cellsV; row++) {
    const area = ((radius ** 2 * 2 * Math.PI) / cellsU) * (edge(row) - edge(row + 1));
    measure.fill(area, row * cellsU, (row + 1) * cellsU);
  }
  return measure;
}

/** Probes along either side of a map: what covers less than one step of a face is overlooked where the rest is bare. */
const PROBES = 64;

/** Share of the face at (u, v) that bounds its part; of a face that nothing covers, 1 without another look. */
function bareness(plan: RecorderPlan, density: (u: number, v: number) => number, graph: RegionGraph) {
  const all = () => 1;
  if (plan.face === null) return all;
  const bare = bareShare(plan, plan.face, graph);
  const [[uLow, uHigh], [vLow, vHigh]] = plan.extent;
  for (let k = 0; k < PROBES * PROBES; k++) {
    const u = uLow + (((k % PROBES) + 0.5) / PROBES) * (uHigh - uLow);
    const v = vLow + ((Math.floor(k / PROBES) + 0.5) / PROBES) * (vHigh - vLow);
    if (density(u, v) > 0 && bare(u, v) < 1) return bare;
  }
  return all;
}

/** Middles of the four quarters of a cell. */
function quarters(left: number, low: number, stepU: number, stepV: number): Vector2[] {
  const at = (a: number, b: number): Vector2 => [left + a * stepU, low + b * stepV];
  return [at(0.25, 0.25), at(0.75, 0.25), at(0.25, 0.75), at(0.75, 0.75)];
}

function wholeCell(
  density: (u: number, v: number) => number,
  left: number,
  low: number,
  stepU: number,
  stepV: number,
): boolean {
  const corner = (a: number, b: number) => density(left + a * stepU, low + b * stepV) === 1;
  const inset = 1e-6;
  return corner(inset, inset) && corner(1 - inset, inset) && corner(inset, 1 - inset) && corner(1 - inset, 1 - inset);
}

/** True area per map area at (u, v) from the centre of the map; 0 off the face. */
function areaDensity(plan: RecorderPlan): (u: number, v: number) => number {
  if (plan.outline !== null) return inOutline(plan.outline);
  const patch = plan.face?.patch;
  if (patch === undefined) throw new Error('a recorder sits on a face or has an outline');
  switch (patch.kind) {
    case 'polygon':
      return inPolygon(plan, patch);
    case 'disc':
      return (u, v) => (u * u + v * v <= patch.radius ** 2 ? 1 : 0);
    case 'side':
    case 'profile': {
      const stretch = revolvedStretch(patch);
      return (_, v) => stretch(v);
    }
    case 'dish':
    case 'group': {
      const seen = lineOfSight(plan, patch);
      return (u, v) => seen(u, v).reduce((sum, { stretch }) => sum + stretch, 0);
    }
    case 'zone':
      return inZone(patch);
    case 'facets':
      throw new Error('faces of meshes are measured facet by facet');
  }
}

function inOutline(outline: NonNullable<RecorderPlan['outline']>): (u: number, v: number) => number {
  if (outline.kind === 'disc') return (u, v) => (u * u + v * v <= outline.radius ** 2 ? 1 : 0);
  return () => 1;
}

function inPolygon(
  plan: RecorderPlan,
  patch: Extract<FacePatch, { kind: 'polygon' }>,
): (u: number, v: number) => number {
  const centre = add(plan.origin, add(scale(plan.u, -plan.extent[0][0]), scale(plan.v, -plan.extent[1][0])));
  const corners = patch.corners.map((corner): Vector2 => {
    const d = subtract(corner, centre);
    return [dot(d, plan.u), dot(d, plan.v)];
  });
  const side = ([ax, ay]: Vector2, [bx, by]: Vector2, u: number, v: number) =>
    (bx - ax) * (v - ay) - (by - ay) * (u - ax);
  return (u, v) => {
    const signs = corners.map((corner, i) => side(corner, corners[(i + 1) % corners.length], u, v));
    return signs.every((s) => s >= 0) || signs.every((s) => s <= 0) ? 1 : 0;
  };
}

/** A dome is mapped as seen along its axis; both halves of what lies beyond its equator fall on the same cells. */
function inZone(patch: Extract<FacePatch, { kind: 'zone' }>): (u: number, v: number) => number {
  const { radius, from } = patch;
  const rim2 = radius ** 2 - from ** 2;
  return (u, v) => {
    const r2 = u * u + v * v;
    if (r2 >= radius ** 2) return 0;
    const stretch = radius / Math.sqrt(radius ** 2 - r2);
    if (from >= 0) return r2 <= rim2 ? stretch : 0;
    return r2 <= rim2 ? stretch : 2 * stretch;
  };
}

export interface VoxelMeasure {
  /** Volume, mm³, of each voxel that belongs to a part with dye (or to any part, if none has). */
  readonly measure: Float64Array;
  /** The part it belongs to, by its place in the design; that of the last point looked at where parts meet. −1 for none. */
  readonly part: Int16Array;
}

/** How much of each voxel holds dye, and of which part. */
export function voxelMeasure({ scene, legend }: CompiledScene): VoxelMeasure {
  const { origin, size, cells } = legend.voxels;
  const graph = new RegionGraph(scene);
  const dyed = (owner: number) => scene.absorberCount[scene.ownerMedium[owner]] > 1;
  const anyDye = Array.from({ length: scene.owners - 1 }, (_, i) => i + 1).some(dyed);
  const step = size.map((s, axis) => s / cells[axis]);
  let region = -1;
  const counts = (x: number, y: number, z: number): boolean => {
    if (region < 0 || !graph.contains(region, x, y, z)) {
      if (graph.crowded) graph.forget();
      region = graph.locate(x, y, z, 0.6, 0.64, 0.48);
    }
    const owner = graph.owner[region];
    const counted = owner > 0 && (!anyDye || dyed(owner));
    if (counted) last = owner - 1;
    return counted;
  };
  let last = -1;
  const measure = new Float64Array(cells[0] * cells[1] * cells[2]);
  const part = new Int16Array(measure.length).fill(-1);
  const share = (ix: number, iy: number, iz: number, samples: number): number => {
    let inside = 0;
    for (let k = 0; k < samples ** 3; k++) {
      const a = (k % samples) + 0.5;
      const b = (Math.floor(k / samples) % samples) + 0.5;
      const c = Math.floor(k / samples ** 2) + 0.5;
      const at = (axis: number, i: number, s: number) => origin[axis] + (i + s / samples) * step[axis];
      if (counts(at(0, ix, a), at(1, iy, b), at(2, iz, c))) inside++;
    }
    return inside / samples ** 3;
  };
  let cell = 0;
  for (let iz = 0; iz < cells[2]; iz++) {
    for (let iy = 0; iy < cells[1]; iy++) {
      for (let ix = 0; ix < cells[0]; ix++) {
        const coarse = share(ix, iy, iz, 2);
        const fine = coarse > 0 && coarse < 1 ? share(ix, iy, iz, 5) : coarse;
        measure[cell] = fine * step[0] * step[1] * step[2];
        if (fine > 0) part[cell] = last;
        cell++;
      }
    }
  }
  return { measure, part };
}
