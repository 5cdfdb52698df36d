/**
 * Reads one spectrum in JCAMP-DX (IUPAC: McDonald & Wilks, Appl. Spectrosc. 42 151 (1988); the packed digits from memory):
 * labelled records, XYDATA as (X++(Y..Y)) in plain, packed, squeezed, difference and duplicate form, and XYPOINTS.
 */

import { ordinates } from './jcamp-ordinates.js';
import type { CsvFault } from './number-csv.js';

export interface JcampSpectrum {
  /** In the file's order and units. */
  readonly x: readonly number[];
  readonly y: readonly number[];
  /** Line of the file each point stands in. */
  readonly lines: readonly number[];
  /** As written, in capitals. */
  readonly xUnits: string;
  readonly yUnits: string;
}

export type JcampReading =
  | { readonly ok: true; readonly spectrum: JcampSpectrum }
  | { readonly ok: false; readonly fault: CsvFault };

interface Labelled {
  readonly text: string;
  readonly line: number;
  /** Lines after the label's own. */
  readonly body: { readonly text: string; readonly line: number }[];
}

class JcampFault extends Error {
  constructor(readonly fault: CsvFault) {
    super(fault.problem);
  }
}

/** Refuses with the line and the reason what is cut off, contradicts itself or is of another kind. */
export function readJcampDx(text: string): JcampReading {
  try {
    return { ok: true, spectrum: readSpectrum(text) };
  } catch (error) {
    if (error instanceof JcampFault) return { ok: false, fault: error.fault };
    throw error;
  }
}

const refuse = (problem: string, line: number, more: Partial<CsvFault> = {}): never => {
  throw new JcampFault({ code: 'file', problem, line, column: 1, ...more });
};

function readSpectrum(text: string): JcampSpectrum {
  const { records, ended, lastLine } = readRecords(text);
  const pointsRecord = records.get('XYPOINTS');
  const data = records.get('XYDATA') ?? pointsRecord;
  if (data === undefined) {
    const other = ['PEAKTABLE', 'NTUPLES', 'RADATA'].find((label) => records.has(label));
    const expected = '##XYDATA=(X++(Y..Y)) or ##XYPOINTS=(XY..XY)';
    return refuse('the file holds no spectrum in a form read here', records.get(other ?? '')?.line ?? 1, {
      found: other ?? 'none',
      expected,
    });
  }
  if (!ended) {
    refuse('the file is cut off: it has no ##END=', lastLine, { expected: '##END= after the data' });
  }
  const [xUnits, yUnits] = [unitsOf(records, 'XUNITS'), unitsOf(records, 'YUNITS')];
  const [xFactor, yFactor] = [numberOf(records, 'XFACTOR') ?? 1, numberOf(records, 'YFACTOR') ?? 1];
  const spectrum =
    pointsRecord === data ? readPairs(data, xFactor, yFactor) : readSteps(data, records, xFactor, yFactor);
  const wanted = numberOf(records, 'NPOINTS');
  if (wanted !== null && wanted !== spectrum.y.length) {
    const expected = `${wanted} points, as ##NPOINTS says`;
    refuse('the number of points is not the one the file states', data.line, {
      found: `${spectrum.y.length} points`,
      expected,
    });
  }
  return { ...spectrum, xUnits, yUnits };
}

/** Labels are compared in capitals without blanks, hyphens, slashes and underscores; what follows $$ is comment. */
function readRecords(text: string): { records: Map<string, Labelled>; ended: boolean; lastLine: number } {
  const records = new Map<string, Labelled>();
  let current: Labelled | null = null;
  let ended = false;
  let lastLine = 1;
  for (const [i, raw] of text
    .replace(/^\uFEFF/, '')
    .split(/\r\n|\n|\r/)
    .entries()) {
    const content = raw.replace(/\$\$.*$/, '').trimEnd();
    if (content.trim() === '') continue;
    const line = i + 1;
    lastLine = line;
    if (ended)
      refuse('there is more after ##END=: files of several blocks are not read', line, { found: content.slice(0, 40) });
    const label = /^\s*##([^=]*)=(.*)$/.exec(content);
    if (label === null) {
      if (current === null)
        return refuse('a file in JCAMP-DX starts with ##TITLE=', line, { found: content.slice(0, 40) });
      current.body.push({ text: content, line });
      continue;
    }
    const name = label[1].toUpperCase().replace(/[\s\-/_]/g, '');
    if (name === 'END') {
      ended = true;
      continue;
    }
    if (name !== '' && records.has(name))
      refuse(`##${label[1].trim()}= stands here a second time: files of several blocks are not read`, line);
    current = { text: label[2].trim(), line, body: [] };
    if (name !== '') records.set(name, current);
  }
  return { records, ended, lastLine };
}

