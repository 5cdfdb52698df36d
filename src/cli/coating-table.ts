import type { CoatingCurves } from '../scene/coating-curves.js';
import { safeText } from './safe-text.js';
import type { TerminalStyle } from './terminal-style.js';

const ANGLES = [0, 15, 30, 45, 60, 75];
const BANDS = 6;

/** Means over bands of wavelength at some angles: what is reflected / transmitted / absorbed, %. */
export function coatingTable(curves: CoatingCurves, style: TerminalStyle): string[] {
  const { from, to, wavelengthsNm, anglesDeg, criticalDeg } = curves;
  const bands = bandsOf(wavelengthsNm);
  const beyond = criticalDeg === null ? '' : `; nothing passes beyond ${criticalDeg.toFixed(1)}°`;
  const rows = ANGLES.map((degrees) => {
    const a = anglesDeg.indexOf(degrees);
    return [`${degrees}°`, ...bands.map(({ first, end }) => bandText(curves, first, end, a))];
  });
  const head = ['angle', ...bands.map(({ words }) => words)];
  const widths = head.map((cell, i) => Math.max(...[head, ...rows].map((row) => [...(row[i] ?? cell)].length)));
  const line = (cells: readonly string[]) => cells.map((cell, i) => cell.padStart(widths[i])).join('  ');
  return [
    style.bold(`${safeText(from)} → ${safeText(to)}: % reflected / transmitted / absorbed${beyond}`),
    style.dim(`  ${line(head)}`),
    ...rows.map((row) => `  ${line(row)}`),
  ];
}

function bandText(curves: CoatingCurves, first: number, end: number, angle: number): string {
  let reflected = 0;
  let transmitted = 0;
  for (let w = first; w < end; w++) {
    const at = w * curves.anglesDeg.length + angle;
    reflected += 50 * (curves.reflectanceS[at] + curves.reflectanceP[at]);
    transmitted += 50 * (curves.transmittanceS[at] + curves.transmittanceP[at]);
  }
  const r = reflected / (end - first);
  const t = transmitted / (end - first);
  return [r, t, Math.max(0, 100 - r - t)].map((share) => share.toFixed(1)).join(' / ');
}

function bandsOf(nm: readonly number[]): { first: number; end: number; words: string }[] {
  return Array.from({ length: BANDS }, (_, i) => {
    const first = Math.round((i * (nm.length - 1)) / BANDS);
    const last = Math.round(((i + 1) * (nm.length - 1)) / BANDS);
    return { first, end: Math.max(first + 1, last), words: `${nm[first]}–${nm[last]} nm` };
  });
}
