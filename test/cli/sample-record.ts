import type { Figure, FigureName, LedgerRow, RunRecord } from '../../src/record/run-record.js';

/** A run record made by hand (invented numbers), for tests of what is printed. */
export function sampleRecord(): RunRecord {
  return {
    format: 3,
    tool: { name: 'stokeswell', version: '0.0.0' },
    design: {
      title: 'Loom strobe, two-bank box cell',
      file: 'geometries/loom.yaml',
      text: '',
      hash: '0'.repeat(64),
      dials: { strength: '0.20 mmol/L', depth: '8 mm' },
    },
    run: {
      seed: '1',
      histories: 200_000,
      batches: 100,
      threads: 2,
      seconds: 4.2134,
      stopReason: 'histories',
      polarisation: 'averaged',
      startedAt: '2026-12-01T12:00:00.000Z',
      repeat: 'stokeswell trace geometries/loom.yaml --histories 200000 --seed 1',
    },
    pumps: [pump('front-bank'), { ...pump('back-bank'), driverEfficiency: null }],
    figures: figures(),
    saturation: null,
    ledger: { photons: rows(0.5), watts: rows(0.4) },
    maps: [
      map('exit', 'lid.top', 0.0421, 0.81, 'W/cm²'),
      map('pumped-face', 'cell.front', 0.62, 0.034, 'W/cm²'),
      map('absorbed-pump', 'dyed parts', null, null, 'W/cm³'),
    ],
    spectra: [],
    curves: [],
    angles: [],
    radiance: [],
    histograms: [],
    pictures: [],
    checks: [],
    cautions: ['Class 4 laser light: eyewear and interlocks after IEC 60825-1 and local rules.'],
  };
}

const pump = (name: string): RunRecord['pumps'][number] => ({
  name,
  power: 30,
  wavelengthNm: 445,
  linewidthNm: 2,
  diodeEfficiency: 0.32,
  driverEfficiency: 0.9,
});

const OUTPUT_ERROR = 0.0011;

/** Rows that add up to 1, for an output of `output`; some below 0.1 %, one of zero. */
export function rows(output: number): LedgerRow[] {
  const others: LedgerRow[] = [
    row('missed', 'pump', null, null, 0, 0),
    row('reflected-at-entry', 'pump', 'cell.front', null, 0.0212, 0.0003),
    row('left-elsewhere', 'pump', 'cell.back', null, 0.0102, 0.0002),
    row('left-by-exit', 'pump', 'lid.top', null, 0.0006, 0.00005),
    row('absorbed-by-finish', 'pump', 'cell.bottom', 'aluminium', 0.0004, 0.00004),
    row('absorbed-by-finish', 'emitted', 'cell.bottom', 'aluminium', 0.0912, 0.0006),
    row('left-elsewhere', 'emitted', 'cell.front', null, 0.1304, 0.0007),
    row('absorbed-by-solid', 'emitted', 'lid', null, 0.0003, 0.00003),
    row('lost-in-dye', 'pump', 'cell', 'fluorescein', 0.05, 0.0005),
    row('stokes-heat', 'pump', 'cell', 'fluorescein', 0.17, 0.0004),
  ];
  const rest = 1 - output - others.reduce((sum, other) => sum + other.fraction, 0);
  return [
    row('left-by-exit', 'emitted', 'lid.top', null, output, OUTPUT_ERROR),
    ...others,
    row('lost-in-dye', 'emitted', 'cell', 'fluorescein', rest, null),
  ];
}

function row(
  fate: LedgerRow['fate'],
  light: LedgerRow['light'],
  where: string | null,
  by: string | null,
  fraction: number,
  standardError: number | null,
): LedgerRow {
  return { fate, light, where, by, fraction, standardError };
}

