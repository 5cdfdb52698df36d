import { availableParallelism } from 'node:os';
import type { SoundDesign } from '../../design/read-design.js';
import type { RunArrays } from '../../record/run-arrays.js';
import type { RunRecord } from '../../record/run-record.js';
import type { PictureFiles } from '../../report/pictures/draw-pictures.js';
import type { PictureChoice } from '../../report/pictures/picture-choice.js';
import { RunFolderError } from '../../run-folder/run-folder-error.js';
import type { TraceProgress, TraceResult } from '../../trace/trace-result.js';
import type { SaturatedTrace } from '../../trace/trace-saturated.js';
import { colourDepth } from '../colour-depth.js';
import { CommandFault } from '../command-fault.js';
import { designFault } from '../design-fault.js';
import { designMark } from '../design-mark.js';
import { drawnPictures } from '../drawn-pictures.js';
import { EXIT, type ExitCode } from '../exit-codes.js';
import { faultLines } from '../fault-lines.js';
import { listenForInterrupt } from '../interrupt.js';
import { faceMap } from '../ledger/face-map.js';
import { stepWords } from '../ledger/saturation.js';
import { showLedger } from '../ledger/show-ledger.js';
import { checkOutputFolder, RESULTS } from '../output-folder.js';
import { print, tell } from '../output-stream.js';
import { ProgressLine } from '../progress-line.js';
import { styleFor } from '../terminal-style.js';
import { traceBounds, type WantedBounds } from '../trace-bounds.js';

export interface TraceCommandOptions extends WantedBounds {
  readonly seed?: string;
  readonly threads?: number;
  readonly out?: string;
  readonly files: boolean;
  readonly pictures: PictureChoice;
  /** undefined: on a terminal only. */
  readonly map?: boolean;
  readonly plain?: boolean;
  readonly ledger: 'watts' | 'photons';
  /** undefined: on a terminal only. */
  readonly progress?: boolean;
  readonly dial: Readonly<Record<string, string>>;
  readonly polarisation?: 'carried' | 'averaged';
  readonly saturation?: boolean;
}

const SEED_BY_DEFAULT = '1';
const INTERRUPT_NOTE = '\nStopping: what is traced will be kept. Ctrl-C again quits at once and keeps nothing.\n';

/** `stokeswell trace DESIGN`: one run from its design file to its ledger and its folder. */
export async function traceCommand(file: string, options: TraceCommandOptions): Promise<ExitCode> {
  const { locateFaults, readDesign } = await import('../../design/read-design.js');
  const read = await readDesign(file, { dials: options.dial });
  if (!read.ok) throw designFault(read.faults);
  const reading = withPolarisation(read, options.polarisation);
  if (options.files) await checkOutputFolder(options.out);
  // Before anything listens for Ctrl-C: the trial holds this thread, and there is nothing to keep yet.
  const { checkDesign } = await import('../../trace/check-design.js');
  const { faults } = await checkDesign(reading.description);
  if (faults.some(({ severity }) => severity === 'error')) throw designFault(locateFaults(reading, faults));

  const startedAt = new Date();
  const interrupt = listenForInterrupt(() => tell(INTERRUPT_NOTE));
  try {
    const traced = await traceReading(reading, options, interrupt.signal);
    const saturation = 'steps' in traced ? traced : null;
    const result = { ...('steps' in traced ? traced.result : traced), warnings: faults };
    const { recordRun } = await import('../record-run.js');
    const { record: bare, arrays } = recordRun(
      result,
      reading,
      options.dial,
      startedAt,
      options.polarisation,
      saturation,
    );
    const drawn = options.files ? await drawnPictures(bare, arrays, options.pictures) : null;
    const record = drawn === null ? bare : { ...bare, pictures: drawn.records };
    const show = async (folder: string | null): Promise<void> => {
      if (options.plain) return showPlain(folder === null ? bare : record, folder);
      const warnings = [...reading.warnings, ...locateFaults(reading, result.warnings)].flatMap(faultLines);
      const onTerminal = process.stdout.isTTY === true;
      const style = styleFor(onTerminal, process.env);
      const depth = colourDepth(onTerminal, process.env);
      const map = (options.map ?? onTerminal) ? faceMap(record, arrays, style, depth) : [];
      print(showLedger(record, { count: options.ledger, warnings, map, folder }, style));
    };
    try {
      await show(options.files ? await keep(record, arrays, options.out, drawn?.files ?? []) : null);
    } catch (error) {
      // The answer is not lost when the disk would not have it.
      if (error instanceof RunFolderError) await show(null);
      throw error;
    }
    return result.stopReason === 'interrupted' ? EXIT.interrupted : EXIT.ok;
  } finally {
    interrupt.release();
  }
}

