/** Fields of stacks of thin films and of the layer materials a design brings itself. */
import { layerMaterialNames } from '../materials/library.js';
import { type Form, optional, required, withDefault } from './form.js';
import { listOf } from './form-lists.js';
import { count, quantity } from './form-quantities.js';
import { mapOf, record } from './form-record.js';
import { freeText, oneWord, type Reference, reference } from './form-scalars.js';
import { spectral, WAVELENGTH_RANGE } from './spectral-form.js';

/** Layers of a stack, groups unfolded. */
export const MOST_LAYERS = 500;
/** Thicker than this no film is smooth enough to act as one. */
const THICKEST_NM = 20_000;
/** Groups within groups. */
const DEEPEST = 3;

const wavelength = quantity('wavelength', WAVELENGTH_RANGE);
const waves = quantity('number', { min: 0, max: 100 });

const layerFields = {
  material: optional(
    reference('a layer material of the design or of the library', layerMaterialNames().slice(0, 5)),
    'What the layer is made of: a layer material of the design, or a film, metal or solid of the library.',
  ),
  thickness: optional(quantity('thickness', { min: 0, max: THICKEST_NM }), 'Thickness of the layer.'),
  'quarter-waves': optional(waves, 'Thickness in quarter waves in the layer: n·thickness = this · wavelength / 4.'),
  'half-waves': optional(waves, 'Thickness in half waves in the layer.'),
  at: optional(wavelength, 'Wavelength of the quarter or half waves, in place of the design-wavelength of the stack.'),
};

export interface LayerRecord {
  readonly path: readonly (string | number)[];
  readonly material: Reference | null;
  readonly thickness: number | null;
  readonly 'quarter-waves': number | null;
  readonly 'half-waves': number | null;
  readonly at: number | null;
  readonly repeat?: number | null;
  readonly layers?: readonly LayerRecord[] | null;
}

function layersForm(depth: number): Form<readonly LayerRecord[]> {
  const words = 'a list of layers, the one at the outside of the face first';
  if (depth === 0) {
    const plain = record('material and a thickness', layerFields, { exactlyOne: [['material']] });
    return listOf<LayerRecord>(plain, words, 1, MOST_LAYERS);
  }
  const item = record(
    'material and a thickness, or repeat and layers',
    {
      ...layerFields,
      repeat: optional(count(1, MOST_LAYERS), 'How many times the group of `layers` follows itself.'),
      layers: optional(layersForm(depth - 1), 'A group of layers, outermost first.'),
    },
    { exactlyOne: [['material', 'layers']] },
  );
  return listOf<LayerRecord>(item, words, 1, MOST_LAYERS);
}

export const stackForm = record('layers', {
  layers: required(
    layersForm(DEEPEST),
    'The layers, outermost first: the first touches what lies outside the face, the last the part the face belongs to. ' +
      'A layer is { material, thickness }, or { material, quarter-waves }; a group is { repeat, layers }.',
  ),
  'design-wavelength': optional(wavelength, 'Wavelength at which quarter and half waves are counted.'),
  scale: withDefault(
    quantity('number', { above: 0, max: 10 }),
    1,
    '1',
    'Factor on all thicknesses: moves the curves along the wavelength.',
  ),
  extrapolate: withDefault(
    oneWord('no', 'yes'),
    'no',
    'no',
    'Whether materials may be used at wavelengths they have no data for; the nearest value is held.',
  ),
});

export type StackRecord = ReturnType<typeof stackForm.read>;

const layerMaterial = record(
  'n and k, or a table',
  {
    n: optional(
      spectral(quantity('number', { min: 0.01, max: 10 }), 'n'),
      'Real part of the index n − ik, or a list of [wavelength, n] pairs.',
    ),
    k: optional(
      spectral(quantity('number', { min: 0, max: 20 }), 'k'),
      'Imaginary part, which absorbs, or a list of [wavelength, k] pairs. Default: 0.',
    ),
    table: optional(
      freeText('a CSV file in the folder of the design', 300),
      'A CSV file with the columns wavelength_nm, n, k in place of `n` and `k`.',
    ),
  },
  { exactlyOne: [['n', 'table']] },
);

export type LayerMaterialRecord = ReturnType<typeof layerMaterial.read>;

export const layerMaterialsForm = mapOf('layer materials by name', layerMaterial);
