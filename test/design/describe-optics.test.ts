import { describe, expect, test } from 'vitest';
import { readDesignText } from '../../src/design/read-design.js';

const design = (shape: string, more = '') => `
design: shapes
media: { bath: { solvent: water, pH: 10, dyes: { fluorescein: 0.1 mmol/L } } }
parts:
  cell: { box: [5 mm, 5 mm, 5 mm], medium: bath }
  body:
    ${shape}
    medium: pmma
    at: [0 mm, 30 mm, 0 mm]
${more}
pumps: { bank: { patch: { disc: 1 mm }, power: 1 W, wavelength: 450 nm, toward: cell.front, distance: 5 mm } }
exit: cell.top
`;

function shapeOf(shape: string) {
  const reading = readDesignText(design(shape), 'test.yaml');
  if (!reading.ok) throw new Error(JSON.stringify(reading.faults));
  return reading.description.parts[1].pieces[0];
}

function faultOf(shape: string): string {
  const reading = readDesignText(design(shape), 'test.yaml');
  if (reading.ok) return 'none';
  return reading.faults
    .map(({ path, problem, expected }) => `${path.slice(2).join('.')}: ${problem}; ${expected ?? ''}`)
    .join('\n');
}

describe('lenses, reflectors, tapers and tunnels as written', () => {
  test('a lens says which way each side bends', () => {
    const { shape } = shapeOf(
      'lens: { diameter: 20 mm, thickness: 5 mm, front: { bulges: 30 mm, conic: -1 }, back: { hollow: 50 mm } }',
    );
    expect(shape).toEqual({
      kind: 'lens',
      outline: { kind: 'disc', radius: 10 },
      thickness: 5,
      profile: 'round',
      front: { kind: 'bulges', radius: 30, conic: -1 },
      back: { kind: 'hollow', radius: 50, conic: 0 },
    });
  });

  test('a paraboloid by its diameter: h = d²/16f', () => {
    const { shape } = shapeOf('paraboloid: { focal-length: 5 mm, diameter: 20 mm }');
    expect(shape).toEqual({ kind: 'paraboloid', focalLength: 5, height: 5 });
  });

  // Welford & Winston 1989: length (a + a′) cot θ with a = a′/sin θ; at 30° and a′ = 2 mm, 6·√3 mm.
  test('a concentrator stands at its full height unless cut off', () => {
    const { shape } = shapeOf('concentrator: { form: square, half-angle: 30 deg, small-end: 4 mm }');
    expect(shape).toMatchObject({ kind: 'concentrator', smallEnd: 2, height: expect.closeTo(6 * Math.sqrt(3), 9) });
  });

  test('a regular polygon has its first side in front and its width across flats', () => {
    const { shape } = shapeOf('polygon: { sides: 6, width: 4 mm, height: 3 mm }');
    if (shape.kind !== 'frustum') throw new Error(shape.kind);
    expect(shape.bottom[0][1]).toBeCloseTo(-2, 12);
    expect(shape.bottom[1][1]).toBeCloseTo(-2, 12);
    // The side of a hexagon is its width over √3.
    expect(shape.bottom[1][0] - shape.bottom[0][0]).toBeCloseTo(4 / Math.sqrt(3), 12);
  });

  test.each([
    ['lens: { diameter: 20 mm, thickness: 1 mm, front: { bulges: 30 mm } }', 'lens.thickness: the two surfaces cross'],
    ['lens: { diameter: 20 mm, thickness: 9 mm, front: { bulges: 8 mm } }', 'lens.front: the surface ends before'],
    ['lens: { diameter: 20 mm, thickness: 1 mm }\n    union: []', 'exclude each other'],
    ['lens: { diameter: 20 mm, size: [1 mm, 1 mm], thickness: 1 mm }', 'exclude each other'],
    ['lens: { diameter: 20 mm, thickness: 9 mm, front: { bulges: 8 mm, hollow: 3 mm } }', 'exclude each other'],
    ['lens: { diameter: 20 mm, thickness: 9 mm, front: round }', 'not known here'],
    [
      'concentrator: { half-angle: 30 deg, small-end: 4 mm, height: 11 mm }',
      'walls of a concentrator would lean inwards; at most 10.3923 mm',
    ],
    ['concentrator: { form: trough, half-angle: 30 deg, small-end: 4 mm }', 'a trough needs a length'],
    ['concentrator: { half-angle: 30 deg, small-end: 4 mm, length: 4 mm }', 'only a trough has a length'],
    ['concentrator: { half-angle: 30 deg, small-end: 4 mm, tolerance: 0.000001 mm }', 'more cone frusta'],
    ['tunnel: { sides: 5, wall: 1 mm, height: 5 mm }', 'a required field is missing; a length'],
    [
      'tunnel: { diameter: 5 mm, top-bore: [1 mm, 1 mm], wall: 1 mm, height: 5 mm }',
      'top-bore has no meaning without bore',
    ],
    [
      'box: [9 mm, 9 mm, 9 mm]\n    minus: [{ name: t, tunnel: { bore: [1 mm, 1 mm], wall: 1 mm, height: 4 mm } }]',
      'a hollow shape cannot be taken away',
    ],
    [
      'box: [9 mm, 9 mm, 9 mm]\n    minus: [{ name: t, lens: { diameter: 4 mm, thickness: 1 mm, back: { hollow: 9 mm } } }]',
      'a hollow shape cannot be taken away',
    ],
    [
      'union: [{ name: a, sphere: { radius: 1 mm }, repeat: [3, 1, 1] }]',
      'all stand in one place; a pitch above 0 mm along x',
    ],
    [
      'union: [{ name: a, sphere: { radius: 1 mm }, pitch: [3 mm, 0 mm, 0 mm] }]',
      'pitch has no meaning without repeat',
    ],
    [
      'union: [{ name: a, sphere: { radius: 1 mm }, repeat: [30, 30, 1], pitch: [3 mm, 3 mm, 3 mm] }]',
      'more copies than can be traced',
    ],
  ])('%s is refused', (shape, words) => {
    expect(faultOf(shape)).toContain(words);
  });
});
