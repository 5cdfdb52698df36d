import { axisScale, bottomAxis, leftAxis } from '../charts/axis.js';
import { paletteColour } from '../charts/palette.js';
import { round } from '../charts/picture.js';
import { planePng } from '../charts/raster.js';
import { type Markup, markup, trusted } from '../markup.js';
import { type CoatingPanel, meanTransmittance, STANDALONE_STYLE } from './coating-panel.js';

const LEFT = 58;
const TOP = 66;
const PANEL = 300;
const HEIGHT = 230;
const ACROSS = 356;
const STOPS = 16;

/** Transmittance over wavelength and angle as colour, a map for each way of light. A whole SVG file. */
export function coatingMapPicture(name: string, panels: readonly CoatingPanel[]): string {
  const width = LEFT + panels.length * ACROSS - 22;
  const height = TOP + HEIGHT + 104;
  return markup`${trusted('<?xml version="1.0" encoding="UTF-8"?>\n')}<svg xmlns="http://www.w3.org/2000/svg" width="${width}" height="${height}" viewBox="0 0 ${width} ${height}" role="img"><title>${name}</title><desc>Transmittance of unpolarised light over wavelength and angle of incidence.</desc><style>${trusted(STANDALONE_STYLE)}</style><rect width="${width}" height="${height}" fill="#ffffff"/><text class="picture-title" x="${LEFT}" y="24">${name}: transmittance, mean of s and p</text>${panels.map((panel, i) => map(panel, LEFT + i * ACROSS))}${scaleBar(TOP + HEIGHT + 54)}</svg>`.text.concat(
    '\n',
  );
}

function map(panel: CoatingPanel, x: number): Markup {
  const { wavelengthsNm, anglesDeg, criticalDeg } = panel;
  const [cellsU, cellsV] = [wavelengthsNm.length, anglesDeg.length];
  const values = Float64Array.from({ length: cellsU * cellsV }, (_, i) =>
    meanTransmittance(panel, (i % cellsU) * cellsV + Math.floor(i / cellsU)),
  );
  const domain = [wavelengthsNm[0], wavelengthsNm[cellsU - 1]] as const;
  const across = { domain, range: [x, x + PANEL] as const, label: 'wavelength, nm', ticks: 6 };
  const up = {
    domain: [0, anglesDeg[cellsV - 1]] as const,
    range: [TOP + HEIGHT, TOP] as const,
    label: `angle in ${panel.from}, °`,
    ticks: 6,
  };
  const y = criticalDeg === null ? null : round(axisScale(up)(criticalDeg));
  const mark =
    y === null
      ? null
      : markup`<line class="critical" x1="${x}" x2="${x + PANEL}" y1="${y}" y2="${y}"/><text x="${x + 6}" y="${y - 6}" style="fill:#fff">nothing passes beyond ${Math.round(criticalDeg ?? 0)}°</text>`;
  return markup`<text class="panel-title" x="${x}" y="${TOP - 10}">${panel.from} → ${panel.to}</text><image href="${planePng({ cellsU, cellsV, values }, 1)}" x="${x}" y="${TOP}" width="${PANEL}" height="${HEIGHT}" preserveAspectRatio="none"/>${mark}<rect class="frame" x="${x}" y="${TOP}" width="${PANEL}" height="${HEIGHT}"/>${bottomAxis(across, TOP + HEIGHT)}${leftAxis(up, x, x - 38)}`;
}

function scaleBar(y: number): Markup {
  const stops = Array.from({ length: STOPS }, (_, i) => i / (STOPS - 1));
  const axis = { domain: [0, 100] as const, range: [LEFT, LEFT + PANEL] as const, label: 'transmitted, %', ticks: 5 };
  return markup`<defs><linearGradient id="share">${stops.map(
    (share) => markup`<stop offset="${round(share)}" stop-color="${paletteColour(share)}"/>`,
  )}</linearGradient></defs><rect x="${LEFT}" y="${y}" width="${PANEL}" height="10" fill="url(#share)"/>${bottomAxis(axis, y + 10)}`;
}
