import { line } from 'd3-shape';
import { axisScale, bottomAxis, leftAxis } from '../charts/axis.js';
import { round } from '../charts/picture.js';
import { type Markup, markup, trusted } from '../markup.js';
import { angleAt, type CoatingPanel, meanReflectance, meanTransmittance, STANDALONE_STYLE } from './coating-panel.js';

/** Angles drawn, degrees, each with a colour told apart in grey and by colour-blind readers too, and a dash pattern. */
const ANGLES = [
  { degrees: 0, colour: '#1f3a93', dash: 'none' },
  { degrees: 30, colour: '#0b7a5c', dash: '8 3' },
  { degrees: 45, colour: '#c9781b', dash: '4 3' },
  { degrees: 60, colour: '#a61c4c', dash: '1.5 2.5' },
] as const;

const LEFT = 58;
const TOP = 74;
const PANEL = 300;
const HEIGHT = 190;
const ACROSS = 356;
const DOWN = 262;

interface Row {
  readonly share: (panel: CoatingPanel, at: number) => number;
  readonly label: string;
}
const ROWS = {
  mean: {
    title: 'mean of s and p',
    describes: 'Reflectance and transmittance of unpolarised light',
    rows: [
      { share: meanReflectance, label: 'reflected, %' },
      { share: meanTransmittance, label: 'transmitted, %' },
    ],
  },
  apart: {
    title: 's and p apart',
    describes: 'Transmittance of s light and of p light',
    rows: [
      { share: ({ transmittanceS }, at) => transmittanceS[at], label: 's transmitted, %' },
      { share: ({ transmittanceP }, at) => transmittanceP[at], label: 'p transmitted, %' },
    ],
  },
} as const satisfies Record<string, { title: string; describes: string; rows: readonly [Row, Row] }>;

/**
 * Two rows of curves against wavelength at several angles; a column for each way of light. A whole SVG file.
 * @param what reflectance above transmittance of unpolarised light, or transmittance of s above that of p light
 */
export function coatingCurvesPicture(name: string, panels: readonly CoatingPanel[], what: keyof typeof ROWS): string {
  const { title, describes, rows } = ROWS[what];
  const width = LEFT + panels.length * ACROSS - 22;
  const height = TOP + 2 * DOWN - 12;
  const contents = panels.map((panel, column) => {
    const x = LEFT + column * ACROSS;
    return markup`<text class="panel-title" x="${x}" y="${TOP - 12}">${panel.from} → ${panel.to}</text>${rows.map(({ share, label }, row) => plot(panel, share, x, TOP + row * DOWN, label))}`;
  });
  return markup`${trusted('<?xml version="1.0" encoding="UTF-8"?>\n')}<svg xmlns="http://www.w3.org/2000/svg" width="${width}" height="${height}" viewBox="0 0 ${width} ${height}" role="img"><title>${name}</title><desc>${describes} against wavelength, at ${ANGLES.map(({ degrees }) => `${degrees}°`).join(', ')}.</desc><style>${trusted(STANDALONE_STYLE)}</style><rect width="${width}" height="${height}" fill="#ffffff"/><text class="picture-title" x="${LEFT}" y="24">${name}, ${title}</text>${legend(LEFT, 43)}${contents}</svg>`.text.concat(
    '\n',
  );
}

function plot(
  panel: CoatingPanel,
  share: (panel: CoatingPanel, at: number) => number,
  x: number,
  y: number,
  label: string,
): Markup {
  const { wavelengthsNm, anglesDeg } = panel;
  const domain = [wavelengthsNm[0], wavelengthsNm[wavelengthsNm.length - 1]] as const;
  const across = { domain, range: [x, x + PANEL] as const, label: 'wavelength, nm', ticks: 6 };
  const up = { domain: [0, 100] as const, range: [y + HEIGHT, y] as const, label, ticks: 5 };
  const [atX, atY] = [axisScale(across), axisScale(up)];
  const curves = ANGLES.map(({ degrees, colour, dash }) => {
    const a = angleAt(panel, degrees);
    const path = line<number>()
      .x((w) => round(atX(wavelengthsNm[w])))
      .y((w) => round(atY(100 * share(panel, w * anglesDeg.length + a))))(wavelengthsNm.map((_, w) => w));
    return markup`<path class="curve" d="${path ?? ''}" stroke="${colour}" stroke-dasharray="${dash}"/>`;
  });
  const grid = [20, 40, 60, 80].map(
    (percent) =>
      markup`<line class="grid" x1="${x}" x2="${x + PANEL}" y1="${round(atY(percent))}" y2="${round(atY(percent))}"/>`,
  );
  return markup`${grid}<rect class="frame" x="${x}" y="${y}" width="${PANEL}" height="${HEIGHT}"/>${curves}${bottomAxis(across, y + HEIGHT)}${leftAxis(up, x, x - 38)}`;
}

function legend(x: number, y: number): Markup {
  return markup`<text class="note" x="${x}" y="${y}">angle in the first medium</text>${ANGLES.map(
    ({ degrees, colour, dash }, i) =>
      markup`<line x1="${x + 158 + 78 * i}" x2="${x + 186 + 78 * i}" y1="${y - 4}" y2="${y - 4}" class="curve" stroke="${colour}" stroke-dasharray="${dash}"/><text x="${x + 192 + 78 * i}" y="${y}">${degrees}°</text>`,
  )}`;
}
