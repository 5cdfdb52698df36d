import { type Markup, markup } from '../markup.js';
import { bottomAxis } from './axis.js';
import { paletteColour } from './palette.js';
import { round } from './picture.js';

const STOPS = 16;
const THICKNESS = 10;

/** Scale of a map from 0 to `maximum`, with a mark at the mean. @param id unique on the page */
export function colourBar(
  id: string,
  { x, y, width }: { readonly x: number; readonly y: number; readonly width: number },
  { maximum, mean, label }: { readonly maximum: number; readonly mean: number; readonly label: string },
): Markup {
  const top = maximum > 0 ? maximum : 1;
  const meanAt = x + (Math.min(mean, top) / top) * width;
  const late = meanAt > x + 0.85 * width;
  const stops = Array.from({ length: STOPS }, (_, i) => i / (STOPS - 1));
  return markup`<defs><linearGradient id="${id}">${stops.map(
    (share) => markup`<stop offset="${round(share)}" stop-color="${paletteColour(share)}"/>`,
  )}</linearGradient></defs><rect x="${round(x)}" y="${round(y)}" width="${round(width)}" height="${THICKNESS}" fill="url(#${id})"/><path class="mean-mark" d="M${round(meanAt)} ${round(y)}l-4 -7h8z"/><text class="mean-text" x="${round(meanAt + (late ? -7 : 7))}" y="${round(y - 2)}" text-anchor="${late ? 'end' : 'start'}">mean</text>${bottomAxis(
    { domain: [0, top], range: [x, x + width], label, ticks: 5 },
    y + THICKNESS,
  )}`;
}
