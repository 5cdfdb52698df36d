import { cpSync, mkdtempSync, readdirSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { runCli } from '../run-cli.js';

let cwd = '';
beforeAll(() => {
  cwd = mkdtempSync(join(tmpdir(), 'dye-'));
  cpSync(join(import.meta.dirname, '../../../geometries'), join(cwd, 'geometries'), { recursive: true });
});
afterAll(() => rmSync(cwd, { recursive: true, force: true }));

describe('stokeswell dye', () => {
  // Extinction of basic fluorescein at 445 nm: 7947 L/(mol cm), the library's table; A = ε c L.
  test('a dye of the library: numbers by hand, and its files', async () => {
    const words = [
      'dye',
      'fluorescein',
      'ethanol',
      '--ph',
      '11',
      '--strength',
      '0.2 mmol/L',
      '--path',
      '8 mm',
      '--out',
      'fl',
    ];
    const { code, out, err } = await runCli(words, { cwd });
    expect({ code, err }).toEqual({ code: 0, err: '' });
    expect(out).toContain('1.27 over the path');
    expect(out).toContain('94.6 % absorbed');
    expect(out).toContain('1/e depth 2.73 mm');
    expect(out).not.toContain('Warnings');
    const sheet = JSON.parse(readFileSync(join(cwd, 'fl/dye.json'), 'utf8'));
    expect(sheet.absorbance).toBeCloseTo(7947 * 2e-4 * 0.8, 3);
    expect(sheet.saturation.bare).toBeGreaterThan(3e6);
    expect(readdirSync(join(cwd, 'fl')).sort()).toEqual(
      ['dye.json', 'path.csv', 'path.png', 'path.svg', 'spectra.csv', 'spectra.png', 'spectra.svg'].sort(),
    );
  });

  test('a cell: a first guess with why', async () => {
    const { code, out } = await runCli(['dye', 'geometries/two-bank-box-cell.yaml', '--no-files'], { cwd });
    expect(code).toBe(0);
    expect(out).toMatch(/First guess\s+0\.\d+ mmol\/L/);
    expect(out).toContain('why:');
  });

  test.each([
    [['dye', 'flourescein'], 'Did you mean fluorescein?'],
    [['dye', 'fluorescein', 'ethanl'], 'Did you mean ethanol?'],
    [['dye', 'fluorescein', '--path', '0 mm'], '--path: it must be above 0 mm; found 0 mm'],
    [['dye', 'fluorescein', '--path', '3 nm/s'], '--path: this cannot be read'],
    [['dye', 'fluorescein', '--strength=-1 mmol/L'], '--strength: the value is too small; found -1 mmol/L'],
    [['dye', 'fluorescein', '--ph', '19'], '--ph: the value is too large; found 19'],
    [['dye', 'fluorescein', '--dial', 'a=1'], '--dial turns a dial of a design'],
    [['dye', 'geometries/two-bank-box-cell.yaml', 'bth'], 'Did you mean bath?'],
    [['dye', 'geometries/two-bank-box-cell.yaml', '--strength', '1 mmol/L'], 'turn a dial'],
    [['strength', 'geometries/two-bank-box-cell.yaml', '--turn', 'deepth'], 'Did you mean depth?'],
    [['strength', 'geometries/two-bank-box-cell.yaml', '--turn', 'depth'], 'does not change the strength'],
    [['strength', 'geometries/two-bank-box-cell.yaml', '--points', '2'], 'from 3 to 101'],
  ])('%j is refused', async (words, told) => {
    const { code, err } = await runCli([...words, '--no-files'], { cwd });
    expect(code).toBe(2);
    expect(err).toContain(told);
  });
});

describe('stokeswell strength', () => {
  test('a scan of the shipped cell: exit and losses add up, the best lies within', async () => {
    const words = [
      'strength',
      'geometries/two-bank-box-cell.yaml',
      '--points',
      '7',
      '--histories',
      '2048',
      '--out',
      'scan',
    ];
    const { code, out } = await runCli(words, { cwd });
    expect(code).toBe(0);
    expect(out).toContain('Most light comes out at about');
    const scan = JSON.parse(readFileSync(join(cwd, 'scan/strength.json'), 'utf8'));
    expect(scan.points).toHaveLength(7);
    expect(scan).toMatchObject({ dial: 'strength', unit: 'mmol/L', whole: true });
    expect(scan.points[6].strength / scan.points[0].strength).toBeCloseTo(1000, 2);
    expect(scan.points[3].exit.value).toBeGreaterThan(3 * scan.points[0].exit.value);
    expect(readdirSync(join(cwd, 'scan')).sort()).toEqual([
      'strength.csv',
      'strength.json',
      'strength.png',
      'strength.svg',
    ]);
  });

  test('Ctrl-C keeps the strengths that are done and ends with 4', async () => {
    const words = [
      'strength',
      'geometries/two-bank-box-cell.yaml',
      '--points',
      '40',
      '--histories',
      '8192',
      '--out',
      'cut',
    ];
    let heard = false;
    const { code } = await runCli(words, {
      cwd,
      meanwhile: (child) => {
        child.stdout?.on('data', (text: string) => {
          if (heard || !String(text).includes('±')) return;
          heard = true;
          child.kill('SIGINT');
        });
      },
    });
    expect(code).toBe(4);
    const scan = JSON.parse(readFileSync(join(cwd, 'cut/strength.json'), 'utf8'));
    expect(scan.whole).toBe(false);
    expect(scan.points.length).toBeGreaterThanOrEqual(1);
    expect(scan.points.length).toBeLessThan(40);
  });
});
