/** Fields of a spectrum kept in a file beside the design. */
import { optional, required, withDefault } from './form.js';
import { quantity } from './form-quantities.js';
import { record } from './form-record.js';
import { freeText, oneWord } from './form-scalars.js';

const file = required(
  freeText('the name of a CSV or JCAMP-DX file', 300),
  'A file beside the design: CSV with units in its heading, or JCAMP-DX (.jdx, .dx).',
);

export const extinctionFileForm = record('the file of an absorption spectrum', {
  file,
  concentration: optional(
    quantity('concentration', { above: 0 }),
    'Concentration the absorbance was measured at; needed where the file holds absorbance or transmittance.',
  ),
  cuvette: optional(quantity('length', { above: 0 }), 'Path of the light through the cuvette it was measured in.'),
  baseline: optional(
    oneWord('keep', 'subtract'),
    'What to do with an instrument baseline found at the red end: `subtract` takes it off and lets the band fall on as ' +
      'a thermal tail; `keep` leaves it without a warning. Left out: kept, with a warning.',
  ),
});

export const EMISSION_VALUES = [
  'photons-per-nm',
  'energy-per-nm',
  'photons-per-wavenumber',
  'energy-per-wavenumber',
] as const;

export const emissionFileForm = record('the file of an emission spectrum', {
  file,
  values: optional(
    oneWord(...EMISSION_VALUES),
    'What the values of the file are, relative; needed where the heading of the file does not say it, as in JCAMP-DX.',
  ),
});

export const quenchingForm = record(
  'the constants of self-quenching',
  {
    'half-at': optional(
      quantity('concentration', { above: 0 }),
      'Concentration c½ at which half the yield is left: φ/φ₀ = 1/(1 + (c/c½)²).',
    ),
    'stern-volmer': optional(quantity('molarVolume', { above: 0 }), 'Constant K of φ/φ₀ = 1/(1 + K c).'),
    perrin: optional(quantity('concentration', { above: 0 }), 'Critical concentration c₀ of φ/φ₀ = exp(−c/c₀).'),
    'transfer-radius': optional(
      quantity('thickness', { above: 0, max: 20 }),
      'Förster radius of transfer between like molecules, with dimers as traps (Bojarski 1972).',
    ),
    pairing: withDefault(
      quantity('molarVolume', { min: 0 }),
      0,
      '0 L/mol',
      'Constant K = [dimer]/[single]² of dark dimers, with `transfer-radius`.',
    ),
  },
  { exactlyOne: [['half-at', 'stern-volmer', 'perrin', 'transfer-radius']] },
);

export type ExtinctionFile = ReturnType<typeof extinctionFileForm.read>;
export type EmissionFile = ReturnType<typeof emissionFileForm.read>;
export type EmissionValues = (typeof EMISSION_VALUES)[number];
export type QuenchingRecord = ReturnType<typeof quenchingForm.read>;
