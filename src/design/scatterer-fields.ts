/** Fields of what scatters light within a medium. */
import { optional, required } from './form.js';
import { quantity } from './form-quantities.js';
import { mapOf, record } from './form-record.js';
import { reference } from './form-scalars.js';
import { spectral } from './spectral-form.js';

/** Larger spheres are no longer scatterers but small lenses, and their series would take long. */
const LARGEST_RADIUS_MM = 0.05;
const radius = { above: 0, max: LARGEST_RADIUS_MM };
const density = quantity('massConcentration', { above: 0 });
const share = { min: 0, below: 1 };

const henyeyGreenstein = record('coefficient and anisotropy', {
  coefficient: required(
    spectral(quantity('absorption', { min: 0 }), 'coefficient'),
    'Scattering coefficient, the reciprocal of the mean free path, or a list of [wavelength, coefficient] pairs.',
  ),
  anisotropy: required(
    spectral(quantity('number', { above: -1, below: 1 }), 'anisotropy'),
    'Mean cosine g of the scattering angle: 0 isotropic, towards 1 forward; or a list of [wavelength, g] pairs.',
  ),
});

const beads = record(
  'radius or diameter, index or solid, and how many',
  {
    radius: optional(quantity('length', radius), 'Radius of the beads.'),
    diameter: optional(quantity('length', { above: 0, max: 2 * LARGEST_RADIUS_MM }), 'Diameter of the beads.'),
    solid: optional(
      reference('a solid of the library', ['fused-silica']),
      'What the beads are made of: a solid of the library.',
    ),
    index: optional(
      spectral(quantity('number', { min: 0.05, max: 10 }), 'index'),
      'Or their refractive index, or a list of [wavelength, index] pairs.',
    ),
    k: optional(
      spectral(quantity('number', { min: 0, max: 10 }), 'k'),
      'Imaginary part k of the index n − ik of beads that absorb, or a list of [wavelength, k] pairs.',
    ),
    'number-density': optional(quantity('numberDensity', { min: 0 }), 'Beads per volume of the medium.'),
    'volume-fraction': optional(quantity('fraction', share), 'Volume of the beads over that of the medium.'),
    'mass-fraction': optional(
      quantity('fraction', share),
      'Mass of the beads over that of the medium, beads included.',
    ),
    density: optional(density, 'Density of the beads, needed with `mass-fraction`.'),
    'host-density': optional(
      density,
      'Density of the medium without beads, needed with `mass-fraction` where the library has none.',
    ),
  },
  {
    exactlyOne: [
      ['radius', 'diameter'],
      ['solid', 'index'],
      ['number-density', 'volume-fraction', 'mass-fraction'],
    ],
  },
);

const scatterer = record(
  'one of henyey-greenstein, beads',
  {
    'henyey-greenstein': optional(henyeyGreenstein, 'Scattering by a coefficient and a mean cosine.'),
    beads: optional(beads, 'Spheres, after Mie. The index around them is that of the medium.'),
  },
  { exactlyOne: [['henyey-greenstein', 'beads']] },
);

export type ScattererRecord = ReturnType<typeof scatterer.read>;
export type BeadsRecord = NonNullable<ScattererRecord['beads']>;

export const scatterersForm = mapOf('scatterers by name', scatterer);
