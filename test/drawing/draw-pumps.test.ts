/** Pumps and free planes: where they sit, where they look, what is outlined. Places are worked out by hand from the design. */
import { describe, expect, it } from 'vitest';
import type { BeamDescription, PumpDescription } from '../../src/design/description.js';
import { drawDescription } from '../../src/drawing/draw-description.js';
import { beam, describeDesign, medium, part } from '../helpers/describe.js';

const box = part('a', { kind: 'box', size: [20, 8, 6] }, 'glass');
const drawnPump = (more: Partial<PumpDescription>) =>
  drawDescription(
    describeDesign({
      media: [medium('glass', 1.5)],
      parts: [box],
      pumps: [beam([0, 0, -50], [0, 0, 2], more)],
      exit: 'a.top',
    }),
  ).pumps[0];
const bank = (across: number, along: number): BeamDescription => ({
  kind: 'diodes',
  across,
  along,
  pitch: [3, 2],
  divergence: [0.1, 0.1],
  lens: null,
});

describe('drawn pumps', () => {
  it('one aimed at a face stands before it, a rectangle for each of its emitters', () => {
    const aim = { kind: 'toward', face: 'a.front', distance: 40, shift: [1, 0.5], tilt: [0, 0] } as const;
    const pump = drawnPump({ aim, beam: bank(6, 4), power: 60, wavelengthNm: 445 });
    expect(pump).toMatchObject({ at: [1, -44, 0.5], direction: [0, 1, 0], watts: 60, wavelengthNm: 445 });
    expect(pump.edges.length / 6).toBe(24 * 4);
    const xs = pump.edges.filter((_, i) => i % 3 === 0);
    // 5 pitches of 3 mm, and an emitter of 0.4 · 2 mm.
    expect(Math.max(...xs) - Math.min(...xs)).toBeCloseTo(15.8, 4);
    expect(pump.edges.filter((_, i) => i % 3 === 1).every((y) => y === -44)).toBe(true);
  });

  it('a bank of more than 200 is one outline', () => {
    expect(drawnPump({ beam: bank(20, 10) }).edges.length / 6).toBe(800);
    expect(drawnPump({ beam: bank(21, 10) }).edges.length / 6).toBe(4);
  });

  it('beams are as wide as they start; one without width is a cross', () => {
    const width = (more: Partial<PumpDescription>) => {
      const { edges } = drawnPump(more);
      const xs = edges.filter((_, i) => i % 3 === 0);
      return Math.max(...xs) - Math.min(...xs);
    };
    expect(width({ beam: { kind: 'gaussian', radius: 1.5, halfAngle: 0.01 } })).toBeCloseTo(3, 4);
    const outline = { kind: 'rectangle', size: [4, 4] } as const;
    expect(width({ beam: { kind: 'lambertian', outline } })).toBeCloseTo(4, 4);
    const point = drawnPump({});
    expect(point.edges.length / 6).toBe(2);
    expect(point.direction).toEqual([0, 0, 1]);
  });
});

describe('drawn planes and the exit', () => {
  it('a free plane has its outline and may be the exit; a detector on a face marks the face', () => {
    const design = {
      media: [medium('glass', 1.5)],
      parts: [{ ...box, faces: [{ face: '*', finish: 'black', path: [] }] }],
      pumps: [beam([0, 0, -50], [0, 0, 1])],
      detectors: [
        {
          name: 'aperture',
          path: [],
          pixels: null,
          target: { kind: 'plane', at: [0, 0, 9], normal: [0, 0, 2], outline: { kind: 'disc', radius: 5 } },
        },
        { name: 'lid', path: [], pixels: null, target: { kind: 'face', face: 'a.top' } },
      ],
    } as const;
    const open = drawDescription(describeDesign({ ...design, exit: 'aperture' }));
    expect(open.planes).toMatchObject([{ name: 'aperture', isExit: true, normal: [0, 0, 1] }]);
    for (let i = 0; i < open.planes[0].edges.length; i += 3) {
      expect(Math.hypot(open.planes[0].edges[i], open.planes[0].edges[i + 1])).toBeCloseTo(5, 3);
      expect(open.planes[0].edges[i + 2]).toBe(9);
    }
    expect(open.parts[0].faces.some(({ isExit }) => isExit)).toBe(false);
    const face = drawDescription(describeDesign({ ...design, exit: 'lid' }));
    expect(face.parts[0].faces.filter(({ isExit }) => isExit).map(({ name }) => name)).toEqual(['a.top']);
    expect(face.parts[0].faces[0]).toMatchObject({ finish: 'black', finishKind: 'black' });
  });
});
