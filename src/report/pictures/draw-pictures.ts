import type { RunArrays } from '../../record/run-arrays.js';
import type { PictureRecord, RunRecord } from '../../record/run-record.js';
import type { PictureChoice } from './picture-choice.js';
import { type RunPicture, runPictures } from './run-pictures.js';
import type { DrawnPicture } from './standalone-picture.js';

export type PictureFiles = readonly (readonly [name: string, content: string | Uint8Array])[];

export interface DrawnPictures {
  /** For run.json. */
  readonly records: readonly PictureRecord[];
  readonly files: PictureFiles;
  /** Why there is no PNG although it was asked for; null when there is. */
  readonly noPng: string | null;
}

type Drawn = RunPicture & { readonly drawn: DrawnPicture };

/**
 * Every plot of a run as files. A machine on which PNG files cannot be drawn still gets the SVG files: a run may have taken hours, and its
 * pictures can be made again.
 */
export async function drawPictures(
  record: RunRecord,
  arrays: RunArrays,
  choice: PictureChoice,
): Promise<DrawnPictures> {
  if (choice === 'none') return { records: [], files: [], noPng: null };
  const pictures = runPictures(record, arrays).map((picture): Drawn => ({ ...picture, drawn: picture.draw() }));
  const png = choice === 'all' ? await pngFiles(pictures) : { files: [], problem: null };
  const files = pictures.flatMap(({ name, drawn }, i) => [
    [`${name}.svg`, drawn.svg] as const,
    ...png.files.slice(i, i + 1),
  ]);
  return {
    records: pictures.map(({ id, title, name }) => ({
      id,
      title,
      files: png.files.length > 0 ? [`${name}.svg`, `${name}.png`] : [`${name}.svg`],
    })),
    files,
    noPng: png.problem,
  };
}

/** All of them, or none and why. The drawer is machine code, built for most systems but not for all. */
async function pngFiles(pictures: readonly Drawn[]): Promise<{ files: PictureFiles; problem: string | null }> {
  try {
    const { picturePng } = await import('./picture-png.js');
    const files = pictures.map(async ({ name, drawn }) => [`${name}.png`, await picturePng(drawn)] as const);
    return { files: await Promise.all(files), problem: null };
  } catch (error) {
    return { files: [], problem: error instanceof Error ? error.message : String(error) };
  }
}
