/**
 * Photometric files read by a parser written from the description of the format in ANSI/IES LM-63-2002 (from memory), which knows nothing of
 * the writer.
 */
import { describe, expect, test } from 'vitest';
import type { AnglesArray } from '../../src/record/run-arrays.js';
import type { AnglesRecord, RunRecord } from '../../src/record/run-record.js';
import { nameFiles } from '../../src/run-folder/file-names.js';
import { photometricFile } from '../../src/run-folder/photometric-file.js';
import { sampleRecord } from '../cli/sample-record.js';

interface Photometry {
  readonly keywords: ReadonlyMap<string, string>;
  readonly numbers: readonly number[];
  readonly vertical: readonly number[];
  readonly horizontal: readonly number[];
  readonly candela: readonly (readonly number[])[];
}

/** @throws where a lighting program would refuse the file. */
function parse(text: string): Photometry {
  const lines = text.split('\r\n');
  if (lines.pop() !== '') throw new Error('the last line has no end');
  for (const line of lines) {
    if (line.length > 256) throw new Error(`a line of ${line.length} characters`);
    if (!/^[\x20-\x7e]+$/.test(line)) throw new Error(`not plain text: ${line}`);
  }
  if (lines[0] !== 'IESNA:LM-63-2002') throw new Error(`begins with ${lines[0]}`);
  const tilt = lines.indexOf('TILT=NONE');
  if (tilt < 0) throw new Error('no TILT=NONE');
  const keywords = new Map<string, string>();
  for (const line of lines.slice(1, tilt)) {
    const found = /^\[([A-Z_]+)\] (.+)$/.exec(line);
    if (found === null) throw new Error(`no keyword line: ${line}`);
    if (!keywords.has(found[1])) keywords.set(found[1], found[2]);
  }
  for (const needed of ['TEST', 'TESTLAB', 'ISSUEDATE', 'MANUFAC']) {
    if (!keywords.has(needed)) throw new Error(`no [${needed}]`);
  }
  const all = lines
    .slice(tilt + 1)
    .join(' ')
    .split(' ')
    .map(Number);
  if (!all.every(Number.isFinite)) throw new Error('something is no number');
  const [nv, nh] = [all[3], all[4]];
  if (all.length !== 13 + nv + nh + nv * nh) throw new Error(`${all.length} numbers for ${nv} × ${nh} values`);
  const vertical = all.slice(13, 13 + nv);
  const horizontal = all.slice(13 + nv, 13 + nv + nh);
  const rising = (list: readonly number[]) => list.every((value, i) => i === 0 || value > list[i - 1]);
  if (!rising(vertical) || !rising(horizontal)) throw new Error('angles do not rise');
  const from = 13 + nv + nh;
  const candela = horizontal.map((_, h) => all.slice(from + h * nv, from + (h + 1) * nv));
  return { keywords, numbers: all.slice(0, 13), vertical, horizontal, candela };
}

/** Trapezia of I sin θ in both angles, on 200 steps between vertical angles, straight between values. */
function lumensOf({ vertical, horizontal, candela }: Photometry): number {
  const rad = Math.PI / 180;
  let sum = 0;
  for (let h = 1; h < horizontal.length; h++) {
    const width = (horizontal[h] - horizontal[h - 1]) * rad;
    for (let v = 1; v < vertical.length; v++) {
      const step = ((vertical[v] - vertical[v - 1]) * rad) / 200;
      for (let k = 0; k <= 200; k++) {
        const at = vertical[v - 1] * rad + k * step;
        const value = (one: readonly number[]) => one[v - 1] + (k / 200) * (one[v] - one[v - 1]);
        const weight = k === 0 || k === 200 ? 0.5 : 1;
        sum += (weight * width * step * Math.sin(at) * (value(candela[h - 1]) + value(candela[h]))) / 2;
      }
    }
  }
  return sum;
}

const [POLAR, AZIMUTH] = [45, 72];

/** Cells filled with the exact mean of an intensity, cd, by fine sums. */
function angles(intensity: (theta: number, phi: number) => number, polarToDeg: 90 | 180 = 90): AnglesArray {
  const rows = (POLAR * polarToDeg) / 90;
  const step = (polarToDeg * Math.PI) / 180 / rows;
  const candela = Float64Array.from({ length: rows * AZIMUTH }, (_, cell) => {
    const [row, column] = [Math.floor(cell / AZIMUTH), cell % AZIMUTH];
    let sum = 0;
    let weights = 0;
    for (let i = 0; i < 8; i++) {
      const theta = (row + (i + 0.5) / 8) * step;
      for (let j = 0; j < 4; j++) {
        const phi = ((column + (j + 0.5) / 4) * 2 * Math.PI) / AZIMUTH;
        sum += Math.sin(theta) * intensity(theta, phi);
        weights += Math.sin(theta);
      }
    }
    return sum / weights;
  });
  return {
    id: 'exit-lid.top',
    polarCells: rows,
    azimuthCells: AZIMUTH,
    polarToDeg,
    candela,
    wattsPerSr: candela.map((cd) => cd / 500),
  };
}

const record = (lumens: number, more: Partial<AnglesRecord> = {}): AnglesRecord => ({
  id: 'exit-lid.top',
  where: 'lid.top',
  file: '',
  polarToDeg: 90,
  lumens,
  opening: { shape: 'rectangle', sizeMm: [20, 8, 0] },
  photometricFile: 'exit.ies',
  ...more,
});

