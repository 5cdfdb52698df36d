import { availableParallelism } from 'node:os';
import type { Fault } from '../../design/fault.js';
import type { DesignReading } from '../../design/read-design.js';
import type { TraceResult } from '../../trace/trace-result.js';
import { CommandFault } from '../command-fault.js';
import { EXIT, type ExitCode } from '../exit-codes.js';
import { countFaults, faultLines } from '../fault-lines.js';
import { listenForInterrupt } from '../interrupt.js';
import { showLedger } from '../ledger/show-ledger.js';
import { checkRunFolder, defaultRunFolder, unwritable } from '../output-folder.js';
import { print, tell } from '../output-stream.js';
import { ProgressLine } from '../progress-line.js';
import { repeatCommand } from '../repeat-command.js';
import { styleFor } from '../terminal-style.js';
import { toolVersion } from '../tool-version.js';
import { traceBounds, type WantedBounds } from '../trace-bounds.js';

export interface TraceCommandOptions extends WantedBounds {
  readonly seed?: string;
  readonly threads?: number;
  readonly out?: string;
  readonly files: boolean;
  readonly plain: boolean;
  readonly ledger: 'watts' | 'photons';
  /** undefined: on a terminal only. */
  readonly progress?: boolean;
  readonly dial: Readonly<Record<string, string>>;
}

type GoodReading = Extract<DesignReading, { ok: true }>;

const SEED_BY_DEFAULT = '1';

/** `stokeswell trace DESIGN`: one run from its design file to its ledger and its folder. */
export async function traceCommand(file: string, options: TraceCommandOptions): Promise<ExitCode> {
  const { reading, warnings } = await readTraceable(file, options.dial);
  const startedAt = new Date();
  const folder = options.files ? (options.out ?? defaultRunFolder(file, startedAt)) : null;
  if (folder !== null) await checkRunFolder(folder);

  const result = await traceUntilStopped(reading, warnings, options);

  const { summariseRun } = await import('../../outcome/summarise-run.js');
  const histories = result.tallies.moments.histories;
  const { record, arrays } = summariseRun(result, {
    file,
    text: reading.text,
    hash: reading.hash,
    version: toolVersion(),
    startedAt: startedAt.toISOString(),
    repeat: repeatCommand(file, histories, result.seed, options.dial),
  });
  if (folder !== null) {
    const { writeRun } = await import('../../run-folder/write-run.js');
    await writeRun(folder, record, arrays).catch((error: unknown) => {
      throw unwritable(folder, error);
    });
  }
  if (options.plain) {
    print(`${JSON.stringify(record)}\n`);
  } else {
    const style = styleFor(process.stdout.isTTY === true, process.env);
    const { locateFaults } = await import('../../design/read-design.js');
    const told = locateFaults(reading, result.warnings).flatMap(faultLines);
    print(showLedger(record, { count: options.ledger, warnings: told, folder }, style));
  }
  return result.stopReason === 'interrupted' ? EXIT.interrupted : EXIT.ok;
}

/**
 * The design, read and checked, with every warning about it.
 * @throws CommandFault that tells all its faults
 */
async function readTraceable(
  file: string,
  dials: Readonly<Record<string, string>>,
): Promise<{ reading: GoodReading; warnings: readonly Fault[] }> {
  const { locateFaults, readDesign } = await import('../../design/read-design.js');
  const reading = await readDesign(file, { dials });
  if (!reading.ok) throw designFault(reading.faults);
  const { checkScene } = await import('../../scene/check-scene.js');
  const { faults } = checkScene(reading.description);
  if (faults.some((fault) => fault.severity === 'error')) throw designFault(locateFaults(reading, faults));
  return { reading, warnings: [...reading.warnings, ...faults] };
}

async function traceUntilStopped(
  reading: GoodReading,
  options: TraceCommandOptions,
  signal: AbortSignal,
): Promise<TraceResult> {
  const { traceDescription } = await import('../../trace/trace-design.js');
  const { defaults } = reading.description;
  const bounds = traceBounds(options, defaults);
  const onTerminal = process.stderr.isTTY === true;
  const line = new ProgressLine(tell, bounds, onTerminal, process.stderr.columns ?? 80);
  const showProgress = options.progress ?? onTerminal;
  try {
    return await traceDescription(reading.description, {
      ...bounds,
      seed: options.seed ?? defaults.seed ?? SEED_BY_DEFAULT,
      threads: options.threads ?? availableParallelism(),
      signal,
      ...(showProgress ? { onProgress: (progress) => line.show(progress) } : {}),
    });
  } catch (error) {
    if (signal.aborted && isDesignFaults(error) && error.faults.length === 0) {
      throw new CommandFault(EXIT.killed, 'Interrupted before anything was traced; nothing was written.');
    }
    throw isDesignFaults(error) ? designFault(await located(reading, error.faults)) : error;
  } finally {
    line.clear();
  }
}
