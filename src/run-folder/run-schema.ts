/** What a run.json must look like, for reading one back and as a JSON Schema for programs that read it. */
import { z } from 'zod';
import type { FaultCode } from '../design/fault.js';
import { type FigureName, RUN_FORMAT, type RunRecord } from '../record/run-record.js';
import type { Fate, LuminousOpening } from '../tallies/run-tallies.js';
import type { CurveKind, StopReason } from '../trace/trace-result.js';
import { everyName } from './every-name.js';

const count = z.int().nonnegative();
const text = z.string();
const line = z.string().nullable();
/** Plain file name beside run.json, never a path; blank in a record that was printed and not kept. */
const fileName = z.string().regex(/^$|^[^./\\:][^/\\:]*$/);
const light = z.enum(['pump', 'emitted']);
const error = z.number().nonnegative().nullable();

const figure = z.object({
  value: z.number().nullable().describe('null: undefined for this run'),
  standardError: error.describe('null: exact, or too few batches to tell'),
  unit: text,
  note: text.exactOptional(),
});

const FIGURE_NAMES = everyName<FigureName>()([
  'exitPhotonFraction',
  'opticalEfficiency',
  'exitPower',
  'luminousFlux',
  'luminousEfficacyOptical',
  'luminousEfficacyWallPlug',
  'chromaticityX',
  'chromaticityY',
  'dominantWavelength',
  'meanExitWavelength',
  'blueLeak',
  'blueLeakFraction',
  'exitUniformityVariation',
  'exitUniformityMinOverMean',
  'exitFlatness',
  'exitBeamUniformity',
  'peakAbsorbedPowerDensity',
  'timeToBoiling',
  'excitedMolecules',
  'excitedMass',
  'peakExcitedFraction',
  'depletedAbsorption',
  'saturationIrradiance',
  'peakGain',
  'gainOverLongestPath',
  'absorptionsPerMolecule',
  'timeToBleach',
  'timeToBleachWithReservoir',
  'absorptionsPerHistory',
  'reabsorptionsPerHistory',
  'meanPumpPath',
  'meanEmittedPath',
  'pumpAbsorbedFraction',
  'pumpPower',
  'exitEtendue',
  'exitEffectiveEtendue',
  'exitMeanLuminance',
  'exitNormalLuminance',
  'pumpEtendue',
  'brightnessRatio',
  'brightnessBound',
  'brightnessBoundShare',
]);

/** How a history ended, where and by what. */
export const fateSlotSchema = z.object({
  fate: z.enum(
    everyName<Fate>()([
      'missed',
      'reflected-at-entry',
      'left-by-exit',
      'left-elsewhere',
      'absorbed-by-finish',
      'absorbed-by-solid',
      'absorbed-by-solvent',
      'lost-in-dye',
      'quenched',
      'stokes-heat',
      'trapped',
    ]),
  ),
  light,
  where: line,
  by: line,
});

const ledgerRow = fateSlotSchema.extend({ fraction: z.number(), standardError: error });

/** Looser than the ledger's own bound, for records that other programs wrote again with fewer digits. */
const CLOSURE = 1e-9;
const ledger = z
  .array(ledgerRow)
  .refine((rows) => Math.abs(rows.reduce((sum, { fraction }) => sum + fraction, 0) - 1) <= CLOSURE, {
    error: 'fractions must sum to 1',
  });

const map = z
  .object({
    id: text,
    what: text,
    where: text,
    unit: z.enum(['W/cm²', 'W/cm³']),
    shape: z.array(z.int().positive()).min(1).max(3),
    extentMm: z.array(z.tuple([z.number(), z.number()])),
    axes: z.array(text),
    extentDeg: z
      .array(z.tuple([z.number(), z.number()]))
      .exactOptional()
      .describe('of a sphere: azimuth and polar angle, of which extentMm are the arcs'),
    files: z.array(fileName),
    power: z.number(),
    mean: z.number(),
    minimum: z.number(),
    maximum: z.number(),
    variation: z.number().nullable().describe('coefficient of variation, shot noise taken out'),
    variationError: z.number().nullable().describe('standard error of the coefficient of variation'),
    minOverMean: z.number().nullable(),
  })
  .refine(({ shape, extentMm, axes }) => shape.length === extentMm.length && shape.length === axes.length, {
    error: 'shape, extentMm and axes must be equally long',
  });

const opening = z.object({
  shape: z.enum(everyName<LuminousOpening['shape']>()(['rectangle', 'disc', 'dome', 'sphere'])),
  sizeMm: z
    .tuple([z.number(), z.number(), z.number()])
    .describe('along azimuth 0, along azimuth 90°, along the normal; a diameter twice where round'),
});
const angles = z.object({
  id: text,
  where: text,
  file: fileName,
  polarToDeg: z.union([z.literal(90), z.literal(180)]),
  lumens: z.number(),
  opening: opening.nullable().describe('null: directions from a round side, no far field'),
  photometricFile: fileName.describe('ANSI/IES LM-63; blank where there is none'),
});

