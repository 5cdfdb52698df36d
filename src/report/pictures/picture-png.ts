/** SVG pictures as PNG, without a browser. */
import { createRequire } from 'node:module';
import { renderAsync } from '@resvg/resvg-js';
import type { DrawnPicture } from './standalone-picture.js';

/** Pixels per unit of the drawing: at 96 units an inch, as CSS has it, 192 dpi. */
const SCALE = 2;
/** Wide pictures are brought to the width of a page all the same: 17 cm of print at 220 dpi. */
const WIDEST = 1480;

const { resolve } = createRequire(import.meta.url);
/** Given by path: the drawer leaves out every text for which it has no font, and says nothing. */
const FONT_FILES = ['DejaVuSansCondensed.ttf', 'DejaVuSansCondensed-Bold.ttf'].map((file) =>
  resolve(`dejavu-fonts-ttf/ttf/${file}`),
);
const FONT = 'DejaVu Sans Condensed';

/** @param svg text of a picture made by `standalonePicture`, of this many units across. Drawn on a thread of its own; several at a time share the cores. */
export async function picturePng({ svg, width }: DrawnPicture): Promise<Uint8Array> {
  const image = await renderAsync(svg, {
    fitTo: { mode: 'zoom', value: Math.min(SCALE, WIDEST / width) },
    font: {
      fontFiles: FONT_FILES,
      loadSystemFonts: false,
      defaultFontFamily: FONT,
      sansSerifFamily: FONT,
    },
  });
  return image.asPng();
}
