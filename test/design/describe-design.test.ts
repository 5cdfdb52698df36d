import { describe, expect, test } from 'vitest';
import type { FaultCode, LocatedFault } from '../../src/design/fault.js';
import { formatFault } from '../../src/design/format-fault.js';
import { readDesignText } from '../../src/design/read-design.js';

/** Every kind of part, finish, pump and detector in one design. */
const RICH = `design: Everything
about: A design that uses every field once.
dials: { a: 2 mm, b: a * 2, share: 50 % }
dyes:
  probe: { extinction: [[450 nm, 8000 L/mol/cm], [550 nm, 0 L/(mol cm)]], emission: [[500 nm, 0.1], [520 nm, 1]], yield: 0.9, lifetime: 4 ns, molar-mass: 400 g/mol }
  line: { absorption: 1 /mm, emission: 520 nm, yield: share }
media:
  bath: { solvent: ethanol, dyes: { probe: 0.1 g/L, line: 2 } }
  oil: { index: [[400 nm, 1.5], [700 nm, 1.48]], absorption: 0.1 /cm, kind: solid }
  block: { solid: pmma, absorption: [[400 nm, 1 /m], [700 nm, 2 /m]] }
finishes:
  fixed: { mirror: share }
  coating: { table: [[450 nm, 0 deg, 5 %, 95 %], [450 nm, 45 deg, 10 %, 80 %]] }
  white: { diffuser: { reflects: 97 % } }
  frosted: { scatter: { shape: gaussian, fwhm: 10 deg } }
  satin: { scatter: { shape: top-hat, fwhm: 90 deg, reflects: 30 %, transmits: 60 % } }
  low: { dichroic: { edge: 490 nm, passes: above, transmits: 90 %, reflects: 95 %, absorbs: 1 % } }
parts:
  wedge: { prism: { outline: [[0 mm, 0 mm], [0 mm, 10 mm], [10 mm, 0 mm]], height: b, sides: [x, y, z] }, medium: bath, faces: { x: fixed, others: black } }
  joined:
    union:
      - { name: body, box: [1 mm, 1 mm, 1 mm], minus: [ { name: bore, cylinder: { diameter: 0.5 mm, height: 2 mm }, turn: { axis: x, by: 90 deg } } ] }
      - { name: knob, sphere: { radius: 1 mm }, at: [0 mm, 0 mm, 1 mm] }
    medium: oil
    against: wedge.top
    with: body.bottom
    shift: [1 mm, 2 mm]
    gap: 0.1 mm
    faces: { body.bore.side: coating, knob.surface: white, body.top: low }
  dome: { cap: { radius: 3 mm, height: 2 mm }, medium: block, at: [0 mm, 0 mm, 20 mm], turn: [ { axis: z, by: 30 deg } ], faces: { dome: frosted, bottom: satin } }
  funnel: { cone: { bottom-radius: 3 mm, top-diameter: 2 mm, height: 1 mm }, medium: air, minus: [ { name: hole, cylinder: { radius: 1 um, height: 5 mm } } ] }
pumps:
  disc: { patch: { disc: 2 mm }, power: 3 W, wavelength: 445 nm, at: [0 mm, 0 mm, 50 mm], direction: [0, 0, -1], roll: 10 deg, divergence: 2 deg }
  beam: { gaussian: { radius: 1 mm, half-angle: 5 mrad }, power: 300 mW, wavelength: 450 nm, toward: wedge.x, distance: 3 cm, tilt: [1 deg, 0 deg] }
  lamp: { lambertian: { rectangle: [1 mm, 2 mm] }, power: 1 W, wavelength: 455 nm, linewidth: 20 nm, toward: dome.dome, distance: 1 mm, shift: [1 mm, 0 mm], driver: 90 % }
  bank: { diodes: { across: 2, along: a / 1 mm, pitch: [1 mm, 1 mm] }, divergence: [10 deg, 20 deg], lens: { focal-length: -5 mm, distance: 4 mm }, power: 1 W, wavelength: 455 nm, toward: wedge.y, distance: 9 mm }
detectors:
  eye: { plane: { at: [0 mm, 0 mm, 0 mm], normal: [0, 0, 2], disc: 3 mm }, pixels: [8, 8] }
  side: { face: wedge.z }
exit: { face: eye, pixels: [64, 32] }
surroundings: water
trace: { histories: 1e6, precision: 0.2 %, seed: 42, voxels: [8, 9, 10], polarisation: carried }
`;

