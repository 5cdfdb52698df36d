import type { CoatingCurves } from '../scene/coating-curves.js';
import { safeText } from './safe-text.js';
import type { TerminalStyle } from './terminal-style.js';

const ANGLES = [0, 15, 30, 45, 60, 75];
const BANDS = 6;
/** s and p that differ by less are the same. */
const ALIKE = 1e-9;

/**
 * Means over bands of wavelength at some angles, %: what is reflected / transmitted / absorbed of unpolarised light, then, where the finish
 * tells them apart, what is transmitted of s / p light.
 */
export function coatingTable(curves: CoatingCurves, style: TerminalStyle): string[] {
  const { from, to, wavelengthsNm, anglesDeg, criticalDeg } = curves;
  const bands = bandsOf(wavelengthsNm);
  const beyond = criticalDeg === null ? '' : `; nothing passes beyond ${criticalDeg.toFixed(1)}°`;
  const rowsOf = (text: typeof bandText) =>
    ANGLES.map((degrees) => {
      const a = anglesDeg.indexOf(degrees);
      return [`${degrees}°`, ...bands.map(({ first, end }) => text(curves, first, end, a))];
    });
  const rows = rowsOf(bandText);
  const apart = curves.transmittanceS.some((s, at) => Math.abs(s - curves.transmittanceP[at]) > ALIKE);
  const head = ['angle', ...bands.map(({ words }) => words)];
  const widths = head.map((cell, i) => Math.max(...[head, ...rows].map((row) => [...(row[i] ?? cell)].length)));
  const line = (cells: readonly string[]) => cells.map((cell, i) => cell.padStart(widths[i])).join('  ');
  return [
    style.bold(`${safeText(from)} → ${safeText(to)}: % reflected / transmitted / absorbed${beyond}`),
    style.dim(`  ${line(head)}`),
    ...rows.map((row) => `  ${line(row)}`),
    ...(apart
      ? [style.dim('  % transmitted of s / p light'), ...rowsOf(apartText).map((row) => `  ${line(row)}`)]
      : []),
  ];
}

function apartText(
  { anglesDeg, transmittanceS, transmittanceP }: CoatingCurves,
  first: number,
  end: number,
  a: number,
) {
  let [s, p] = [0, 0];
  for (let w = first; w < end; w++) {
    s += transmittanceS[w * anglesDeg.length + a];
    p += transmittanceP[w * anglesDeg.length + a];
  }
  return [s, p].map((sum) => ((100 * sum) / (end - first)).toFixed(1)).join(' / ');
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
