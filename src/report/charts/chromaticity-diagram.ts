import { observerTable } from '../../materials/observer.js';
import { screenColour } from '../light-colour.js';
import { type Markup, markup } from '../markup.js';
import { bottomAxis, leftAxis } from './axis.js';
import { type Picture, picture, round } from './picture.js';
import { pngUrl } from './raster.js';

const SCALE = 400;
const LEFT = 46;
const TOP = 8;
const SPAN = [0.8, 0.9] as const;
const BOTTOM = TOP + SPAN[1] * SCALE;
const LABELLED = [460, 480, 500, 520, 540, 560, 580, 600, 620];
/** Beyond this the locus stands still. */
const LOCUS_END = 700;

/** The light's place on the CIE 1931 diagram. @param id unique on the page. @param error standard errors of x and y, null when not known */
export function chromaticityDiagram(
  id: string,
  point: readonly [number, number],
  error: readonly [number, number] | null,
  words: string,
): Picture {
  const [x, y] = point;
  const locus = spectralLocus();
  const outline = locus.map((p, i) => `${i === 0 ? 'M' : 'L'}${placeOf(p.x, p.y)}`).join('');
  // Toward white, where the field is.
  const fromRight = x > 1 / 3;
  return picture(
    {
      id,
      title: 'Chromaticity of the exit light',
      description: `The CIE 1931 diagram with the spectral locus. The exit light lies at ${words}.`,
    },
    LEFT + SPAN[0] * SCALE + 8,
    BOTTOM + 36,
    markup`<image href="${colourField(locus)}" x="${LEFT}" y="${TOP}" width="${SPAN[0] * SCALE}" height="${SPAN[1] * SCALE}" preserveAspectRatio="none" class="smooth"/><path class="locus" d="${outline}Z"/>${locus.map(
      (p, i) =>
        LABELLED.includes(p.nm)
          ? markup`<circle class="locus-dot" cx="${across(p.x)}" cy="${up(p.y)}" r="2"/>${locusLabel(locus, i)}`
          : null,
    )}<path class="locus-line" d="M${placeOf(1 / 3, 1 / 3)}L${placeOf(x, y)}"/><circle class="white-point" cx="${across(1 / 3)}" cy="${up(1 / 3)}" r="3"/><text class="on-colour" x="${across(1 / 3) - 6}" y="${up(1 / 3) + 15}" text-anchor="end">equal energy</text>${
      error === null
        ? null
        : markup`<ellipse class="error-ellipse" cx="${across(x)}" cy="${up(y)}" rx="${round(error[0] * SCALE)}" ry="${round(error[1] * SCALE)}"/>`
    }<circle class="point-halo" cx="${across(x)}" cy="${up(y)}" r="6"/><circle class="point" cx="${across(x)}" cy="${up(y)}" r="6"/><text class="point-text" x="${across(x) + (fromRight ? -12 : 12)}" y="${up(y) + 4}" text-anchor="${fromRight ? 'end' : 'start'}">exit light</text>${bottomAxis(
      { domain: [0, SPAN[0]], range: [LEFT, LEFT + SPAN[0] * SCALE], label: 'chromaticity x', ticks: 8 },
      BOTTOM,
    )}${leftAxis({ domain: [0, SPAN[1]], range: [BOTTOM, TOP], label: 'chromaticity y', ticks: 9 }, LEFT, 12)}`,
    'chromaticity',
  );
}

interface LocusPoint {
  readonly nm: number;
  readonly x: number;
  readonly y: number;
}

function spectralLocus(): readonly LocusPoint[] {
  return observerTable()
    .filter(({ nm }) => nm <= LOCUS_END)
    .map(({ nm, xyz: [x, y, z] }) => ({ nm, x: x / (x + y + z), y: y / (x + y + z) }));
}

/** Outside the locus, square to it at that wavelength. */
function locusLabel(locus: readonly LocusPoint[], at: number): Markup {
  const { nm, x, y } = locus[at];
  const before = locus[Math.max(0, at - 1)];
  const after = locus[Math.min(locus.length - 1, at + 1)];
  const length = Math.hypot(after.x - before.x, after.y - before.y);
  const [dx, dy] = [(before.y - after.y) / length, (after.x - before.x) / length];
  const anchor = dx > 0.3 ? 'start' : dx < -0.3 ? 'end' : 'middle';
  return markup`<text class="caption" x="${round(across(x) + 8 * dx)}" y="${round(up(y) - 8 * dy + 4)}" text-anchor="${anchor}">${nm}</text>`;
}

const PIXELS = [96, 108] as const;

/** The colours inside the locus as far as a screen can show them, see-through outside. */
function colourField(locus: readonly LocusPoint[]): string {
  const [width, height] = PIXELS;
  const data = new Uint8Array(width * height * 4);
  for (let row = 0; row < height; row++) {
    for (let column = 0; column < width; column++) {
      const x = ((column + 0.5) / width) * SPAN[0];
      const y = (1 - (row + 0.5) / height) * SPAN[1];
      if (!isInside(locus, x, y)) continue;
      data.set([...screenColour(x, y), 255], 4 * (column + width * row));
    }
  }
  return pngUrl(width, height, data);
}

/** Ray casting over the closed outline. */
function isInside(outline: readonly LocusPoint[], x: number, y: number): boolean {
  let inside = false;
  outline.forEach((a, i) => {
    const b = outline[(i + 1) % outline.length];
    if (a.y > y !== b.y > y && x < a.x + ((y - a.y) / (b.y - a.y)) * (b.x - a.x)) inside = !inside;
  });
  return inside;
}

const across = (x: number): number => round(LEFT + x * SCALE);
const up = (y: number): number => round(BOTTOM - y * SCALE);
const placeOf = (x: number, y: number): string => `${across(x)} ${up(y)}`;