const reading = readDesignText(RICH, 'rich.yaml');
if (!reading.ok) throw new Error(reading.faults.map(formatFault).join('\n'));
const { description } = reading;

function faultsOf(from: string, to: string): readonly LocatedFault[] {
  if (!RICH.includes(from)) throw new Error(`the design has no ${from}`);
  const changed = readDesignText(RICH.replace(from, to), 'rich.yaml');
  return changed.ok ? changed.warnings : changed.faults;
}

test('no warnings, whole and in order', () => {
  expect(reading.warnings).toEqual([]);
  expect(description.parts.map(({ name }) => name)).toEqual(['wedge', 'joined', 'dome', 'funnel']);
  expect(description.defaults).toEqual({
    histories: 1e6,
    precision: 0.002,
    seed: '42',
    voxels: [8, 9, 10],
    polarisation: 'carried',
  });
  expect(description.exit).toEqual({ name: 'eye', path: ['exit', 'face'], pixels: [64, 32], radiance: null });
  expect(description.surroundings).toBe('water');
});

test('a clockwise outline is turned round and its names stay on their edges', () => {
  // Written: x runs from (0,0) to (0,10), y from (0,10) to (10,0), z from (10,0) to (0,0).
  const edges: Readonly<Record<string, string>> = { x: '0,0 0,10', y: '0,10 10,0', z: '0,0 10,0' };
  const shape = description.parts[0].pieces[0].shape;
  if (shape.kind !== 'prism' || shape.sides === null) throw new Error('a prism with named sides');
  const { outline, sides } = shape;
  const area =
    outline.reduce((sum, [x, y], i) => sum + x * outline[(i + 1) % 3][1] - y * outline[(i + 1) % 3][0], 0) / 2;
  expect(area).toBe(50);
  const found = sides.map((name, i) => [
    name,
    [outline[i], outline[(i + 1) % 3]]
      .map((corner) => corner.join())
      .sort()
      .join(' '),
  ]);
  expect(Object.fromEntries(found)).toEqual(edges);
});

test('shapes, placements and pieces', () => {
  const [, joined, dome, funnel] = description.parts;
  const hole = {
    shape: { kind: 'cylinder', radius: 0.25, height: 2 },
    turns: [{ axis: 'x', angle: expect.closeTo(Math.PI / 2, 14) }],
  };
  expect(joined.pieces).toMatchObject([
    { name: 'body', shape: { kind: 'box', size: [1, 1, 1] }, minus: [{ name: 'bore', ...hole }] },
    { name: 'knob', shape: { kind: 'sphere', radius: 1 }, at: [0, 0, 1], minus: [] },
  ]);
  expect(joined.placement.against).toMatchObject({ face: 'wedge.top', with: 'body.bottom', shift: [1, 2], gap: 0.1 });
  expect(dome.placement).toMatchObject({
    at: [0, 0, 20],
    turns: [{ axis: 'z', angle: expect.closeTo(Math.PI / 6, 14) }],
  });
  expect(dome.pieces[0].shape).toEqual({ kind: 'cap', radius: 3, height: 2 });
  expect(funnel.pieces[0].shape).toEqual({ kind: 'cone', bottomRadius: 3, topRadius: 1, height: 1 });
  expect(description.parts[0].faces.map(({ face }) => face)).toEqual(['x', '*']);
});

test('media of the design: tables are linear between their rows and held at the ends', () => {
  const oil = description.media.get('oil');
  expect(oil).toMatchObject({ kind: 'solid', base: 'custom', thermal: null });
  expect([300, 400, 550, 700, 900].map((nm) => oil?.index(nm))).toEqual([
    1.5,
    1.5,
    expect.closeTo(1.49, 12),
    1.48,
    1.48,
  ]);
  expect(oil?.absorption(500)).toBeCloseTo(0.01, 14);
  expect(description.media.get('block')?.absorption(550)).toBeCloseTo(0.0015, 14);
});

