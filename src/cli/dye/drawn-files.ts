import type { DrawnPicture } from '../../report/pictures/standalone-picture.js';
import type { NamedFile } from '../../run-folder/write-folder.js';
import { tell } from '../output-stream.js';
import { safeText } from '../safe-text.js';

/** Pictures as SVG and PNG; where PNG cannot be drawn, SVG alone and a word about it. @param pictures name without ending, and picture */
export async function drawnFiles(pictures: readonly (readonly [string, DrawnPicture])[]): Promise<NamedFile[]> {
  const svg = pictures.map(([name, { svg: text }]) => [`${name}.svg`, text] as const);
  try {
    const { picturePng } = await import('../../report/pictures/picture-png.js');
    const png = pictures.map(async ([name, drawn]) => [`${name}.png`, await picturePng(drawn)] as const);
    return [...svg, ...(await Promise.all(png))];
  } catch (error) {
    const why = safeText(error instanceof Error ? error.message : String(error), 200);
    tell(`No PNG files: they could not be drawn on this machine (${why}). The SVG files are there.\n`);
    return svg;
  }
}
