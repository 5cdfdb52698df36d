import type { SoundDesign } from '../design/read-design.js';
import { drawDescription } from '../drawing/draw-description.js';
import { summariseRun } from '../outcome/summarise-run.js';
import type { RunArrays } from '../record/run-arrays.js';
import type { RunRecord } from '../record/run-record.js';
import { keptDrawing } from '../run-folder/drawing-json.js';
import { tracePaths } from '../trace/trace-paths.js';
import type { TraceResult } from '../trace/trace-result.js';
import type { SaturatedTrace } from '../trace/trace-saturated.js';
import { repeatCommand } from './repeat-command.js';
import { toolVersion } from './tool-version.js';

/**
 * The record of a run, with what only the command line knows of it.
 * @param turned dials turned on the command line
 */
export function recordRun(
  result: TraceResult,
  reading: SoundDesign,
  turned: Readonly<Record<string, string>>,
  startedAt: Date,
  polarisation?: 'carried' | 'averaged',
  saturation: SaturatedTrace | null = null,
): { record: RunRecord; arrays: RunArrays } {
  const { description, file, text, hash } = reading;
  const { histories } = result.tallies.moments;
  const { record, arrays } = summariseRun(
    { ...result, warnings: [...reading.warnings.map(withoutPlace), ...result.warnings] },
    {
      version: toolVersion(),
      file,
      text,
      hash,
      dials: Object.fromEntries(description.dials.map((dial) => [dial.name, dial.text])),
      startedAt,
      repeat: repeatCommand(file, histories, result.seed, turned, polarisation, saturation !== null),
      saturation,
    },
  );
  const { paths, histories: pathsFrom } = tracePaths(result.description, result.seed);
  return { record, arrays: { ...arrays, drawing: keptDrawing({ ...drawDescription(description), paths, pathsFrom }) } };
}

/** The record keeps the design's text, so a fault's path says enough. */
function withoutPlace({ file: _file, line: _line, column: _column, ...fault }: SoundDesign['warnings'][number]) {
  return fault;
}
