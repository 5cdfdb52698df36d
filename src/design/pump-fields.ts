/** Fields of pumps. */
import type { RadianceCells } from './description.js';
import { optional, required, withDefault } from './form.js';
import { either, mapped } from './form-either.js';
import { pair, triple, tuple } from './form-lists.js';
import { count, quantity } from './form-quantities.js';
import { mapOf, record } from './form-record.js';
import { freeText, oneWord, reference } from './form-scalars.js';
import { anyLength, size } from './part-fields.js';
import { WAVELENGTH_RANGE } from './spectral-form.js';

const halfTurn = quantity('angle', { min: 0, below: Math.PI });
const tilt = quantity('angle', { above: -Math.PI / 2, below: Math.PI / 2 });
const efficiency = quantity('fraction', { above: 0, max: 1 });

const outlineFields = {
  rectangle: optional(pair(size, 'a size [u, v]'), 'Width and height.'),
  disc: optional(size, 'Radius.'),
};

const outline = record('rectangle or disc', outlineFields, { exactlyOne: [['rectangle', 'disc']] });
export type OutlineFields = ReturnType<typeof outline.read>;

const diodes = record('across, along and pitch', {
  across: required(count(1, 10_000), 'Emitters side by side, along u.'),
  along: required(count(1, 10_000), 'Emitters one above the other, along v.'),
  pitch: required(pair(size, 'a pitch [u, v]'), 'Distance from centre to centre along u and v.'),
  stack: optional(
    record('rows, pitch and step', {
      rows: required(count(2, 100), 'Banks whose beams knife-edge mirrors fold into one, row upon row.'),
      pitch: required(size, 'Distance of the rows along v once they are folded.'),
      step: withDefault(
        quantity('length', { min: 0 }),
        0,
        '0 mm',
        'How much further each row has to go than the last.',
      ),
    }),
    'A mirrored stack of such banks. The power of the pump is that behind the mirrors.',
  ),
  pointing: optional(
    record('spread and seed', {
      spread: required(quantity('angle', { above: 0, max: 0.5 }), 'Standard deviation about u and about v.'),
      seed: withDefault(freeText('a word or number', 100), 'pointing', 'pointing', 'Another seed is another bank.'),
    }),
    'Errors of direction, drawn once for each emitter.',
  ),
});

const tableName = freeText('a CSV file in the folder of the design', 300);

const ring = record('count, axis and through', {
  count: required(count(2, 360), 'Number of pumps, evenly round a full turn; they share the power.'),
  axis: withDefault(oneWord('x', 'y', 'z'), 'z', 'z', 'Axis of the ring, one of the design.'),
  through: withDefault(triple(anyLength, 'a place [x, y, z]'), [0, 0, 0], '[0 mm, 0 mm, 0 mm]', 'A point on the axis.'),
});

const gaussian = record('radius and half-angle', {
  radius: required(size, '1/e² radius at the origin of the beam.'),
  'half-angle': withDefault(
    quantity('angle', { min: 0, below: Math.PI / 2 }),
    0,
    '0 deg',
    '1/e² half angle of the divergence.',
  ),
});

const lens = record('focal-length and distance', {
  'focal-length': required(anyLength, 'Focal length of the thin lens; negative for one that spreads.'),
  distance: required(quantity('length', { min: 0 }), 'From the emitters to the lens.'),
});

const divergence = either<readonly [number, number]>({
  list: pair(halfTurn, 'a divergence [fast, slow]'),
  scalar: mapped(halfTurn, (both) => [both, both]),
});

