/** Fields of finishes. */

import type { Form } from './form.js';
import { optional, required, withDefault } from './form.js';
import { either, mapped } from './form-either.js';
import { listOf, pair, tuple } from './form-lists.js';
import { quantity } from './form-quantities.js';
import { mapOf, record } from './form-record.js';
import { freeText, oneWord } from './form-scalars.js';
import { mirrorForm } from './mirror-form.js';
import { WAVELENGTH_RANGE } from './spectral-form.js';
import { stackForm } from './stack-fields.js';

const share = quantity('fraction', { min: 0, max: 1 });
const wavelength = quantity('wavelength', WAVELENGTH_RANGE);
const incidence = quantity('angle', { min: 0, max: Math.PI / 2 });

const dichroic = record('edge, passes, transmits and reflects', {
  edge: required(wavelength, 'Wavelength at which the coating turns from passing to reflecting.'),
  width: withDefault(quantity('wavelength', { min: 0, max: 500 }), 0, '0 nm', 'Width of the edge from 10 % to 90 %.'),
  passes: required(oneWord('below', 'above'), 'Side of the edge that passes.'),
  transmits: required(share, 'Share transmitted in the pass band.'),
  reflects: required(share, 'Share reflected in the stop band.'),
  absorbs: withDefault(share, 0, '0 %', 'Share absorbed at every wavelength.'),
});

const row = tuple<[number, number, number, number]>(
  '[wavelength, angle, share reflected, share transmitted]',
  wavelength,
  incidence,
  share,
  share,
);

export type CoatingRow = ReturnType<typeof row.read>;

/** A table as rows in the design, or the name of a CSV file beside it. */
export type CoatingTable =
  | { readonly kind: 'rows'; readonly rows: readonly CoatingRow[] }
  | { readonly kind: 'file'; readonly name: string };

const table: Form<CoatingTable> = either<CoatingTable>({
  scalar: mapped(freeText('a CSV file in the folder of the design', 300), (name) => ({ kind: 'file', name })),
  list: mapped(listOf(row, 'rows of [wavelength, angle, R, T]', 1, 100_000), (rows) => ({ kind: 'rows', rows })),
});

const diffuser = record('reflects and transmits', {
  reflects: withDefault(share, 0, '0 %', 'Share sent back, Lambertian.'),
  transmits: withDefault(share, 0, '0 %', 'Share let through, Lambertian.'),
});

const fullWidth = quantity('angle', { above: 0, max: Math.PI });

const scatter = record('shape and fwhm', {
  shape: required(oneWord('gaussian', 'top-hat'), 'Shape of the radiant intensity about the undisturbed direction.'),
  fwhm: required(
    either<readonly [number, number]>({
      scalar: mapped(fullWidth, (width) => [width, width] as const),
      list: pair(fullWidth, '[along u, along v]'),
    }),
    "Full width of it at half maximum; or two of them, along the face's u and v axes.",
  ),
  reflects: optional(share, 'Share reflected. Without `reflects` and `transmits` the Fresnel law decides.'),
  transmits: optional(share, 'Share transmitted.'),
});

const finishRecord = record(
  'one of mirror, dichroic, stack, table, diffuser, scatter, bsdf',
  {
    mirror: optional(mirrorForm, 'Share reflected at every angle and wavelength, or a metal of the library.'),
    dichroic: optional(dichroic, 'Idealised dichroic, the same at all angles.'),
    stack: optional(
      stackForm,
      'Stack of thin films, worked out between the two media that touch the face. No substrate is part of it.',
    ),
    table: optional(
      table,
      'Shares by wavelength and angle of incidence (in the medium the light comes from), on a full grid: a CSV file with ' +
        'the columns wavelength_nm, angle_deg, reflectance, transmittance, or rows of [wavelength, angle, R, T].',
    ),
    diffuser: optional(diffuser, 'Lambertian diffuser; what is neither reflected nor transmitted is absorbed.'),
    scatter: optional(scatter, 'Scatter about the reflected and the refracted direction.'),
    bsdf: optional(
      freeText('a CSV file in the folder of the design', 300),
      'Scatter as measured: a CSV file with the columns incidence_deg, scatter_deg, azimuth_deg (may be left out), and ' +
        'reflected_per_sr, transmitted_per_sr or both.',
    ),
  },
  { exactlyOne: [['mirror', 'dichroic', 'stack', 'table', 'diffuser', 'scatter', 'bsdf']] },
);

export type FinishRecord = ReturnType<typeof finishRecord.read>;

/** Finishes every design has. */
export const BUILT_IN_FINISHES = ['clear', 'black'] as const;

const taken = new Map(BUILT_IN_FINISHES.map((name) => [name as string, 'every design has a finish of this name']));

export const finishesForm = mapOf('finishes by name', finishRecord, taken);
