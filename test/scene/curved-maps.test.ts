/** Maps, aims and samples of the faces of lenses, reflectors and arrays. */
import { describe, expect, test } from 'vitest';
import type { DetectorDescription, PartDescription, ShapeDescription } from '../../src/design/description.js';
import { checkScene } from '../../src/scene/check-scene.js';
import { compileScene } from '../../src/scene/compile-scene.js';
import { patchArea } from '../../src/scene/face-patch.js';
import { mapMeasure } from '../../src/scene/map-measure.js';
import { RegionGraph } from '../../src/scene/region-graph.js';
import { beam, describeDesign, medium, part } from '../helpers/describe.js';

const lens: ShapeDescription = {
  kind: 'lens',
  outline: { kind: 'disc', radius: 5 },
  thickness: 3,
  profile: 'round',
  front: { kind: 'hollow', radius: 8, conic: -1 },
  back: { kind: 'bulges', radius: 12, conic: 0 },
};
const lenslet: ShapeDescription = {
  kind: 'lens',
  outline: { kind: 'rectangle', size: [2, 2] },
  thickness: 0.5,
  profile: 'round',
  front: { kind: 'bulges', radius: 3, conic: 0 },
  back: { kind: 'flat' },
};
const concentrator = (form: 'round' | 'square'): ShapeDescription => ({
  kind: 'concentrator',
  form,
  halfAngle: 0.6,
  smallEnd: 2,
  height: 5,
  length: null,
  slices: 8,
});

const plain = part('array', lenslet, 'glass', { at: [0, 30, 0] });
const array: PartDescription = {
  ...plain,
  pieces: [
    { ...plain.pieces[0], name: 'lenslets', repeat: { counts: [3, 1, 2], pitch: [2, 0, 2] } },
    { ...plain.pieces[0], name: 'plate', shape: { kind: 'box', size: [6, 1, 4] }, at: [0, 0.75, 0] },
  ],
};
const turns = [
  { axis: 'x' as const, angle: 0.4 },
  { axis: 'z' as const, angle: -0.7 },
];
const parts = [
  part('lens', lens, 'glass', { turns }),
  array,
  part('bowl', { kind: 'paraboloid', focalLength: 2, height: 4 }, 'glass', { at: [30, 0, 0] }),
  part('round', concentrator('round'), 'glass', { at: [60, 0, 0], turns }),
  part('square', concentrator('square'), 'glass', { at: [90, 0, 0] }),
];
const faces = ['lens.front', 'lens.back', 'array.lenslets.front', 'bowl.bowl', 'round.wall', 'square.left'];
const detectors = faces.map(
  (face, i): DetectorDescription => ({
    name: `d${i}`,
    path: ['detectors', face],
    target: { kind: 'face', face },
    pixels: [40, 40],
  }),
);
const design = describeDesign({
  media: [medium('glass', 1.5)],
  parts,
  pumps: [beam([0.3, 0, 0.4], [0, 1, 0])],
  detectors,
  exit: 'lens.edge',
});
const compiled = compileScene(design);

describe('faces of lenses, reflectors and arrays', () => {
  test.each(faces)('the cells of the map of %s add up to its area within 1 %', (face) => {
    const plan = compiled.legend.recorders.find((each) => each.what === 'detector' && each.face?.reference === face);
    if (!plan?.face) throw new Error(`no recorder on ${face}`);
    const sum = mapMeasure(plan, new RegionGraph(compiled.scene)).reduce((a, b) => a + b, 0);
    expect(sum / patchArea(plan.face.patch)).toBeGreaterThan(0.99);
    expect(sum / patchArea(plan.face.patch)).toBeLessThan(1.01);
  });

  test('every optical face bounds its part wherever it is sampled, and the array has one front', () => {
    const check = checkScene(design);
    expect(check.faults.filter(({ severity }) => severity === 'error')).toEqual([]);
    const optical = check.faces.filter(({ part: name, face }) => faces.includes(`${name}.${face}`));
    expect(optical.map(({ part: name, face, exposed }) => [`${name}.${face}`, exposed])).toEqual(
      faces.map((face) => [face, 1]),
    );
    const fronts = check.faces.filter(({ part: name, face }) => name === 'array' && face.endsWith('.front'));
    expect(fronts.map(({ face }) => face)).toEqual(['lenslets.front', 'plate.front']);
    // Six caps of a sphere over 2 mm squares, more than their 24 mm² of aperture.
    expect(fronts[0].areaMm2).toBeGreaterThan(24);
    expect(fronts[0].shape).toBe('sphere');
  });

  test('a beam along the axis meets the lenslets first', () => {
    const pumped = compiled.legend.recorders.filter(({ what }) => what === 'pumped-face');
    expect(pumped.map(({ where }) => where)).toEqual(['array.lenslets.front']);
  });
});
