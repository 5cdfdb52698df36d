/** Fields of media and of dyes given in the design itself. */
import { optional, required, withDefault } from './form.js';
import { either, mapped } from './form-either.js';
import { quantity, quantityOf } from './form-quantities.js';
import { mapOf, type Named, record } from './form-record.js';
import { oneWord, type Reference, reference } from './form-scalars.js';
import { scatterersForm } from './scatterer-fields.js';
import { rowsOf, type SpectralRows, spectral, WAVELENGTH_RANGE } from './spectral-form.js';
import {
  type EmissionFile,
  type ExtinctionFile,
  emissionFileForm,
  extinctionFileForm,
  quenchingForm,
} from './spectrum-fields.js';

const wavelength = quantity('wavelength', WAVELENGTH_RANGE);

const strength = quantityOf(['concentration', 'massConcentration', 'number'], { min: 0 });

const dyes = withDefault(
  mapOf('dye names, each with its strength', strength),
  [],
  'no dye',
  'Dyes dissolved in the medium: a dye of the library or of `dyes`, with its concentration (mol/L, or g/L through its ' +
    'molar mass; a plain factor for a dye given by `absorption`).',
);

const absorption = optional(
  spectral(quantity('absorption', { min: 0 }), 'absorption'),
  'Napierian absorption of the bare material, or a list of [wavelength, absorption] pairs, linear between them and ' +
    'held at the ends. For a library material it takes the place of the library curve.',
);

const mediumRecord = record(
  'solvent, solid or index, with dyes',
  {
    solvent: optional(
      either<SolventEntry>({
        scalar: mapped(reference('a solvent of the library', ['ethanol', 'water']), (one) => ({ kind: 'one', one })),
        map: mapped(
          mapOf('solvents, each with its share by volume', quantity('fraction', { above: 0, below: 1 })),
          (shares) => ({ kind: 'mixture', shares }),
        ),
      }),
      'A solvent of the library, or several with their shares by volume before mixing, which sum to 100 %.',
    ),
    solid: optional(reference('a solid of the library', ['pmma']), 'A glass, crystal or polymer of the library.'),
    index: optional(
      spectral(quantity('number', { min: 1, max: 5 }), 'index'),
      'Refractive index of a material of your own, or a list of [wavelength, index] pairs.',
    ),
    kind: optional(oneWord('liquid', 'solid'), 'What a material given by `index` is. Default: liquid.'),
    pH: optional(
      quantity('number', { min: 0, max: 14 }),
      'pH of a solution in a solvent: mixes the protolytic forms of a dye where the library knows them.',
    ),
    temperature: optional(
      quantity('temperature', { min: 173.15, max: 673.15 }),
      'Temperature of the medium. Moves the yield of dyes with data, and the index of solvents. Left out: data as they are, about 25 °C.',
    ),
    quenching: withDefault(
      oneWord('on', 'off'),
      'on',
      'on',
      'Whether dyes of the library quench themselves at their strength; off gives the yield of dilute dyes.',
    ),
    absorption,
    reservoir: optional(
      quantity('volume', { above: 0 }),
      'Volume of liquid that circulates through the parts besides what is in them: it shares the bleaching.',
    ),
    dyes,
    scatterers: withDefault(
      scatterersForm,
      [],
      'none',
      'What turns light aside within the medium, by names of your own; several add up.',
    ),
  },
  { exactlyOne: [['solvent', 'solid', 'index']] },
);

/** What a solution is made with. */
export type SolventEntry =
  | { readonly kind: 'one'; readonly one: Reference }
  | { readonly kind: 'mixture'; readonly shares: readonly Named<number>[] };

export type MediumRecord = ReturnType<typeof mediumRecord.read>;
export type DyeStrength = ReturnType<typeof strength.read>;

/** A medium as written: the bare name of a library material, or a record. */
export type MediumEntry =
  | { readonly kind: 'library'; readonly material: Reference }
  | { readonly kind: 'record'; readonly fields: MediumRecord };

export const mediaForm = mapOf(
  'media by name',
  either<MediumEntry>({
    scalar: mapped(
      reference('a solvent, solid or gas of the library', ['borosilicate-crown', 'ethanol', 'air']),
      (material) => ({ kind: 'library', material }),
    ),
    map: mapped(mediumRecord, (fields) => ({ kind: 'record', fields })),
  }),
);

type RowsEntry = { readonly kind: 'rows'; readonly rows: SpectralRows };
export type ExtinctionEntry = RowsEntry | { readonly kind: 'file'; readonly fields: ExtinctionFile };
export type EmissionEntry = RowsEntry | { readonly kind: 'file'; readonly fields: EmissionFile };

const rowsEntry = (rows: SpectralRows): RowsEntry => ({ kind: 'rows', rows });

const dyeRecord = record(
  'extinction or absorption, emission and yield',
  {
    extinction: optional(
      either<ExtinctionEntry>({
        scalar: mapped(quantity('extinction', { min: 0 }), (constant) => rowsEntry([[null, constant]])),
        list: mapped(rowsOf(quantity('extinction', { min: 0 }), 'extinction'), rowsEntry),
        map: mapped(extinctionFileForm, (fields) => ({ kind: 'file', fields })),
      }),
      'Decadic molar extinction, or a list of [wavelength, extinction] pairs, linear between them and held at the ends, or a file.',
    ),
    absorption: optional(
      spectral(quantity('absorption', { min: 0 }), 'absorption'),
      'Napierian absorption at strength 1, in place of an extinction: media then give the dye as a plain factor.',
    ),
    emission: required(
      either<EmissionEntry>({
        scalar: mapped(wavelength, (line) => rowsEntry([[line, 1]])),
        list: mapped(rowsOf(quantity('number', { min: 0 }), 'photons per nm'), rowsEntry),
        map: mapped(emissionFileForm, (fields) => ({ kind: 'file', fields })),
      }),
      'One wavelength, or a list of [wavelength, relative photons per nm] pairs, linear between them, nothing outside, or a file.',
    ),
    yield: required(quantity('fraction', { min: 0, max: 1 }), 'Quantum yield: photons emitted per photon absorbed.'),
    lifetime: optional(quantity('lifetime', { above: 0 }), 'Fluorescence lifetime.'),
    quenching: optional(quenchingForm, 'How the dye quenches itself as it gets stronger. Left out: not at all.'),
    'molar-mass': optional(quantity('molarMass', { above: 0 }), 'Molar mass, needed where a strength is given in g/L.'),
    'bleach-yield': optional(
      quantity('fraction', { min: 0, max: 1 }),
      'Molecules destroyed for good per photon absorbed, such as 1e-6.',
    ),
    'triplet-yield': optional(
      quantity('fraction', { min: 0, max: 1 }),
      'Share of excitations that end in the triplet; needs `triplet-lifetime`.',
    ),
    'triplet-lifetime': optional(
      quantity('lifetime', { above: 0 }),
      'How long the triplet lasts in the liquid as used, air and all; needs `triplet-yield`.',
    ),
  },
  { exactlyOne: [['extinction', 'absorption']] },
);

export type DyeRecord = ReturnType<typeof dyeRecord.read>;

export const dyesForm = mapOf('dyes by name', dyeRecord);
