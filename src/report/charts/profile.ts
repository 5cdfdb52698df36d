import { type Markup, markup } from '../markup.js';
import { round } from './picture.js';

export interface ProfileBox {
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
}

/** Values along a line of cells as a staircase from 0 to `maximum`; the page's script draws it anew under the pointer. */
export function profile(
  name: 'u' | 'v',
  { x, y, width, height }: ProfileBox,
  values: readonly number[],
  maximum: number,
  caption: string,
): Markup {
  return markup`<g class="profile"><rect class="profile-field" x="${round(x)}" y="${round(y)}" width="${round(width)}" height="${round(height)}"/><path class="profile-line profile-${name}" data-box="${[x, y, width, height].map(round).join(' ')}" d="${profilePath({ x, y, width, height }, values, maximum)}"/><text class="caption profile-caption-${name}" x="${round(x)}" y="${round(y - 5)}">${caption}</text></g>`;
}

/** A gap where there is nothing. */
export function profilePath({ x, y, width, height }: ProfileBox, values: readonly number[], maximum: number): string {
  const step = width / values.length;
  let path = '';
  let drawing = false;
  values.forEach((value, i) => {
    if (!Number.isFinite(value)) {
      drawing = false;
      return;
    }
    const level = round(y + height * (1 - Math.min(1, maximum > 0 ? value / maximum : 0)));
    path += `${drawing ? 'V' : `M${round(x + i * step)} `}${level}H${round(x + (i + 1) * step)}`;
    drawing = true;
  });
  return path;
}