test('dyes of the design: molar extinction by concentration, or absorption by factor', () => {
  const [probe, line] = description.media.get('bath')?.dyes ?? [];
  // 0.1 g/L at 400 g/mol is 0.25 mmol/L; 4000 L/(mol cm) half way down the table: decadic 1 /cm, Napierian 0.23026 /mm.
  expect(probe.concentration).toBeCloseTo(0.00025, 14);
  expect(probe.absorption(500)).toBeCloseTo(Math.LN10 / 10, 12);
  expect(probe.emission).toMatchObject({ kind: 'spectrum', fromNm: 500, toNm: 520 });
  if (probe.emission.kind !== 'spectrum') throw new Error('a spectrum');
  expect([499, 510, 521].map(probe.emission.photonsPerNm)).toEqual([0, expect.closeTo(0.55, 12), 0]);
  expect(line).toMatchObject({ concentration: null, quantumYield: 0.5, emission: { kind: 'line', wavelengthNm: 520 } });
  expect(line.absorption(450)).toBe(2);
});

test('finishes', () => {
  const { finishes } = description;
  expect(finishes.get('fixed')).toMatchObject({ kind: 'mirror', reflectance: 0.5 });
  expect(finishes.get('coating')).toMatchObject({
    wavelengthsNm: [450],
    anglesDeg: [0, 45],
    reflectance: [[0.05, 0.1]],
    transmittance: [[0.95, 0.8]],
  });
  expect(finishes.get('white')).toMatchObject({ kind: 'diffuser', reflects: 0.97, transmits: 0 });
  expect(finishes.get('frosted')).toMatchObject({ kind: 'scatter', shape: 'gaussian', split: null });
  expect(finishes.get('satin')).toMatchObject({ shape: 'top-hat', split: { reflects: 0.3, transmits: 0.6 } });
  expect(finishes.get('low')).toMatchObject({
    kind: 'dichroic',
    edgeNm: 490,
    widthNm: 0,
    passes: 'above',
    absorbs: 0.01,
  });
});

test('pumps and detectors', () => {
  const [disc, beam, lamp, bank] = description.pumps;
  const two = expect.closeTo(Math.PI / 90, 14);
  expect(disc).toMatchObject({
    aim: { kind: 'along', at: [0, 0, 50], direction: [0, 0, -1] },
    beam: { kind: 'patch', divergence: [two, two] },
  });
  expect(beam).toMatchObject({
    power: 0.3,
    aim: { kind: 'toward', face: 'wedge.x', distance: 30 },
    beam: { kind: 'gaussian', radius: 1, halfAngle: 0.005 },
  });
  expect(lamp).toMatchObject({
    linewidthNm: 20,
    driver: 0.9,
    beam: { kind: 'lambertian', outline: { kind: 'rectangle', size: [1, 2] } },
  });
  expect(bank.beam).toMatchObject({ across: 2, along: 2, lens: { focalLength: -5, distance: 4 } });
  expect(description.detectors).toMatchObject([
    { name: 'eye', target: { kind: 'plane', normal: [0, 0, 2], outline: { kind: 'disc', radius: 3 } }, pixels: [8, 8] },
    { name: 'side', target: { kind: 'face', face: 'wedge.z' }, pixels: null },
  ]);
});

