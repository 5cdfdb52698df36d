/** All meshes of a scene in shared arrays: one tree each, numbered on from the last. */
import { refitBoxes } from '../../numerics/mesh/facet-tree.js';
import type { Scene } from '../scene-layout.js';
import { sharedDoubles, sharedInts } from '../shared-arrays.js';
import { meshReach, type PlacedMesh } from './placed-mesh.js';

type MeshArrays = Pick<
  Scene,
  | 'meshes'
  | 'groups'
  | 'meshRoot'
  | 'meshFacet'
  | 'meshGroup'
  | 'meshReach'
  | 'groupMesh'
  | 'facetPoint'
  | 'facetCorner'
  | 'facetGroup'
  | 'nodeBox'
  | 'nodeChild'
>;

export function layOutMeshes(meshes: readonly PlacedMesh[]): MeshArrays {
  const starts = (size: (mesh: PlacedMesh) => number): number[] => {
    const list = [0];
    for (const mesh of meshes) list.push(list[list.length - 1] + size(mesh));
    return list;
  };
  const point = starts(({ points }) => points.length / 3);
  const facet = starts(({ source }) => source.group.length);
  const node = starts(({ source }) => source.tree.nodeChild.length / 2);
  const group = starts(({ source }) => source.groups.length);
  const last = meshes.length;
  const ints = (length: number) => new Int32Array(new SharedArrayBuffer(4 * length));
  const facetPoint = new Float64Array(new SharedArrayBuffer(24 * point[last]));
  const facetCorner = ints(3 * facet[last]);
  const facetGroup = ints(facet[last]);
  const nodeBox = new Float32Array(new SharedArrayBuffer(48 * node[last]));
  const nodeChild = ints(2 * node[last]);
  meshes.forEach(({ source, points }, m) => {
    const { tree } = source;
    facetPoint.set(points, 3 * point[m]);
    for (let i = 0; i < tree.facetCorner.length; i++) facetCorner[3 * facet[m] + i] = tree.facetCorner[i] + point[m];
    for (let i = 0; i < source.group.length; i++) facetGroup[facet[m] + i] = source.group[i] + group[m];
    const boxes = points === tree.facetPoint ? tree.nodeBox : refitBoxes(points, tree.facetCorner, tree.nodeChild);
    nodeBox.set(boxes, 12 * node[m]);
    for (let i = 0; i < tree.nodeChild.length; i++) {
      const child = tree.nodeChild[i];
      nodeChild[2 * node[m] + i] = child >= 0 ? child + node[m] : ~(~child + 8 * facet[m]);
    }
  });
  return {
    meshes: meshes.length,
    groups: group[last],
    meshRoot: sharedInts(node),
    meshFacet: sharedInts(facet),
    meshGroup: sharedInts(group),
    meshReach: sharedDoubles(meshes.map(meshReach)),
    groupMesh: sharedInts(meshes.flatMap(({ source }, m) => source.groups.map(() => m))),
    facetPoint,
    facetCorner,
    facetGroup,
    nodeBox,
    nodeChild,
  };
}
