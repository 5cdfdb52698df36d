import { describe, expect, it } from 'vitest';
import { colourDepth } from '../../../src/cli/colour-depth.js';
import { faceMap } from '../../../src/cli/ledger/face-map.js';
import { joinCells } from '../../../src/cli/ledger/join-cells.js';
import { paintCells } from '../../../src/cli/ledger/paint-cells.js';
import { styleFor } from '../../../src/cli/terminal-style.js';
import type { MapArray, RunArrays } from '../../../src/record/run-arrays.js';
import type { RunRecord } from '../../../src/record/run-record.js';
import { sampleRun } from '../../run-folder/sample-run.js';

const piped = styleFor(false, { LANG: 'C.UTF-8' });
const ascii = styleFor(false, { LANG: 'C' });
// biome-ignore lint/suspicious/noControlCharactersInRegex: colour sequences begin with one
const plain = (line: string) => line.replace(/\u001b\[[\d;]*m/g, '');

/** An exit of 40 × 16 cells whose light rises from left to right, seen by so many photons. */
function rising(histories: number): { record: RunRecord; arrays: RunArrays } {
  const { record, arrays } = sampleRun();
  const shape = [40, 16];
  const extentMm = [
    [-10, 10],
    [-4, 4],
  ] as const;
  const values = Float64Array.from({ length: 640 }, (_, i) => (i % 40) + 0.5);
  const map: MapArray = { ...arrays.maps[0], shape, extentMm, values, measure: new Float64Array(640).fill(0.25) };
  return {
    record: {
      ...record,
      run: { ...record.run, histories },
      maps: [{ ...record.maps[0], what: 'exit', where: 'lid.top', shape, extentMm, power: 30 }],
    },
    arrays: { ...arrays, maps: [map] },
  };
}
const draw = (histories: number, style = piped, depth: 'none' | '256' | '24-bit' = 'none') => {
  const { record, arrays } = rising(histories);
  return faceMap(record, arrays, style, depth);
};

describe('faceMap', () => {
  it.each([
    ['none', ascii],
    ['none', piped],
    ['256', piped],
    ['24-bit', piped],
  ] as const)('fits 60 columns and 14 lines with colours %s', (depth, style) => {
    const lines = draw(1e7, style, depth);
    expect(lines.length).toBeLessThanOrEqual(14);
    for (const line of lines) expect([...plain(line)].length).toBeLessThanOrEqual(60);
    expect(lines.join('').includes('\u001b')).toBe(depth !== 'none');
  });

  it('says what it maps, its ends in mm, its scale with unit, and the noise', () => {
    const text = draw(1e7).join('\n');
    expect(text).toContain('light out of lid.top');
    expect(text).toMatch(/ 4 mm .*\n[\s\S]*-4 mm /);
    expect(text).toMatch(/\n +-10 mm +10 mm\n/);
    expect(text).toMatch(/\n +0 .* 3\d\.\d W\/cm²/);
    expect(text).toMatch(/counting noise [\d.]+ % of each/);
  });

  it('rises where the light does', () => {
    const [, line] = draw(1e7, ascii);
    const ramp = ' .:-=+*#%@';
    const steps = [...line.slice(10)].map((sign) => ramp.indexOf(sign));
    expect(steps).toEqual(steps.toSorted((a, b) => a - b));
    expect(steps[0]).toBe(0);
    expect(steps.at(-1)).toBe(9);
  });

  // Poisson: a patch of n photons scatters by 1/√n, so 5 % wants 400 of them. 30 of 60 W: half the histories come here.
  it.each([20_000, 50_000, 200_000])('%i histories make patches of at least 400 photons', (histories) => {
    const noise = /counting noise ([\d.]+) %/.exec(draw(histories).join('\n'))?.[1];
    expect(Number(noise)).toBeLessThanOrEqual(5.05);
    expect(Number(noise)).toBeGreaterThan(3.5);
  });

  it('shows no map of too few photons, and none where nothing was lit', () => {
    expect(draw(1000).join('\n')).toMatch(/too few for a map/);
    const { record, arrays } = rising(1e6);
    const dark = { ...record, maps: record.maps.map((map) => ({ ...map, power: 0 })) };
    expect(faceMap(dark, arrays, piped, 'none')).toEqual([]);
  });
});

describe('joinCells', () => {
  it('keeps the power, and leaves out what is off the face', () => {
    const map = { ...sampleRun().arrays.maps[0] };
    // 3 × 2 cells of 0 to 4, the last one off the face, 8 mm² each.
    expect(Array.from(joinCells(map, { across: 1, up: 2 }).values)).toEqual([1, 3.5]);
    expect(joinCells(map, { across: 9, up: 9 })).toMatchObject({ across: 3, up: 2 });
  });
});

describe('paintCells', () => {
  it('puts two rows into a line, and nothing where there is nothing', () => {
    expect(
      paintCells(
        [
          [0.1, Number.NaN],
          [0.9, Number.NaN],
        ],
        'none',
        false,
      ),
    ).toEqual(['+']);
    expect(paintCells([[1, 1]], '24-bit', true)[0]).toContain('▀');
    expect(
      plain(
        paintCells(
          [
            [Number.NaN, 1],
            [1, Number.NaN],
          ],
          '24-bit',
          true,
        )[0],
      ),
    ).toBe('▄▀');
    expect(paintCells([[1], [0]], '256', true)[0]).toContain('38;5;255;48;5;232m');
  });

  it('falls back to letters where the terminal has no blocks', () => {
    expect(
      paintCells(
        [
          [0, 0.5, 1],
          [0, 0.5, 1],
        ],
        '24-bit',
        false,
      ),
    ).toEqual([' +@']);
  });
});

describe('colourDepth', () => {
  it.each([
    [true, { COLORTERM: 'truecolor', TERM: 'xterm-256color' }, '24-bit'],
    [true, { TERM: 'xterm-256color' }, '256'],
    [true, { TERM: 'xterm' }, 'none'],
    [true, { COLORTERM: 'truecolor', NO_COLOR: '1' }, 'none'],
    [true, { COLORTERM: 'truecolor', TERM: 'dumb' }, 'none'],
    [false, { COLORTERM: 'truecolor', TERM: 'xterm-256color' }, 'none'],
  ] as const)('terminal %s, %o: %s', (isTerminal, environment, depth) => {
    expect(colourDepth(isTerminal, environment)).toBe(depth);
  });
});
