/** Maps, spectra, histograms and what their axes show. */
import type { Histogram, RecordedMap, RecordedSpectrum } from '../tallies/run-tallies.js';
import { type TermText, termsOf } from './term.js';

const IRRADIANCE = 'Σ energy of the photons in a cell ÷ (its area on the face)';
const DENSITY = 'Σ energy absorbed in a voxel ÷ (its volume in the dyed parts)';

type Prefixed<Kind extends string, Of extends string> = `${Kind}-${Of}`;

const MAPS: Readonly<Record<Prefixed<'map', RecordedMap['what']>, TermText>> = {
  'map-exit': {
    name: 'map of the exit',
    also: ['light out of'],
    means: 'emitted light out by the exit, W/cm² by place',
    formula: IRRADIANCE,
    assumes: 'cells half off the face are left out of minimum and maximum',
    source: 'definition of irradiance',
  },
  'map-pumped-face': {
    name: 'map of a pumped face',
    also: ['pump light onto', 'pumped face'],
    means: 'pump light onto a face that a pump looks toward, W/cm² by place',
    formula: IRRADIANCE,
    assumes: 'what arrives, before the face reflects or absorbs',
    source: 'definition of irradiance',
  },
  'map-detector': {
    name: 'map of a detector',
    also: ['light at detector'],
    means: 'light through a detector, W/cm² by place',
    formula: IRRADIANCE,
    assumes: 'a detector watches and takes nothing',
    source: 'definition of irradiance',
  },
  'map-absorbed-pump': {
    name: 'map of absorbed pump light',
    also: ['pump light absorbed in'],
    means: 'pump light absorbed per volume in the dyed parts, W/cm³',
    formula: DENSITY,
    assumes: 'even within a voxel; heat comes after the quantum yield',
    source: 'definition of absorbed power density',
  },
  'map-absorbed-all': {
    name: 'map of all absorbed light',
    also: ['all light absorbed in'],
    means: 'pump and emitted light absorbed per volume in the dyed parts, W/cm³',
    formula: DENSITY,
    assumes: 'light absorbed again counts again',
    source: 'definition of absorbed power density',
  },
};

const PER_NM = 'photons in a cell ÷ launched photons ÷ its width in nm';

const SPECTRA: Readonly<Record<Prefixed<'spectrum', RecordedSpectrum['what']>, TermText>> = {
  'spectrum-launched': {
    name: 'launched spectrum',
    also: ['launched by the pumps'],
    means: 'wavelengths at which the pumps launched their photons',
    formula: PER_NM,
    assumes: 'a Gaussian line of the stated width (FWHM), in 0.5 nm steps',
    source: 'the design',
  },
  'spectrum-absorbed-pump': {
    name: 'spectrum of absorbed pump light',
    also: ['pump light absorbed by dye'],
    means: 'wavelengths of the pump photons that dyes absorbed',
    formula: PER_NM,
    assumes: 'as launched, weighed by what the dye and the finishes let it be',
    source: 'definition',
  },
  'spectrum-emitted-in-dye': {
    name: 'spectrum emitted in the dye',
    also: ['emitted in the dye, all re-emissions'],
    means: 'wavelengths of all emissions, before anything takes them back',
    formula: PER_NM,
    assumes: 'every emission after the dye’s spectrum, whatever excited it',
    source: 'Kasha’s rule (1950; from memory)',
  },
  'spectrum-exit': {
    name: 'exit spectrum',
    also: ['out by the exit'],
    means: 'wavelengths of the emitted light out by the exit',
    formula: PER_NM,
    assumes: 'redder than emitted: the dye takes its blue side back',
    source: 'definition',
  },
  'spectrum-leak': {
    name: 'leak spectrum',
    also: ['pump light out by the exit'],
    means: 'wavelengths of the pump light out by the exit',
    formula: PER_NM,
    assumes: 'none where no such photon was seen',
    source: 'definition',
  },
  'spectrum-detector': {
    name: 'detector spectrum',
    means: 'wavelengths of the light through a detector',
    formula: PER_NM,
    assumes: 'a detector watches and takes nothing',
    source: 'definition',
  },
};