const radiance = z.object({
  id: text,
  where: text,
  unit: z.literal('W/(m² sr)'),
  shape: z.array(z.int().positive()).length(4),
  extentMm: z.array(z.tuple([z.number(), z.number()])).length(2),
  extentDeg: z
    .array(z.tuple([z.number(), z.number()]))
    .length(2)
    .exactOptional(),
  axes: z.array(text),
  files: z.array(fileName),
  mean: z.number(),
  maximum: z.number(),
});

const share = z.number().positive().max(1).nullable();
const pump = z.object({
  name: text,
  power: z.number().describe('optical, W'),
  wavelengthNm: z.number(),
  linewidthNm: z.number().describe('full width at half maximum, 0 is a line'),
  diodeEfficiency: share.describe('optical per electrical power; null: not given'),
  driverEfficiency: share.describe('power to the diodes per power from the wall; null: not given'),
});

const curve = z.object({
  id: text,
  what: z.enum(
    everyName<CurveKind>()([
      'dye-absorption',
      'dye-extinction',
      'dye-emission',
      'medium-absorption',
      'finish-transmittance',
      'finish-reflectance',
    ]),
  ),
  name: text,
  where: line,
  unit: z.enum(everyName<RunRecord['curves'][number]['unit']>()(['1/mm', 'L/(mol cm)', '1/nm', '1'])),
  file: fileName,
});

const fault = z.object({
  code: z.enum(
    everyName<FaultCode>()([
      'file',
      'yaml',
      'missing',
      'unknown-key',
      'unknown-name',
      'type',
      'quantity',
      'range',
      'geometry',
      'finish',
      'unreachable',
      'energy',
      'caution',
    ]),
  ),
  severity: z.enum(['error', 'warning']),
  path: z.array(z.union([text, z.number()])),
  problem: text,
  found: text.exactOptional(),
  expected: text.exactOptional(),
  suggestion: text.exactOptional(),
});

const groundShare = z.object({ medium: text, dye: text, share: z.number().positive().max(1) });
const saturation = z.object({
  settled: z.boolean(),
  shares: z.array(groundShare).describe('share of the molecules that absorbed in the run'),
  steps: z.array(
    z.object({
      shares: z.array(groundShare),
      exitPhotonFraction: z.number().nonnegative(),
      standardError: error,
      off: z.number().nonnegative().describe('largest distance between a share and what this turn asks for'),
    }),
  ),
});

/** Keys it does not know are passed over: a record may gain some without a new format number. */
export const runRecordSchema = z.object({
  format: z.literal(RUN_FORMAT),
  tool: z.object({ name: z.literal('stokeswell'), version: text }),
  design: z.object({
    title: text,
    file: text,
    text,
    hash: z
      .string()
      .regex(/^[0-9a-f]{64}$/)
      .describe('SHA-256 of the text'),
    dials: z.record(text, text),
  }),
  run: z.object({
    seed: text,
    histories: count,
    batches: count,
    threads: count,
    seconds: z.number().nonnegative(),
    stopReason: z.enum(everyName<StopReason>()(['histories', 'precision', 'time', 'interrupted'])),
    polarisation: z.enum(['carried', 'averaged']),
    startedAt: z.iso.datetime(),
    repeat: text,
  }),
  pumps: z.array(pump),
  figures: z.record(z.enum(FIGURE_NAMES), figure),
  saturation: saturation.nullable().describe('null: dyes absorbed as if never saturated'),
  ledger: z.object({ photons: ledger, watts: ledger }),
  maps: z.array(map),
  spectra: z.array(
    z.object({ id: text, what: text, where: line, light, file: fileName, photonFraction: z.number().nonnegative() }),
  ),
  curves: z.array(curve),
  angles: z.array(angles),
  radiance: z.array(radiance),
  histograms: z.array(
    z.object({
      id: text,
      unit: text,
      from: z.number(),
      width: z.number().positive(),
      shares: z.array(z.number().nonnegative()),
    }),
  ),
  pictures: z.array(z.object({ id: text, title: text, files: z.array(fileName) })),
  checks: z.array(fault),
  cautions: z.array(text),
}) satisfies z.ZodType<RunRecord>;

/** JSON Schema, draft-07, of run.json. */
export function runJsonSchema(): object {
  const schema = z.toJSONSchema(runRecordSchema, { io: 'input', target: 'draft-7' });
  return {
    ...schema,
    title: 'Stokeswell run',
    description: 'The record of a traced design: figures with standard errors, ledgers of photons and watts, maps.',
  };
}
