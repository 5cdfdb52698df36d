/** Area of a mesh's face behind each cell of its map, which is the face as seen along its mean normal: exact, facet by facet. */
import type { Vector3 } from '../../design/description.js';
import type { RecorderPlan } from '../compile-recorders.js';
import type { SceneFace } from '../compile-solids.js';
import type { RegionGraph } from '../region-graph.js';
import { add, cross, dot, length, scale, subtract } from '../vector.js';
import { type FacetPatch, facetCorner, facetNormal, facetsPoint } from './facet-patch.js';

/** Step off the face to look at either side, mm. */
const STEP = 1e-5;
/** Spots looked at to see whether anything covers the face at all. */
const PROBES = 2048;

export function facetsMeasure(
  plan: RecorderPlan,
  face: SceneFace,
  patch: FacetPatch,
  graph: RegionGraph,
): Float64Array {
  const [cellsU, cellsV] = plan.cells;
  const [[uLow, uHigh], [vLow, vHigh]] = plan.extent;
  const perU = cellsU / (uHigh - uLow);
  const perV = cellsV / (vHigh - vLow);
  const measure = new Float64Array(cellsU * cellsV);
  const isBare = bareness(face, patch, graph);
  const inU = (p: Vector3) => dot(subtract(p, plan.origin), plan.u) * perU;
  const inV = (p: Vector3) => dot(subtract(p, plan.origin), plan.v) * perV;
  const cell = (value: number, cells: number) => Math.max(0, Math.min(cells - 1, Math.floor(value)));
  const range = (values: readonly number[], cells: number) => [
    cell(Math.min(...values), cells),
    cell(Math.max(...values), cells),
  ];
  for (const facet of patch.facets) {
    const corners = [0, 1, 2].map((k) => facetCorner(patch.mesh, facet, k));
    const normal = facetNormal(patch.mesh, facet);
    const [iLow, iHigh] = range(corners.map(inU), cellsU);
    const [jLow, jHigh] = range(corners.map(inV), cellsV);
    for (let i = iLow; i <= iHigh; i++) {
      // The outermost cells take what lies on the rim.
      const column = strip(corners, inU, i === iLow ? null : i, i === iHigh ? null : i + 1);
      for (let j = jLow; column.length > 2 && j <= jHigh; j++) {
        const piece = strip(column, inV, j === jLow ? null : j, j === jHigh ? null : j + 1);
        if (piece.length < 3) continue;
        const area = polygonArea(piece);
        if (area > 0 && isBare(middle(piece), normal)) measure[i + cellsU * j] += area;
      }
    }
  }
  return measure;
}

/** What of a convex polygon lies between two values of a linear coordinate. */
function strip(
  polygon: readonly Vector3[],
  coordinate: (p: Vector3) => number,
  low: number | null,
  high: number | null,
): readonly Vector3[] {
  const above = low === null ? polygon : cut(polygon, (p) => coordinate(p) - low);
  return high === null ? above : cut(above, (p) => high - coordinate(p));
}

/** Sutherland and Hodgman, Commun. ACM 17 32 (1974). */
function cut(polygon: readonly Vector3[], height: (p: Vector3) => number): Vector3[] {
  const kept: Vector3[] = [];
  polygon.forEach((from, i) => {
    const to = polygon[(i + 1) % polygon.length];
    const [a, b] = [height(from), height(to)];
    if (a >= 0) kept.push(from);
    if (a >= 0 !== b >= 0) kept.push(add(from, scale(subtract(to, from), a / (a - b))));
  });
  return kept;
}

function polygonArea(corners: readonly Vector3[]): number {
  let sum: Vector3 = [0, 0, 0];
  for (let i = 1; i + 1 < corners.length; i++) {
    sum = add(sum, cross(subtract(corners[i], corners[0]), subtract(corners[i + 1], corners[0])));
  }
  return length(sum) / 2;
}

const middle = (corners: readonly Vector3[]): Vector3 =>
  scale(
    corners.reduce((sum, corner) => add(sum, corner)),
    1 / corners.length,
  );

/** Whether a spot of the face bounds its part; of a face that nothing covers, true without another look. */
function bareness(face: SceneFace, patch: FacetPatch, graph: RegionGraph): (spot: Vector3, normal: Vector3) => boolean {
  const ownerAt = (spot: Vector3, normal: Vector3, step: number): number => {
    const [x, y, z] = add(spot, scale(normal, step));
    if (graph.crowded) graph.forget();
    return graph.owner[graph.locate(x, y, z, 0.6, 0.64, 0.48)];
  };
  const out = face.hollow ? -1 : 1;
  const isBare = (spot: Vector3, normal: Vector3) =>
    ownerAt(spot, normal, -STEP * out) === face.owner && ownerAt(spot, normal, STEP * out) !== face.owner;
  for (let i = 0; i < PROBES; i++) {
    // R2 sequence (Roberts 2018).
    const { point, normal } = facetsPoint(
      patch,
      (0.5 + i * 0.7548776662466927) % 1,
      (0.5 + i * 0.5698402909980532) % 1,
    );
    if (!isBare(point, normal)) return isBare;
  }
  return () => true;
}
