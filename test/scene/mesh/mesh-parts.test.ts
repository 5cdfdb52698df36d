import { describe, expect, test } from 'vitest';
import type { Description, ShapeDescription } from '../../../src/design/description.js';
import { checkScene } from '../../../src/scene/check-scene.js';
import { compileScene } from '../../../src/scene/compile-scene.js';
import { patchArea } from '../../../src/scene/face-patch.js';
import { mapMeasure, voxelMeasure } from '../../../src/scene/map-measure.js';
import { facetTriangles } from '../../../src/scene/mesh/facet-patch.js';
import { RegionGraph } from '../../../src/scene/region-graph.js';
import { beam, describeDesign, finish, medium, part, plainDye } from '../../helpers/describe.js';
import { boxFacets, icosphereFacets, mustClose } from '../../helpers/mesh-bodies.js';

const mesh = (facets: Parameters<typeof mustClose>[0]): ShapeDescription => ({ kind: 'mesh', mesh: mustClose(facets) });
const BOX = mesh(boxFacets([10, 4, 6]));
const bath = medium('bath', 1.36, { dyes: [plainDye(0.3, 0.95, 520)] });

function design(parts: Description['parts'], exit: string): Description {
  return describeDesign({
    media: [bath, medium('glass', 1.5, { kind: 'solid' })],
    finishes: [finish('half', { kind: 'mirror', reflectance: 0.5 })],
    parts,
    pumps: [
      beam([0, -30, 0], [0, 1, 0], {
        aim: { kind: 'toward', face: 'cell.front', distance: 20, shift: [0, 0], tilt: [0, 0], roll: 0 } as never,
      }),
    ],
    exit,
  });
}

const total = (list: Float64Array) => list.reduce((a, b) => a + b, 0);

describe('meshes as parts', () => {
  test('faces of a box mesh are reported as those of the box', () => {
    const about = (shape: ShapeDescription) => {
      const { faults, faces } = checkScene(
        design(
          [
            part('cell', shape, 'bath', {
              at: [1, 2, 3],
              turns: [{ axis: 'z', angle: Math.PI / 2 }],
              faces: { left: 'half' },
            }),
          ],
          'cell.top',
        ),
      );
      expect(faults).toEqual([]);
      const rounded = (v: readonly number[]) => v.map((c) => Math.round(c * 1e9) / 1e9 + 0);
      return faces
        .map(({ face, shape: kind, centre, normal, areaMm2, finish: name, touches, exposed }) => ({
          face,
          kind,
          centre: rounded(centre),
          normal: rounded(normal),
          area: Math.round(areaMm2 * 1e9) / 1e9,
          name,
          touches,
          exposed: Math.round(exposed * 50) / 50,
        }))
        .sort((a, b) => a.face.localeCompare(b.face));
    };
    expect(about(BOX)).toEqual(about({ kind: 'box', size: [10, 4, 6] }));
  });

  test('maps of flat and curved faces measure the whole area, and of a covered face what is bare', () => {
    const measured = (parts: Description['parts'], exit: string) => {
      const compiled = compileScene(design(parts, exit));
      const plan = compiled.legend.recorders.find(({ isExit }) => isExit);
      if (plan?.face == null) throw new Error('no exit');
      return { sum: total(mapMeasure(plan, new RegionGraph(compiled.scene))), area: patchArea(plan.face.patch), plan };
    };
    const whole = measured([part('cell', BOX, 'bath')], 'cell.top');
    expect(whole.sum).toBeCloseTo(40, 9);
    expect(whole.plan.cells).toEqual([40, 16]);
    const ball = measured(
      [part('cell', BOX, 'bath'), part('ball', mesh(icosphereFacets(2, 2)), 'glass', { at: [0, 0, 9] })],
      'ball.surface',
    );
    expect(ball.sum).toBeCloseTo(ball.area, 9);
    // A later block covers 2 × 2 of the top.
    const covered = measured(
      [part('cell', BOX, 'bath'), part('block', { kind: 'box', size: [2, 2, 2] }, 'glass', { at: [1, 0, 3] })],
      'cell.top',
    );
    expect(Math.abs(covered.sum - 36)).toBeLessThan(0.5);
  });

  test('voxels of a mesh hold its volume', () => {
    const volume = mustClose(icosphereFacets(3, 2)).volume;
    const compiled = compileScene({
      ...design([part('ball', mesh(icosphereFacets(3, 2)), 'bath')], 'ball.surface'),
      pumps: [beam([0, -30, 0], [0, 1, 0])],
    });
    expect(Math.abs(total(voxelMeasure(compiled).measure) / volume - 1)).toBeLessThan(0.01);
  });

  test('a part may lean on a flat face of a mesh, and a mesh on a part', () => {
    const { legend } = compileScene(
      design(
        [
          part('cell', BOX, 'bath'),
          part('lid', { kind: 'box', size: [2, 2, 1] }, 'glass', { against: { face: 'cell.top' } }),
          part('foot', mesh(boxFacets([1, 1, 1])), 'glass', { against: { face: 'lid.top' } }),
        ],
        'foot.top',
      ),
    );
    const top = legend.faces.find(({ reference }) => reference === 'foot.top');
    expect(top?.patch.kind === 'facets' && top.patch.centre[2]).toBeCloseTo(3 + 1 + 1, 12);
  });

  test('a face that lies on another is warned of, one that overlaps is not', () => {
    const problems = (z: number) =>
      checkScene(
        design(
          [part('cell', BOX, 'bath'), part('lid', { kind: 'box', size: [12, 6, 2] }, 'glass', { at: [0, 0, z] })],
          'lid.top',
        ),
      ).faults.map(({ found }) => found);
    expect(problems(4)).toEqual(['cell.top on lid.bottom']);
    expect(problems(3.9)).toEqual([]);
  });

  test('triangles of a face, for drawing', () => {
    const { legend } = compileScene(design([part('cell', BOX, 'bath')], 'cell.top'));
    const top = legend.faces.find(({ reference }) => reference === 'cell.top');
    const triangles = top?.patch.kind === 'facets' ? facetTriangles(top.patch) : [];
    expect(triangles).toHaveLength(18);
    for (let i = 2; i < 18; i += 3) expect(triangles[i]).toBe(3);
  });
});
