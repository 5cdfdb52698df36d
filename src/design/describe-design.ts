/** A design as written -> its description; every name is looked up on the way and every cross-check made. */

import { checkCells, describeDetectors, describeExit } from './describe-detectors.js';
import { describeFinishes } from './describe-finishes.js';
import { describeMedia } from './describe-media.js';
import { describeParts } from './describe-parts.js';
import { describePumps } from './describe-pumps.js';
import type { Description, Dial, TraceDefaults } from './description.js';
import type { DesignRecord } from './design-fields.js';
import { BUILT_IN_FINISHES } from './finish-fields.js';
import type { Reading } from './reading.js';
import { reportUnused } from './report-unused.js';

/** Only of use when `reading` has no errors afterwards. */
export function describeDesign(design: DesignRecord, dials: readonly Dial[], reading: Reading): Description {
  const media = describeMedia(design, reading);
  const finishes = describeFinishes(design, reading);
  const finishNames = [...design.finishes.map(({ name }) => name), ...BUILT_IN_FINISHES];
  const { parts, faces } = describeParts(design, finishNames, reading);
  const pumps = describePumps(design, faces, reading);
  const detectors = describeDetectors(design, faces, reading);
  const exit = describeExit(design, faces, reading);
  const defaults = describeDefaults(design.trace, reading);
  // In a faulty file, what looks unused is mostly misspelt where it is used.
  if (!reading.hasErrors()) reportUnused(design, dials, reading);
  const { design: title, about, surroundings } = design;
  return {
    title,
    about,
    dials,
    media,
    surroundings: surroundings.name,
    finishes,
    parts,
    pumps,
    detectors,
    exit,
    defaults,
  };
}

function describeDefaults(trace: DesignRecord['trace'], reading: Reading): TraceDefaults {
  if (trace === null) return { histories: null, precision: null, seed: null, voxels: null, polarisation: null };
  const { histories, precision, seed, voxels, polarisation } = trace;
  checkCells(voxels, ['trace', 'voxels'], 'voxels', reading);
  return { histories, precision, seed, voxels, polarisation };
}
