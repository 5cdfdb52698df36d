/** A few histories of each pump alone, in the calling thread: what meets nothing is told before the real trace. */
import type { Description, PumpDescription } from '../design/description.js';
import type { Fault } from '../design/fault.js';
import { runBatches } from '../engine/run-batches.js';
import { type CompiledScene, compileScene } from '../scene/compile-scene.js';
import { SLOT } from '../scene/scene-layout.js';
import { sharedDoubles } from '../scene/shared-arrays.js';

/** Histories of a trial, shared out among the pumps, and the fewest of one pump. */
const TRIAL = 2048;
const FEWEST = 256;
/** Before a pump is refused, as many again: light that meets one part in a thousand is seen but for one chance in ten million. */
const CONFIRM = 16_384;
/** Share of a pump's light that may miss without a word. */
const MISSED = 0.05;

/** @returns an error for a pump that misses everything, warnings for one that often misses and for an exit that saw no light. */
export async function tryPumps(description: Description): Promise<Fault[]> {
  const compiled = compileScene(description);
  const histories = Math.max(FEWEST, Math.ceil(TRIAL / description.pumps.length));
  const faults: Fault[] = [];
  let traced = 0;
  let output = 0;
  for (const [i, pump] of description.pumps.entries()) {
    let trial = await tryPump(compiled, i, histories);
    if (trial.seen === 0) trial = await tryPump(compiled, i, CONFIRM);
    faults.push(...missFaults(pump, trial));
    traced += trial.histories;
    output += trial.output;
  }
  const met = faults.every(({ severity }) => severity !== 'error');
  return met && output === 0 ? [...faults, darkExit(description, traced)] : faults;
}

interface Trial {
  readonly histories: number;
  /** Histories that met no part. */
  readonly missed: number;
  /** Histories that left by the exit. */
  readonly output: number;
  /** Histories that met a part or a detector. */
  readonly seen: number;
}

async function tryPump({ scene, legend }: CompiledScene, pump: number, histories: number): Promise<Trial> {
  const alone = legend.beams.map((_, i) => (i < pump ? 0 : 1));
  const { fold, grown } = await runBatches(
    { ...scene, pumpCumulative: sharedDoubles(alone) },
    { histories, precision: null, seconds: null, seed: 'trial', threads: 0 },
  );
  const { sum } = fold.moments(legend.quantumEv).batch;
  const missed = sum[2 * SLOT.missed];
  // Light that meets no part may still be what a detector in the open is there to see.
  const detected = legend.recorders.some(
    (_, r) =>
      scene.recorderSpectrum[r] >= 0 &&
      grown.spectra
        .subarray(scene.recorderSpectrum[r], scene.recorderSpectrum[r] + 2 * scene.wavelengths)
        .some((count) => count > 0),
  );
  return {
    histories,
    missed,
    output: sum[2 * SLOT.exitPump] + sum[2 * SLOT.exitEmitted],
    seen: histories - missed + (detected ? 1 : 0),
  };
}

function missFaults({ path, name }: PumpDescription, { histories, missed, seen }: Trial): Fault[] {
  const suggestion = 'mind its place and direction, its divergence, and what stands in the way';
  if (seen === 0) {
    return [
      {
        code: 'unreachable',
        severity: 'error',
        path,
        problem: 'this pump misses everything',
        found: `none of ${histories} trial photons of ${name} met a part or a detector`,
        suggestion,
      },
    ];
  }
  if (missed <= MISSED * histories) return [];
  return [
    {
      code: 'caution',
      severity: 'warning',
      path,
      problem: 'much of this pump meets no part',
      found: `${((100 * missed) / histories).toPrecision(2)} % of ${histories} trial photons of ${name} missed`,
      suggestion,
    },
  ];
}

function darkExit({ exit }: Description, histories: number): Fault {
  return {
    code: 'unreachable',
    severity: 'warning',
    path: exit.path,
    problem: 'no light came to the exit in a short trial',
    found: `none of ${histories} photons left by ${exit.name}`,
    suggestion: 'name the face that light crosses last, or trace more histories if so little is expected',
  };
}
