import { lightIndex } from '../view/light-index.js';
import { ON_BOTH, shade } from '../view/light-shade.js';
import { lightTable } from '../view/light-table.js';

/** Steps of this many light indices share a colour, so that a path is a few strokes and not hundreds. */
const JOINED = 4;

/** Colour of a line of light that is seen on light and on dark paper, #rrggbb. */
export function lightStroke(wavelengthNm: number): string {
  const at = 3 * Math.min(252, Math.round(lightIndex(wavelengthNm) / JOINED) * JOINED);
  const table = lightTable();
  return `#${shade([table[at], table[at + 1], table[at + 2]], ON_BOTH)
    .map((byte) => byte.toString(16).padStart(2, '0'))
    .join('')}`;
}