describe('cross-checks', () => {
  test.each<readonly [string, string, FaultCode, string]>([
    ['[10 mm, 0 mm]]', '[1 mm, 1 mm], [10 mm, 0 mm]]', 'geometry', 'not convex at this corner'],
    ['[10 mm, 0 mm]]', '[0 mm, 20 mm]]', 'geometry', 'not convex'],
    ['[[0 mm, 0 mm], [0 mm, 10 mm], [10 mm, 0 mm]]', '[[0 mm, 0 mm], [10 mm, 0 mm]]', 'type', 'wrong length'],
    [
      '[[0 mm, 0 mm], [0 mm, 10 mm], [10 mm, 0 mm]]',
      '[[0 mm, 3 mm], [2 mm, -3 mm], [-3 mm, 1 mm], [3 mm, 1 mm], [-2 mm, -3 mm]]',
      'geometry',
      'crosses itself',
    ],
    ['sides: [x, y, z]', 'sides: [x, y]', 'geometry', 'number of names'],
    ['sides: [x, y, z]', 'sides: [x, y, y]', 'type', 'taken already'],
    ['sides: [x, y, z]', 'sides: [x, y, top]', 'type', 'meaning of its own'],
    [
      'cap: { radius: 3 mm, height: 2 mm }',
      'cap: { radius: 3 mm, height: 7 mm }',
      'geometry',
      'higher than its sphere',
    ],
    ['bottom-radius: 3 mm, top-diameter: 2 mm', 'bottom-radius: 0 mm, top-diameter: 0 mm', 'geometry', 'no volume'],
    ['diameter: 0.5 mm', 'diameter: 0.5 mm, radius: 1 mm', 'type', 'exclude each other'],
    ['diameter: 0.5 mm, ', '', 'missing', 'a required field is missing'],
    ['sphere: { radius: 1 mm }', 'sphere: { radius: 1 mm }, box: [1 mm, 1 mm, 1 mm]', 'type', 'exclude each other'],
    ['sphere: { radius: 1 mm }, ', '', 'missing', 'a required field is missing'],
    ['name: knob', 'name: body', 'type', 'taken already'],
    ['body.bore.side', 'body.bor.side', 'unknown-name', 'no face of this name'],
    ['against: wedge.top', 'against: dome.bottom', 'geometry', 'only on a part above it'],
    ['reflects: 30 %', 'reflects: 50 %', 'energy', 'create energy'],
    ['diffuser: { reflects: 97 % }', 'diffuser: { reflects: 97 %, transmits: 4 % }', 'energy', 'create energy'],
    ['10 %, 80 %', '30 %, 80 %', 'energy', 'create energy'],
    ['[450 nm, 45 deg,', '[451 nm, 45 deg,', 'finish', 'not a full grid'],
    ['[450 nm, 45 deg,', '[450 nm, 0 deg,', 'finish', 'twice'],
    ['[450 nm, 45 deg,', '[450 nm, 95 deg,', 'range', 'too large'],
    ['[550 nm, 0 L', '[440 nm, 0 L', 'range', 'must rise'],
    ['[520 nm, 1]', '[490 nm, 1]', 'range', 'must rise'],
    ['[[500 nm, 0.1], [520 nm, 1]]', '[[500 nm, 0], [520 nm, 0]]', 'range', 'zero at every wavelength'],
    [', molar-mass: 400 g/mol', '', 'missing', 'needs the molar mass'],
    ['line: 2 }', 'line: 2 mmol/L }', 'quantity', 'wrong kind'],
    ['absorption: 1 /mm', 'absorption: 1 mm', 'quantity', 'a length cannot stand here'],
    ['{ solid: pmma,', '{ solid: pmma, pH: 7,', 'unknown-key', 'pH belongs to a solvent'],
    ['{ solid: pmma,', '{ solid: pmma, kind: solid,', 'unknown-key', 'kind belongs'],
    ['{ solid: pmma,', '{ solid: pmmma,', 'unknown-name', 'no solid of the library'],
    ['surroundings: water', 'surroundings: watre', 'unknown-name', 'no material of the library'],
    [
      'direction: [0, 0, -1]',
      'direction: [0, 0, -1], distance: 3 mm',
      'unknown-key',
      'belongs to a pump with `toward`',
    ],
    ['direction: [0, 0, -1], ', '', 'missing', 'a required field is missing'],
    ['direction: [0, 0, -1]', 'direction: [0 mm, 0 mm, -1 mm]', 'quantity', 'a length cannot stand here'],
    ['half-angle: 5 mrad }', 'half-angle: 5 mrad }, divergence: 2 deg', 'unknown-key', 'belongs to diodes or a patch'],
    ['divergence: [10 deg, 20 deg], ', '', 'missing', 'a required field is missing'],
    ['focal-length: -5 mm', 'focal-length: 0 mm', 'range', 'focal length zero'],
    ['normal: [0, 0, 2]', 'normal: [0, 0, 0]', 'range', 'looks nowhere'],
    ['face: wedge.z', 'face: wedge.w', 'unknown-name', 'no part has this face'],
    ['face: eye', 'face: eys', 'unknown-name', 'no detector has this name'],
    ['voxels: [8, 9, 10]', 'voxels: [800, 900, 1000]', 'range', 'too fine'],
    ['pumps:', 'pumps: {}\nspare:', 'missing', 'at least one of its pumps'],
    ['medium: oil', 'medium: bath', 'caution', 'no part is filled with this medium'],
  ])('%j → %j: %s %s', (from, to, code, problem) => {
    expect(faultsOf(from, to)).toContainEqual(
      expect.objectContaining({ code, problem: expect.stringContaining(problem) }),
    );
  });
});
