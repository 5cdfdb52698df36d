/** The library as others meet it: names, honest status, nothing read before it is asked for. */
import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, test, vi } from 'vitest';

vi.mock('node:fs', async (original) => {
  const real = await original<typeof import('node:fs')>();
  return { ...real, readFileSync: vi.fn(real.readFileSync) };
});

const library = await import('../../src/materials/library.js');
const readOnImport = vi.mocked(readFileSync).mock.calls.length;

describe('library', () => {
  test('importing it and listing names reads no file; a file is read once', () => {
    expect(readOnImport).toBe(0);
    const { dyeNames, gasNames, metalNames, solidNames, solventNames } = library;
    for (const names of [dyeNames(), gasNames(), metalNames(), solidNames(), solventNames()]) {
      expect(names.length).toBeGreaterThan(0);
      expect(new Set(names).size).toBe(names.length);
    }
    expect(vi.mocked(readFileSync)).toHaveBeenCalledTimes(0);
    library.readMetal('silver');
    library.readMetal('gold');
    expect(vi.mocked(readFileSync)).toHaveBeenCalledTimes(1);
  });

  test.each([
    ['solvent', () => library.readSolvent('etanol'), /etanol.*water, ethanol/],
    ['solid', () => library.readSolid('glass'), /glass.*borosilicate-crown/],
    ['gas', () => library.readGas('argon'), /argon.*air/],
    ['metal', () => library.readMetal('tin'), /tin.*aluminium, silver, gold/],
    ['inherited name', () => library.readSolid('toString'), /toString/],
  ])('an unknown %s is answered with the names there are', (_kind, read, message) => {
    expect(read).toThrow(RangeError);
    expect(read).toThrow(message);
  });

  test('solids and air are lossless, and the status says that is for want of data', () => {
    for (const name of library.solidNames()) {
      const solid = library.readSolid(name);
      expect(solid).toMatchObject({ name, kind: 'solid', thermal: null });
      expect(solid.absorption(520)).toBe(0);
      expect(solid.status).toContain('no data, taken as lossless');
    }
    expect(library.readGas('air')).toMatchObject({ kind: 'gas', status: 'exact by definition' });
  });

  // Johnson & Christy, Phys. Rev. B 6 4370 (1972): gold at 633 nm 0.183 − 3.433i (from memory, moderate).
  test('metals', () => {
    const gold = library.readMetal('gold');
    expect(gold.n(633)).toBeCloseTo(0.183, 2);
    expect(Math.abs(gold.k(633) / 3.433 - 1)).toBeLessThan(0.01);
    expect(gold.source).toBe('Johnson & Christy Phys. Rev. B 6 4370 (1972)');
    expect(gold.n(350)).toBe(gold.n(400));
    for (const name of library.metalNames()) expect(library.readMetal(name).source).toMatch(/\(\d{4}\)/);
  });

  test('every data file opens with its sources and status', () => {
    const folder = new URL('../../src/materials/data/', import.meta.url);
    const files = readdirSync(folder, { recursive: true, encoding: 'utf8' }).filter((name) => name.endsWith('.csv'));
    expect(files.length).toBeGreaterThanOrEqual(17);
    for (const file of files) {
      const head = readFileSync(new URL(file, folder), 'utf8')
        .split('\n')
        .filter((line) => line.startsWith('#'));
      expect(head.length, file).toBeGreaterThan(0);
      expect(readFileSync(new URL(file, folder), 'utf8'), file).toMatch(/status/i);
    }
  });
});