function unitsOf(records: ReadonlyMap<string, Labelled>, name: string): string {
  const record = records.get(name);
  if (record !== undefined && record.text !== '') return record.text.toUpperCase();
  return refuse(`the file does not state ##${name}=`, record?.line ?? 1, { code: 'quantity', expected: `##${name}=` });
}

function numberOf(records: ReadonlyMap<string, Labelled>, name: string): number | null {
  const record = records.get(name);
  if (record === undefined) return null;
  const value = record.text === '' ? Number.NaN : Number(record.text);
  return Number.isFinite(value)
    ? value
    : refuse(`##${name}= is not a number`, record.line, { code: 'quantity', found: record.text });
}

type Points = Pick<JcampSpectrum, 'x' | 'y' | 'lines'>;

function readPairs(data: Labelled, xFactor: number, yFactor: number): Points {
  const points = { x: [] as number[], y: [] as number[], lines: [] as number[] };
  for (const { text, line } of data.body) {
    const numbers = text.split(/[\s,;]+/).filter((part) => part !== '');
    if (numbers.length % 2 !== 0)
      refuse('a point lacks its second number', line, { found: text.trim().slice(-40), expected: 'pairs x, y' });
    numbers.forEach((part, i) => {
      const value = Number(part);
      if (!Number.isFinite(value)) refuse('this is not a number', line, { code: 'quantity', found: part });
      if (i % 2 === 0) points.x.push(value * xFactor);
      else {
        points.y.push(value * yFactor);
        points.lines.push(line);
      }
    });
  }
  if (points.y.length < 2) refuse('the spectrum has fewer than two points', data.line);
  return points;
}

/** What X at the start of a line may be off by, in steps: programs round it. */
const X_SLACK = 1;

function readSteps(data: Labelled, records: ReadonlyMap<string, Labelled>, xFactor: number, yFactor: number): Points {
  if (!/^\(X\+\+\(Y\.\.Y\)\)$/.test(data.text.replace(/\s/g, '').toUpperCase())) {
    refuse('this form of the data is not read', data.line, { found: data.text, expected: '(X++(Y..Y))' });
  }
  const need = (name: string): number =>
    numberOf(records, name) ?? refuse(`the file does not state ##${name}=`, data.line, { expected: `##${name}=` });
  const [first, last, count] = [need('FIRSTX'), need('LASTX'), need('NPOINTS')];
  if (!(count >= 2) || first === last) refuse('first, last and number of the points make no spectrum', data.line);
  const step = (last - first) / (count - 1);
  const [y, lines]: [number[], number[]] = [[], []];
  let afterDifference = false;
  for (const { text, line } of data.body) {
    const read = ordinates(text, afterDifference ? (y[y.length - 1] ?? null) : null);
    if (!read.ok)
      return refuse(read.problem, line, {
        code: 'quantity',
        ...(read.found === undefined ? {} : { found: read.found }),
      });
    const at = first + (afterDifference ? y.length - 1 : y.length) * step;
    if (Math.abs(read.x * xFactor - at) > X_SLACK * Math.abs(step) + 1e-6 * Math.abs(at)) {
      refuse('points are missing or too many before this line', line, {
        found: `x = ${read.x * xFactor}`,
        expected: `x = ${Number(at.toPrecision(8))}`,
      });
    }
    for (const value of read.values) {
      y.push(value);
      lines.push(line);
    }
    afterDifference = read.endsInDifference;
  }
  const firstY = numberOf(records, 'FIRSTY');
  if (
    firstY !== null &&
    y.length > 0 &&
    Math.abs(y[0] * yFactor - firstY) > Math.abs(yFactor) + 1e-3 * Math.abs(firstY)
  ) {
    refuse('the first value is not the one ##FIRSTY= states', data.line, {
      found: String(y[0] * yFactor),
      expected: String(firstY),
    });
  }
  return { x: y.map((_, i) => first + i * step), y: y.map((value) => value * yFactor), lines };
}
