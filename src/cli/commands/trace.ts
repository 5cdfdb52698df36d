import { availableParallelism } from 'node:os';
import type { DesignReading } from '../../design/read-design.js';
import type { LocatedFault } from '../../design/fault.js';
import type { RunRecord } from '../../run-folder/run-record.js';
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
import { type TraceBounds, traceBounds, type WantedBounds } from '../trace-bounds.js';

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

type ReadDesign = Extract<DesignReading, { ok: true }>;

/** `stokeswell trace DESIGN`: one run from its design file to its ledger and its folder. */
export async function traceCommand(file: string, options: TraceCommandOptions): Promise<ExitCode> {
  const { readDesign } = await import('../../design/read-design.js');
  const reading = await readDesign(file, { dials: options.dial });
  if (!reading.ok) return refuse(reading.faults);

  const startedAt = new Date();
  const folder = options.files ? (options.out ?? defaultRunFolder(file, startedAt)) : null;
  if (folder !== null) await checkRunFolder(folder);

  const result = await traceWithProgress(reading, options);
  if (!('tallies' in result)) return refuse(result);
  const { summariseRun } = await import('../../outcome/summarise-run.js');
  const record = summariseRun(result, {});
  if (folder !== null) await keep(folder, record, result);
  if (options.plain) print(`${JSON.stringify(record)}\n`);
  return record.run.stopReason === 'interrupted' ? EXIT.interrupted : EXIT.ok;
}