function map(
  what: string,
  where: string,
  variation: number | null,
  minOverMean: number | null,
  unit: 'W/cm²' | 'W/cm³',
) {
  return {
    id: `${what}-${where}`,
    what,
    where,
    unit,
    shape: [10, 10],
    extentMm: [
      [0, 20],
      [0, 8],
    ] as const,
    axes: ['x', 'y'],
    files: [],
    power: 24,
    mean: 15.02,
    minimum: 1,
    maximum: 31.23,
    variation,
    variationError: variation === null ? null : 0.002,
    minOverMean,
  };
}

function figures(): Record<FigureName, Figure> {
  const figure = (value: number | null, standardError: number | null, unit: string): Figure => ({
    value,
    standardError,
    unit,
  });
  return {
    exitPhotonFraction: figure(0.5, 0.0012, ''),
    opticalEfficiency: figure(0.4, OUTPUT_ERROR, ''),
    exitPower: figure(24, 0.066, 'W'),
    luminousFlux: figure(11_912, 33, 'lm'),
    luminousEfficacyOptical: figure(198.5, 0.55, 'lm/W'),
    luminousEfficacyWallPlug: figure(63.5, 0.18, 'lm/W'),
    chromaticityX: figure(0.3312, 0.0004, ''),
    chromaticityY: figure(0.6123, 0.0003, ''),
    dominantWavelength: figure(556.1, 0.2, 'nm'),
    meanExitWavelength: figure(549.21, 0.11, 'nm'),
    blueLeak: figure(0.036, 0.003, 'W'),
    blueLeakFraction: figure(0.0006, 0.00005, ''),
    exitUniformityVariation: figure(0.0421, null, ''),
    exitUniformityMinOverMean: figure(0.81, null, ''),
    exitFlatness: figure(0.87, null, ''),
    exitBeamUniformity: figure(0.051, null, ''),
    peakAbsorbedPowerDensity: figure(1231, 42, 'W/cm³'),
    timeToBoiling: { ...figure(0.152, 0.005, 's'), note: 'bath at rest from 20 °C to 78.3 °C, no heat carried away' },
    excitedMolecules: { ...figure(5.2e11, 4e9, 'molecules'), note: 'steady light; lifetime of fluorescein 4.13 ns' },
    excitedMass: figure(0.287, 0.002, 'ng'),
    peakExcitedFraction: { ...figure(2.1e-5, 7e-7, 'of molecules'), note: '0.0071 % out of the ground state' },
    depletedAbsorption: { ...figure(3.3e-5, null, 'of absorption'), note: 'first order, not traced' },
    saturationIrradiance: figure(3.56e6, null, 'W/cm²'),
    peakGain: { ...figure(0, null, '1/cm'), note: 'no net gain' },
    gainOverLongestPath: { ...figure(0, null, ''), note: 'no net gain' },
    absorptionsPerMolecule: figure(812, 3, '1/s'),
    timeToBleach: { ...figure(13.1, 0.1, 's'), note: 'fluorescein, 0.00001 molecules lost per absorption' },
    timeToBleachWithReservoir: { value: null, standardError: null, unit: 's', note: 'the medium has no reservoir' },
    absorptionsPerHistory: figure(1.6, 0.002, ''),
    reabsorptionsPerHistory: figure(0.64, 0.002, ''),
    meanPumpPath: figure(6.2, 0.01, 'mm'),
    meanEmittedPath: figure(14.1, 0.03, 'mm'),
    pumpAbsorbedFraction: figure(0.967, 0.0004, ''),
    pumpPower: figure(60, 0, 'W'),
    exitEtendue: figure(502.7, null, 'mm² sr'),
    exitEffectiveEtendue: figure(471, 3, 'mm² sr'),
    exitMeanLuminance: figure(23.7e6, 66e3, 'cd/m²'),
    exitNormalLuminance: figure(25e6, 6e5, 'cd/m²'),
    pumpEtendue: figure(0.39, null, 'mm² sr'),
    brightnessRatio: figure(2.1e-4, 1e-5, ''),
    brightnessBound: figure(4.2e4, null, ''),
    brightnessBoundShare: figure(5e-9, 2.5e-10, ''),
  };
}
