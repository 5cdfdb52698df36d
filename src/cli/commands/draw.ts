import { join } from 'node:path';
import { designFault } from '../design-fault.js';
import { designMark } from '../design-mark.js';
import { EXIT, type ExitCode } from '../exit-codes.js';
import { faultLines } from '../fault-lines.js';
import { checkOutputFolder, RESULTS } from '../output-folder.js';
import { print, tell } from '../output-stream.js';
import { safeText } from '../safe-text.js';

export interface DrawOptions {
  readonly out?: string;
  readonly dial: Readonly<Record<string, string>>;
}

/** `stokeswell draw DESIGN`: the design before any tracing, as a page and as a dimensioned sheet. */
export async function drawCommand(file: string, options: DrawOptions): Promise<ExitCode> {
  const { locateFaults, readDesign } = await import('../../design/read-design.js');
  const reading = await readDesign(file, { dials: options.dial });
  if (!reading.ok) throw designFault(reading.faults);
  await checkOutputFolder(options.out);
  const { checkDesign } = await import('../../trace/check-design.js');
  const { faults, faces } = await checkDesign(reading.description);
  if (faults.some(({ severity }) => severity === 'error')) throw designFault(locateFaults(reading, faults));

  const { drawDescription } = await import('../../drawing/draw-description.js');
  const { DRAWING_HTML, DRAWING_SVG, drawPage, drawSvg } = await import('../../report/draw-page.js');
  const { drawingFolderPath } = await import('../../run-folder/run-folder-path.js');
  const { writeFolder } = await import('../../run-folder/write-folder.js');
  const { designSheet } = await import('../design-sheet.js');
  const drawing = drawDescription(reading.description);
  const warnings = [...reading.warnings, ...locateFaults(reading, faults)];
  const sheet = designSheet(reading, warnings, faces);
  const folder = options.out ?? (await drawingFolderPath(RESULTS, sheet.design.title, designMark(sheet.design)));
  const names = await writeFolder(folder, [
    [DRAWING_HTML, drawPage(drawing, sheet)],
    [DRAWING_SVG, drawSvg(drawing, sheet)],
  ]);
  tell(
    warnings
      .flatMap(faultLines)
      .map((line) => `${line}\n`)
      .join(''),
  );
  print(names.map((name) => `${safeText(join(folder, name))}\n`).join(''));
  return EXIT.ok;
}