const pumpRecord = record(
  'a beam, its power and its wavelength, and its aim',
  {
    diodes: optional(diodes, 'A bank of laser diodes.'),
    patch: optional(outline, 'An evenly filled beam.'),
    gaussian: optional(gaussian, 'A Gaussian beam.'),
    lambertian: optional(outline, 'A Lambertian emitter.'),
    rays: optional(tableName, 'Rays from a CSV file beside the design, in the axes of the pump.'),
    power: required(quantity('power', { above: 0 }), 'Optical power of the whole pump.'),
    wavelength: optional(quantity('wavelength', WAVELENGTH_RANGE), 'Centre wavelength.'),
    spectrum: optional(tableName, 'A measured spectrum from a CSV file beside the design, in place of `wavelength`.'),
    linewidth: withDefault(
      quantity('wavelength', { min: 0, max: 200 }),
      0,
      '0 nm',
      'Full width of the line at half maximum.',
    ),
    divergence: optional(divergence, 'Far field, full width at half maximum: [fast, slow], or one angle for both.'),
    'far-field': optional(
      tableName,
      'A measured far field from a CSV file beside the design, in place of `divergence`.',
    ),
    'fast-axis': optional(oneWord('along', 'across'), 'Which way the fast axis lies. Default: along.'),
    lens: optional(lens, 'A thin lens in front of the whole bank.'),
    polarised: optional(
      quantity('angle'),
      'Angle of the electric field from across (the u axis) towards along (v). Default: unpolarised.',
    ),
    'wall-plug': optional(efficiency, 'Optical power per electrical power of the diodes.'),
    driver: optional(efficiency, 'Efficiency of the driver.'),
    toward: optional(reference('part.face', ['cell.front']), 'Aims at the centre of a face, along its inward normal.'),
    distance: optional(quantity('length', { above: 0 }), 'How far in front of the face the pump stands.'),
    shift: optional(pair(anyLength, 'a shift [u, v]'), 'Shift along the face. Default: none.'),
    tilt: optional(pair(tilt, 'a tilt [about u, about v]'), 'Tilt of the beam. Default: none.'),
    at: optional(triple(anyLength, 'a place [x, y, z]'), 'Where the pump stands, in place of `toward`.'),
    direction: optional(
      triple(quantity('number'), 'a direction [x, y, z] in plain numbers'),
      'Where the pump at `at` looks; its length does not matter.',
    ),
    roll: optional(quantity('angle'), 'Turn of a pump at `at` about its beam. Default: none.'),
    ring: optional(ring, 'Repeats the pump round an axis.'),
  },
  {
    exactlyOne: [
      ['diodes', 'patch', 'gaussian', 'lambertian', 'rays'],
      ['toward', 'at'],
    ],
  },
);

export type PumpRecord = ReturnType<typeof pumpRecord.read>;

export const pumpsForm = mapOf('pumps by name', pumpRecord);

const pixelCount = count(1, 4096);
export const pixels = optional(
  pair(pixelCount, 'numbers of pixels [u, v]'),
  'Pixels of the map. Default: chosen from the shape.',
);

/** Cells of a radiance record when the design only says `yes`. */
const RADIANCE_BY_DEFAULT = [4, 4, 18, 12] as const;
const radianceCount = count(1, 1000);
export const radiance = optional(
  either<RadianceCells | null>({
    scalar: mapped(oneWord('yes', 'no'), (word) => (word === 'yes' ? RADIANCE_BY_DEFAULT : null)),
    list: tuple<[number, number, number, number]>(
      'numbers of cells [u, v, polar, azimuth]',
      radianceCount,
      radianceCount,
      radianceCount,
      radianceCount,
    ),
  }),
  'Records radiance by place and direction too: cells [u, v, polar, azimuth], or yes for [4, 4, 18, 12]. Default: no.',
);

const polarAngle = quantity('angle', { min: 0, max: Math.PI });

const sphere = record('centre and radius', {
  centre: required(triple(anyLength, 'a place [x, y, z]'), 'Centre of the sphere.'),
  radius: required(size, 'Radius of the sphere.'),
  axis: withDefault(
    triple(quantity('number'), 'a direction [x, y, z] in plain numbers'),
    [0, 0, 1],
    '[0, 0, 1]',
    'Axis from which polar angles count; its length does not matter.',
  ),
  polar: withDefault(
    pair(polarAngle, 'polar angles [from, to]'),
    [0, Math.PI],
    '[0 deg, 180 deg]',
    'The part of the sphere that records, between two angles from the axis.',
  ),
});

const plane = record(
  'at, normal, and rectangle or disc',
  {
    at: required(triple(anyLength, 'a place [x, y, z]'), 'Centre of the plane.'),
    normal: required(
      triple(quantity('number'), 'a direction [x, y, z] in plain numbers'),
      'Side the light leaves by; its length does not matter.',
    ),
    ...outlineFields,
  },
  { exactlyOne: [['rectangle', 'disc']] },
);

const detectorRecord = record(
  'face, plane or sphere',
  {
    face: optional(reference('part.face', ['cell.left']), 'Records the light that leaves the part through this face.'),
    plane: optional(plane, 'Records the light that crosses a bounded plane along its normal.'),
    sphere: optional(sphere, 'Records the light that crosses a sphere, or a part of it, outward.'),
    pixels,
    radiance,
  },
  { exactlyOne: [['face', 'plane', 'sphere']] },
);

export type DetectorRecord = ReturnType<typeof detectorRecord.read>;

export const detectorsForm = mapOf('detectors by name', detectorRecord);
