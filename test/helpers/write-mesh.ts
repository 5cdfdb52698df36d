/** Meshes as files, written by the book. */
import type { MeshFacets } from '../../src/numerics/mesh/close-mesh.js';

const corner = ({ points, corners }: MeshFacets, facet: number, k: number) => [
  ...points.subarray(3 * corners[3 * facet + k], 3 * corners[3 * facet + k] + 3),
];

export function binaryStl(mesh: MeshFacets, heading = 'made for a test'): Uint8Array {
  const count = mesh.group.length;
  const bytes = new Uint8Array(84 + 50 * count);
  const view = new DataView(bytes.buffer);
  bytes.set(new TextEncoder().encode(heading).subarray(0, 80));
  view.setUint32(80, count, true);
  for (let facet = 0; facet < count; facet++) {
    for (let k = 0; k < 3; k++) {
      for (const [c, value] of corner(mesh, facet, k).entries()) {
        view.setFloat32(84 + 50 * facet + 12 + 12 * k + 4 * c, value, true);
      }
    }
  }
  return bytes;
}

export function textStl(mesh: MeshFacets): string {
  return mesh.groups
    .map((name, group) => {
      const facets = [...mesh.group.keys()].filter((facet) => mesh.group[facet] === group);
      const lines = facets.map((facet) => {
        const vertices = [0, 1, 2].map((k) => `      vertex ${corner(mesh, facet, k).join(' ')}\n`).join('');
        return `  facet normal 0 0 0\n    outer loop\n${vertices}    endloop\n  endfacet\n`;
      });
      return `solid ${name}\n${lines.join('')}endsolid ${name}\n`;
    })
    .join('');
}

export function objText(mesh: MeshFacets, negative = false): string {
  const vertices = Array.from({ length: mesh.points.length / 3 }, (_, i) => [
    ...mesh.points.subarray(3 * i, 3 * i + 3),
  ]);
  const lines = ['# made for a test', ...vertices.map((v) => `v ${v.join(' ')}`), 'vn 0 0 1', 'vt 0 0'];
  const index = (i: number) => (negative ? i - vertices.length : i + 1);
  let last = -1;
  mesh.group.forEach((group, facet) => {
    if (group !== last) lines.push(`g ${mesh.groups[group]}`);
    last = group;
    lines.push(`f ${[0, 1, 2].map((k) => `${index(mesh.corners[3 * facet + k])}/1/1`).join(' ')}`);
  });
  return `${lines.join('\n')}\n`;
}
