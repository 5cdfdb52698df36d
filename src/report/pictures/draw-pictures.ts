import type { RunArrays } from '../../record/run-arrays.js';
import type { PictureRecord, RunRecord } from '../../record/run-record.js';
import { runPictures } from './run-pictures.js';

/** none; svg: drawings alone; all: drawings and PNG of them. */
export const PICTURE_CHOICES = ['none', 'svg', 'all'] as const;
export type PictureChoice = (typeof PICTURE_CHOICES)[number];

export interface DrawnPictures {
  /** For run.json. */
  readonly records: readonly PictureRecord[];
  readonly files: readonly (readonly [name: string, content: string | Uint8Array])[];
  /** Why there is no PNG although it was asked for; null when there is. */
  readonly noPng: string | null;
}

/** Every plot of a run as files. PNG files are drawn on several threads; a machine without their drawer still gets the SVG files. */
export async function drawPictures(
  record: RunRecord,
  arrays: RunArrays,
  choice: PictureChoice,
): Promise<DrawnPictures> {
  if (choice === 'none') return { records: [], files: [], noPng: null };
  const pictures = runPictures(record, arrays).map((picture) => ({ ...picture, drawn: picture.draw() }));
  const png = choice === 'all' ? await loadPng() : null;
  const toPng = png === null || typeof png === 'string' ? null : png;
  const files = await Promise.all(
    pictures.map(
      async ({ name, drawn }): Promise<(readonly [string, string | Uint8Array])[]> => [
        [`${name}.svg`, drawn.svg],
        ...(toPng === null ? [] : [[`${name}.png`, await toPng(drawn)] as const]),
      ],
    ),
  );
  return {
    records: pictures.map(({ id, title }, i) => ({ id, title, files: files[i].map(([name]) => name) })),
    files: files.flat(),
    noPng: typeof png === 'string' ? png : null,
  };
}

/** What was drawn for a record: pictures are made again in the same formats. */
export function choiceOf({ pictures }: RunRecord): PictureChoice {
  if (pictures.length === 0) return 'none';
  return pictures.some(({ files }) => files.some((file) => file.endsWith('.png'))) ? 'all' : 'svg';
}

/** The drawer of PNG files is machine code, built for most systems; its reason where it does not load. */
async function loadPng() {
  try {
    return (await import('./picture-png.js')).picturePng;
  } catch (error) {
    return error instanceof Error ? error.message : String(error);
  }
}
