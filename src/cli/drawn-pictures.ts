import type { RunArrays } from '../record/run-arrays.js';
import type { RunRecord } from '../record/run-record.js';
import type { DrawnPictures } from '../report/pictures/draw-pictures.js';
import type { PictureChoice } from '../report/pictures/picture-choice.js';
import { tell } from './output-stream.js';
import { safeText } from './safe-text.js';

/** The pictures of a run as files; says where PNG files could not be drawn, which costs nobody the run. */
export async function drawnPictures(
  record: RunRecord,
  arrays: RunArrays,
  choice: PictureChoice,
): Promise<DrawnPictures> {
  const { drawPictures } = await import('../report/pictures/draw-pictures.js');
  const drawn = await drawPictures(record, arrays, choice);
  if (drawn.noPng !== null) {
    tell(
      `No PNG files: they could not be drawn on this machine (${safeText(drawn.noPng, 200)}). The SVG files are there.\n`,
    );
  }
  return drawn;
}