/** The command line overrides the design. */
function withPolarisation(reading: SoundDesign, polarisation: TraceCommandOptions['polarisation']): SoundDesign {
  if (polarisation === undefined) return reading;
  const { description } = reading;
  return { ...reading, description: { ...description, defaults: { ...description.defaults, polarisation } } };
}

/** Writes the run and gives back its folder. */
async function keep(
  record: RunRecord,
  arrays: RunArrays,
  out: string | undefined,
  pictures: PictureFiles,
): Promise<string> {
  const { runFolderPath } = await import('../../run-folder/run-folder-path.js');
  const { writeRun } = await import('../../run-folder/write-run.js');
  const { REPORT_HTML, runPage } = await import('../../report/run-page.js');
  const folder =
    out ??
    (await runFolderPath(RESULTS, record.design.title, {
      hash: designMark(record.design, record.run.polarisation, record.saturation !== null),
      ...record.run,
    }));
  await writeRun(folder, record, arrays, undefined, [
    [REPORT_HTML, runPage],
    ...pictures.map(([name, content]) => [name, () => content] as const),
  ]);
  return folder;
}

async function showPlain(record: RunRecord, folder: string | null): Promise<void> {
  const { nameFiles } = await import('../../run-folder/file-names.js');
  const { runJson } = await import('../../run-folder/run-json.js');
  print(runJson(folder === null ? record : nameFiles(record)));
}

async function traceReading(
  reading: SoundDesign,
  options: TraceCommandOptions,
  signal: AbortSignal,
): Promise<TraceResult | SaturatedTrace> {
  const { NothingTraced, traceDescription } = await import('../../trace/trace-design.js');
  const { DesignFaults } = await import('../../design/design-faults.js');
  const { locateFaults } = await import('../../design/read-design.js');
  const { defaults } = reading.description;
  const bounds = traceBounds(options, defaults);
  const onTerminal = process.stderr.isTTY === true;
  const line = new ProgressLine(tell, bounds, onTerminal, process.stderr.columns ?? 80);
  try {
    const plan = {
      ...bounds,
      seed: options.seed ?? defaults.seed ?? SEED_BY_DEFAULT,
      threads: options.threads ?? availableParallelism(),
      signal,
      ...((options.progress ?? onTerminal) ? { onProgress: (progress: TraceProgress) => line.show(progress) } : {}),
    };
    if (options.saturation !== true) return await traceDescription(reading.description, plan);
    const { traceSaturated } = await import('../../trace/trace-saturated.js');
    return await traceSaturated(reading.description, plan, (step) => {
      if (options.progress ?? onTerminal) tell(`${stepWords(step)}\n`);
    });
  } catch (error) {
    if (error instanceof DesignFaults) throw designFault(locateFaults(reading, error.faults));
    if (!(error instanceof NothingTraced)) throw error;
    throw signal.aborted
      ? new CommandFault(EXIT.killed, 'Interrupted before anything was traced; nothing was written.')
      : new CommandFault(EXIT.fault, 'The time was used up before anything was traced. Give more with --for.');
  } finally {
    line.clear();
  }
}
