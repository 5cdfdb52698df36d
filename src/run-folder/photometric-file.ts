/** A far field as a photometric file after ANSI/IES LM-63-2002 (from memory), for lighting programs. */
import type { AnglesArray } from '../record/run-arrays.js';
import type { AnglesRecord, RunRecord } from '../record/run-record.js';
import { type IntensityGrid, intensityGrid } from './intensity-grid.js';

/** The standard's longest line. */
const LONGEST_LINE = 256;
const NUMBERS_PER_LINE = 10;
/** Photometric type C: angles from the normal, and round it. */
const TYPE_C = 1;
const METRES = 2;

/**
 * Text of the file: type C, absolute candela, the exit's normal as vertical angle 0 (a lamp that shines down), azimuth 0 along the face's u.
 * Lines end in CR LF.
 */
export function photometricFile(
  record: RunRecord,
  { where, lumens, opening }: AnglesRecord,
  angles: AnglesArray,
): string {
  const grid = intensityGrid(angles, lumens, photonsOf(record, angles));
  const watts = electricalWatts(record);
  const lines = [
    'IESNA:LM-63-2002',
    ...keywords(record, where, lumens, grid, watts),
    'TILT=NONE',
    `1 -1 1 ${grid.verticalDeg.length} ${grid.horizontalDeg.length} ${TYPE_C} ${METRES} ${openingMetres(opening).map(short).join(' ')}`,
    `1 1 ${watts === null ? 0 : short(watts)}`,
    ...wrapped(grid.verticalDeg),
    ...wrapped(grid.horizontalDeg),
    ...grid.candela.flatMap(wrapped),
  ];
  return `${lines.join('\r\n')}\r\n`;
}

function keywords(
  { design, run, tool }: RunRecord,
  where: string,
  lumens: number,
  grid: IntensityGrid,
  watts: number | null,
): string[] {
  const date = run.startedAt.slice(0, 10);
  return [
    ['TEST', `${design.hash.slice(0, 8)} seed ${run.seed}, ${run.histories} histories`],
    ['TESTLAB', `${tool.name} ${tool.version}: simulated, not measured`],
    ['ISSUEDATE', date],
    ['MANUFAC', 'none: a design'],
    ['LUMCAT', 'none'],
    ['LUMINAIRE', design.title],
    ['MORE', `light out of ${where}`],
    ['LAMP', 'built in; absolute photometry'],
    [
      'OTHER',
      `luminous flux ${short(lumens)} lm, which the table holds with straight lines between its values (scaled by ${short(grid.scale)} for that)`,
    ],
    [
      'MORE',
      `intensity weighed by V(lambda) photon by photon; about ${short(grid.photonsPerValue)} photons behind a value`,
    ],
    ['MORE', 'vertical angle 0 along the normal of the exit, horizontal angle 0 along its u axis'],
    ['OTHER', watts === null ? 'input watts not known: 0 is written' : 'input watts: diodes and drivers, nothing else'],
  ].map(([word, text]) => keyword(word, text));
}

/** Plain ASCII, and no brackets that would read as another keyword. */
function keyword(word: string, text: string): string {
  const plain = text
    .normalize('NFKD')
    .replace(/[^\x20-\x7e]/g, '')
    .replace(/[[\]]/g, ' ');
  return `[${word}] ${plain}`.slice(0, LONGEST_LINE);
}

/** Width (along azimuth 90°), length (along azimuth 0) and height, m; round openings are negative diameters. */
function openingMetres(opening: AnglesRecord['opening']): readonly number[] {
  if (opening === null) return [0, 0, 0];
  const [alongU, alongV, height] = opening.sizeMm.map((mm) => mm / 1000);
  switch (opening.shape) {
    case 'rectangle':
      return [alongV, alongU, 0];
    case 'disc':
      return [-alongV, -alongU, 0];
    // The standard has no dome: a standing cylinder of its size.
    case 'dome':
      return [-alongV, -alongU, height];
    case 'sphere':
      return [-alongV, -alongU, -height];
  }
}

/** null where a pump's wall-plug efficiency is not given. */
function electricalWatts({ pumps }: RunRecord): number | null {
  let watts = 0;
  for (const { power, diodeEfficiency, driverEfficiency } of pumps) {
    if (diodeEfficiency === null) return null;
    watts += power / (diodeEfficiency * (driverEfficiency ?? 1));
  }
  return watts;
}

/** About how many photons the record holds: as many as its power is pump photons. */
function photonsOf(
  { run, figures }: RunRecord,
  { wattsPerSr, polarCells, azimuthCells, polarToDeg }: AnglesArray,
): number {
  const step = (polarToDeg * Math.PI) / 180 / polarCells;
  const watts = wattsPerSr.reduce((sum, intensity, i) => {
    const row = Math.floor(i / azimuthCells);
    return sum + intensity * ((2 * Math.PI) / azimuthCells) * (Math.cos(row * step) - Math.cos((row + 1) * step));
  }, 0);
  return (watts / (figures.pumpPower.value ?? 1)) * run.histories;
}

function wrapped(values: readonly number[]): string[] {
  const lines: string[] = [];
  for (let i = 0; i < values.length; i += NUMBERS_PER_LINE) {
    lines.push(
      values
        .slice(i, i + NUMBERS_PER_LINE)
        .map(short)
        .join(' '),
    );
  }
  return lines;
}

/** Six digits, never in powers of ten. */
function short(value: number): string {
  const rounded = Number(value.toPrecision(6));
  return Math.abs(rounded) >= 1e-6 || rounded === 0 ? String(rounded) : rounded.toFixed(12);
}