/** Of very many histories, so that no cells are joined. */
const run = (histories: number): RunRecord => {
  const base = sampleRecord();
  return { ...base, run: { ...base.run, histories } };
};

describe('a Lambertian exit of 1000 lm', () => {
  const text = photometricFile(
    run(1e9),
    record(1000),
    angles((theta) => (1000 / Math.PI) * Math.cos(theta)),
  );
  const file = parse(text);

  test('integrates to its lumens within 0.1 %', () => {
    expect(lumensOf(file) / 1000).toBeCloseTo(1, 3);
  });
  test('has I = Φ/π cos θ at every angle, within 0.5 % of the peak (Lambert)', () => {
    for (const column of file.candela) {
      file.vertical.forEach((angle, v) => {
        const expected = (1000 / Math.PI) * Math.cos((angle * Math.PI) / 180);
        expect(Math.abs(column[v] - expected)).toBeLessThan((0.005 * 1000) / Math.PI);
      });
    }
  });
  test('is absolute, type C, in metres, from 0 to 90° and once round', () => {
    const [lamps, lumensPerLamp, multiplier, , , type, units, width, length, height] = file.numbers;
    expect([lamps, lumensPerLamp, multiplier, type, units]).toEqual([1, -1, 1, 1, 2]);
    expect([width, length, height]).toEqual([0.008, 0.02, 0]);
    expect([file.vertical[0], file.vertical.at(-1)]).toEqual([0, 90]);
    expect([file.horizontal[0], file.horizontal.at(-1)]).toEqual([0, 360]);
    expect(file.candela[0]).toEqual(file.candela.at(-1));
    expect(new Set(file.candela.map(([pole]) => pole)).size).toBe(1);
  });
  test('input watts are those of diodes and drivers, 0 where one is not given', () => {
    const watts = file.numbers[12];
    const pumps = run(1).pumps;
    const known = pumps.every(({ diodeEfficiency }) => diodeEfficiency !== null);
    const expected = pumps.reduce(
      (sum, p) => sum + p.power / ((p.diodeEfficiency ?? 1) * (p.driverEfficiency ?? 1)),
      0,
    );
    expect(watts).toBeCloseTo(known ? expected : 0, 2);
    const dumb = { ...run(1), pumps: pumps.map((p) => ({ ...p, diodeEfficiency: null })) };
    const other = parse(
      photometricFile(
        dumb,
        record(1000),
        angles(() => 1),
      ),
    );
    expect(other.numbers[12]).toBe(0);
  });
});

test('fewer histories, fewer values: cells are joined, and the flux stays', () => {
  const cosine = angles((theta, phi) => 100 * Math.cos(theta) * (1 + 0.5 * Math.cos(phi)));
  const few = parse(photometricFile(run(20_000), record(100 * Math.PI), cosine));
  const many = parse(photometricFile(run(1e9), record(100 * Math.PI), cosine));
  expect(few.vertical.length).toBeLessThan(many.vertical.length);
  for (const file of [few, many]) expect(lumensOf(file) / (100 * Math.PI)).toBeCloseTo(1, 3);
});

test('a narrow beam keeps its flux though straight lines cannot follow it', () => {
  const edge = (2 * Math.PI) / 180;
  const lumens = 1e5 * 2 * Math.PI * (1 - Math.cos(edge));
  const file = parse(
    photometricFile(
      run(1e9),
      record(lumens),
      angles((theta) => (theta < edge ? 1e5 : 0)),
    ),
  );
  expect(lumensOf(file) / lumens).toBeCloseTo(1, 3);
});

test('a sphere sends light both ways: 0 to 180°, one value at either pole', () => {
  const even = photometricFile(
    run(1e9),
    record(4 * Math.PI * 50, { polarToDeg: 180, opening: { shape: 'sphere', sizeMm: [60, 60, 60] } }),
    angles(() => 50, 180),
  );
  const file = parse(even);
  expect(file.vertical.at(-1)).toBe(180);
  expect(file.numbers.slice(7, 10)).toEqual([-0.06, -0.06, -0.06]);
  for (const column of file.candela) for (const value of column) expect(value).toBeCloseTo(50, 1);
  expect(lumensOf(file) / (4 * Math.PI * 50)).toBeCloseTo(1, 3);
});

test('hostile names and long titles stay keyword lines', () => {
  const base = run(1e9);
  const title = `[LAMP] ünder\r\nTILT=NONE ${'x'.repeat(400)}`;
  const hostile = { ...base, design: { ...base.design, title } };
  const file = parse(
    photometricFile(
      hostile,
      record(1000),
      angles(() => 1),
    ),
  );
  expect(file.keywords.get('LUMINAIRE')).toMatch(/^ LAMP {2}under/);
});

test('dark records and those round a side have no file; the exit is exit.ies', () => {
  const base = sampleRecord();
  const named = nameFiles({
    ...base,
    angles: [
      record(5),
      record(0, { id: 'detector-dark' }),
      record(5, { id: 'detector-round', opening: null }),
      record(5, { id: 'detector-a/b' }),
    ],
  });
  expect(named.angles.map(({ photometricFile: name }) => name)).toEqual(['exit.ies', '', '', 'detector-a-b.ies']);
});
