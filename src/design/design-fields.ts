/** The table of fields of a design file: validator, JSON Schema and help all come from it. */

import type { RadianceCells } from './description.js';
import { finishesForm } from './finish-fields.js';
import { optional, required, withDefault } from './form.js';
import { either, mapped } from './form-either.js';
import { triple } from './form-lists.js';
import { count, quantity } from './form-quantities.js';
import { mapOf, record } from './form-record.js';
import { freeText, oneWord, type Reference, reference } from './form-scalars.js';
import { dyesForm, mediaForm } from './media-fields.js';
import { partsForm } from './part-fields.js';
import { detectorsForm, pixels, pumpsForm, radiance } from './pump-fields.js';
import { dialForm } from './read-dials.js';
import { layerMaterialsForm } from './stack-fields.js';

const exitName = reference('part.face or the name of a detector', ['lid.top']);

/** Exit as written: a bare name, or with the pixels of its map. */
export interface ExitRecord {
  readonly face: Reference;
  readonly pixels: readonly [number, number] | null;
  readonly radiance: RadianceCells | null;
}

const exit = either<ExitRecord>({
  scalar: mapped(exitName, (face) => ({ face, pixels: null, radiance: null })),
  map: record('face, pixels and radiance', {
    face: required(exitName, 'part.face or the name of a detector.'),
    pixels,
    radiance,
  }),
});

const trace = record('histories, precision, seed, voxels, polarisation', {
  histories: optional(count(1, 2 ** 31 - 1024), 'Number of histories.'),
  precision: optional(
    quantity('fraction', { above: 0, below: 1 }),
    'Relative standard error of the exit fraction at which tracing may stop.',
  ),
  seed: optional(freeText('a word or number', 100), 'Seed of the random streams: same seed, same bits.'),
  voxels: optional(
    triple(count(1, 1000), 'numbers of voxels [x, y, z]'),
    'Voxels of the absorbed-power map over all dyed parts.',
  ),
  polarisation: optional(
    oneWord('carried', 'averaged'),
    'Whether light keeps its polarisation, or faces treat all light as unpolarised. Default: carried where a pump is polarised.',
  ),
});

export const designForm = record('the fields of a design', {
  design: required(freeText('a title', 200), 'Title of the design.'),
  about: optional(freeText('some sentences', 5000), 'What the design is for.'),
  dials: withDefault(
    mapOf('dials by name', dialForm),
    [],
    'none',
    'Named quantities that fields may use in arithmetic and that studies may turn.',
  ),
  dyes: withDefault(dyesForm, [], 'none', 'Dyes of your own, beside those of the library.'),
  media: withDefault(mediaForm, [], 'none', 'What parts are filled with.'),
  'layer-materials': withDefault(
    layerMaterialsForm,
    [],
    'none',
    'Materials of your own for the layers of stacks, beside those of the library.',
  ),
  finishes: withDefault(finishesForm, [], 'none', 'What faces do to light, beside the built-in clear and black.'),
  parts: required(partsForm, 'Closed solids; where parts overlap, the later one wins.'),
  pumps: required(pumpsForm, 'Light sources.'),
  detectors: withDefault(detectorsForm, [], 'none', 'Faces, planes and spheres that record maps, spectra and angles.'),
  exit: required(exit, 'Where light becomes output: part.face, or the name of a detector.'),
  surroundings: withDefault(
    reference('the name of a medium', ['air']),
    { name: 'air', path: ['surroundings'] },
    'air',
    'Medium around everything.',
  ),
  trace: optional(trace, 'What the design itself asks of a trace; the command line overrides it.'),
});

export type DesignRecord = ReturnType<typeof designForm.read>;