const HISTOGRAMS: Readonly<Record<Prefixed<'histogram', Histogram['id']>, TermText>> = {
  'histogram-absorptions-per-history': {
    name: 'histogram of absorptions',
    means: 'share of the histories with 0, 1, 2 … absorptions by dyes',
    formula: 'histories in a cell ÷ all histories',
    assumes: 'the last cell holds everything above',
    source: 'definition',
  },
  'histogram-reabsorptions-of-exit-photons': {
    name: 'histogram of reabsorptions',
    means: 'how often the photons out by the exit had been taken back',
    formula: 'exit photons in a cell ÷ all exit photons',
    assumes: 'the last cell holds everything above',
    source: 'definition',
  },
  'histogram-path-of-exit-photons': {
    name: 'histogram of paths',
    means: 'how far the photons out by the exit had gone',
    formula: 'exit photons in a cell ÷ all exit photons',
    assumes: 'path inside parts, mm; the last cell holds everything above',
    source: 'definition',
  },
};

const QUANTITIES = {
  spectrum: {
    name: 'spectrum',
    also: ['spectra'],
    means: 'how many photons at which wavelength, per nm',
    formula: PER_NM,
    assumes: 'photons, not watts; wavelengths in 0.5 nm steps',
    source: 'definition',
  },
  chromaticity: {
    name: 'chromaticity',
    also: ['CIE 1931', 'colour', 'chromaticity diagram'],
    means: 'the colour of a light apart from its brightness, as x and y',
    formula: 'x = X/(X+Y+Z), y = Y/(X+Y+Z); X, Y, Z: Σ E × colour matching',
    assumes: '2° observer, in 5 nm rows, linear between; screens show it roughly',
    source: 'CIE 15:2004',
  },
  'radiant-intensity': {
    name: 'radiant intensity',
    also: ['directions', 'W/sr', 'angular distribution'],
    means: 'watts per solid angle in a direction, W/sr',
    formula: 'Σ energy in a cell of directions ÷ its solid angle',
    assumes: 'from afar; angle from the normal; drawn averaged over azimuth',
    source: 'CIE S 017 International Lighting Vocabulary (from memory)',
  },
  lambert: {
    name: 'Lambert’s cosine law',
    also: ['lambertian', 'Lambertian light', 'dashed curve'],
    means: 'light as a matt surface sends it: as bright from every side',
    formula: 'I(θ) = I(0) cos θ',
    assumes: 'drawn for the same power as the light it is compared with',
    source: 'Lambert, Photometria, 1760 (from memory)',
  },
  irradiance: {
    name: 'irradiance',
    also: ['W/cm²'],
    means: 'watts that arrive per area, W/cm²',
    formula: IRRADIANCE,
    assumes: 'mean over a cell of the map',
    source: 'CIE S 017 International Lighting Vocabulary (from memory)',
  },
  'absorbed-power-density': {
    name: 'absorbed power density',
    also: ['W/cm³', 'power density'],
    means: 'watts absorbed per volume, W/cm³',
    formula: DENSITY,
    assumes: 'mean over a voxel; light given back is still in it',
    source: 'definition',
  },
  'iso-13694': {
    name: 'ISO 13694',
    means: 'standard for how evenly a laser beam spreads its power',
    formula: 'see flatness and beam uniformity',
    assumes: 'threshold 10 % of the maximum, so that dark corners count',
    source: 'ISO 13694 (from memory)',
  },
  voxel: {
    name: 'voxel',
    also: ['voxels', 'cell of a map', 'pixels'],
    means: 'one cell of a map through the liquid; a pixel is one of a face',
    formula: 'box round all dyed parts ÷ cells along x, y, z',
    assumes: 'light is even within it',
    source: 'word of the trade',
  },
} satisfies Record<string, TermText>;

const EVEN = new Set(['irradiance', 'absorbed-power-density', 'iso-13694', 'voxel']);

export const PICTURE_TERMS = [
  ...termsOf((id) => (id.startsWith('map-absorbed') ? 'survive' : 'even'), MAPS),
  ...termsOf(() => 'out', SPECTRA),
  ...termsOf(() => 'where', HISTOGRAMS),
  ...termsOf((id) => (EVEN.has(id) ? 'even' : 'out'), QUANTITIES),
];

const KNOWN = new Set<string>(PICTURE_TERMS.map(({ id }) => id));

/** Term of a map of run.json. */
export const termOfMap = (what: string): string => (KNOWN.has(`map-${what}`) ? `map-${what}` : 'irradiance');
