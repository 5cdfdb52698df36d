import type { LocatedFault } from '../../design/fault.js';
import type { FaceReport } from '../../scene/check-scene.js';
import { EXIT, type ExitCode } from '../exit-codes.js';
import { faceTable } from '../face-table.js';
import { countFaults, faultLines } from '../fault-lines.js';
import { type MediumReport, mediaLines, reportMedia } from '../media-report.js';
import { print } from '../output-stream.js';
import { safeText } from '../safe-text.js';
import { fitToStyle, styleFor, type TerminalStyle } from '../terminal-style.js';

export interface CheckOptions {
  readonly faces?: boolean;
  readonly json?: boolean;
  readonly dial: Readonly<Record<string, string>>;
}

interface DesignCheck {
  readonly file: string;
  readonly ok: boolean;
  /** Errors and warnings. */
  readonly faults: readonly LocatedFault[];
  readonly media: readonly MediumReport[];
  readonly faces: readonly FaceReport[];
}

/** `stokeswell check DESIGN…`: every fault of every design, its media and, when asked for, its faces; a short trial tells what the pumps miss. */
export async function checkCommand(files: readonly string[], options: CheckOptions): Promise<ExitCode> {
  const checks: DesignCheck[] = [];
  const style = styleFor(process.stdout.isTTY === true, process.env);
  for (const file of files) {
    const check = await checkDesign(file, options.dial);
    checks.push(check);
    if (!options.json) print(fitToStyle(`${showCheck(check, options.faces === true, style).join('\n')}\n`, style));
  }
  if (options.json) print(`${JSON.stringify(checks, null, 2)}\n`);
  return checks.every((check) => check.ok) ? EXIT.ok : EXIT.fault;
}

async function checkDesign(file: string, dials: Readonly<Record<string, string>>): Promise<DesignCheck> {
  const { locateFaults, readDesign } = await import('../../design/read-design.js');
  const reading = await readDesign(file, { dials });
  if (!reading.ok) return { file, ok: false, faults: reading.faults, media: [], faces: [] };
  const { checkDesign: checkDescription } = await import('../../trace/check-design.js');
  const scene = await checkDescription(reading.description);
  const faults = [...reading.warnings, ...locateFaults(reading, scene.faults)];
  const ok = faults.every((fault) => fault.severity !== 'error');
  return { file, ok, faults, media: reportMedia(reading.description), faces: scene.faces };
}

function showCheck(check: DesignCheck, withFaces: boolean, style: TerminalStyle): string[] {
  const verdict = check.faults.length === 0 ? 'no faults' : countFaults(check.faults);
  return [
    style.bold(`${safeText(check.file)}: ${verdict}`),
    ...check.faults.flatMap((fault) => faultLines(fault)),
    ...(check.ok ? mediaLines(check.media, style) : []),
    ...(withFaces && check.faces.length > 0 ? faceTable(check.faces, style) : []),
  ];
}
