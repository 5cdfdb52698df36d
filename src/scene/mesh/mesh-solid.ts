/** A mesh as a solid: one surface, one face for each of its groups. It need not be convex; its own test tells inside from outside. */
import type { ClosedMesh } from '../../numerics/mesh/close-mesh.js';
import type { ConvexSolid } from '../convex-solid.js';
import { type Matrix, moveDirection } from '../vector.js';
import { type FacetPatch, facetPatch } from './facet-patch.js';
import { moveMesh, type PlacedMesh } from './placed-mesh.js';

export function meshSolid(source: ClosedMesh): ConvexSolid {
  const mesh: PlacedMesh = { source, points: source.tree.facetPoint };
  return { faces: facetsByGroup(source).map((facets, group) => face(mesh, facetPatch(mesh, group, facets, null))) };
}

export function moveMeshSolid(solid: ConvexSolid, matrix: Matrix): ConvexSolid {
  const first = solid.faces[0].surface;
  if (first.kind !== 'mesh') throw new Error('not the solid of a mesh');
  const mesh = moveMesh(first.mesh, matrix);
  if (mesh === first.mesh) return solid;
  return {
    faces: solid.faces.map(({ patch }) => {
      if (patch?.kind !== 'facets') throw new Error('a face of a mesh is made of facets');
      const frame = {
        normal: moveDirection(matrix, patch.normal),
        u: moveDirection(matrix, patch.u),
        v: moveDirection(matrix, patch.v),
      };
      return face(mesh, facetPatch(mesh, patch.group, patch.facets, frame));
    }),
  };
}

function face(mesh: PlacedMesh, patch: FacetPatch): ConvexSolid['faces'][number] {
  return { name: mesh.source.groups[patch.group], surface: { kind: 'mesh', mesh, group: patch.group }, patch };
}

function facetsByGroup({ group, groups }: ClosedMesh): Int32Array[] {
  const counts = new Int32Array(groups.length);
  for (const each of group) counts[each]++;
  const lists = Array.from(counts, (count) => new Int32Array(count));
  counts.fill(0);
  for (let facet = 0; facet < group.length; facet++) lists[group[facet]][counts[group[facet]]++] = facet;
  return lists;
}
