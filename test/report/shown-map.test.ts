import { describe, expect, it } from 'vitest';
import type { MapArray, RunArrays } from '../../src/record/run-arrays.js';
import { cutOf, PACKED_FULL, PACKED_NOTHING, packValues, peakCell, shownMaps } from '../../src/report/shown-map.js';
import { sampleRun } from '../run-folder/sample-run.js';

const { record, arrays } = sampleRun();

/** One face of `side` × `side` cells of values 1, with its record. */
function wide(side: number): { record: typeof record; arrays: RunArrays } {
  const values = new Float64Array(side * side).fill(1);
  const measure = new Float64Array(side * side).fill(2);
  values[0] = Number.NaN;
  measure[0] = 0;
  const array: MapArray = { ...arrays.maps[0], shape: [side, side], values, measure };
  const { shape } = array;
  return {
    record: { ...record, maps: [{ ...record.maps[0], shape, maximum: 1 }] },
    arrays: { ...arrays, maps: [array] },
  };
}

describe('shownMaps', () => {
  it('keeps small maps as they are, with nothing where there is no face', () => {
    const [face] = shownMaps(record, arrays);
    expect(face.cells).toEqual([3, 2, 1]);
    expect([...face.values]).toEqual([0, 1, 2, 3, 4, Number.NaN]);
    expect(face.joined).toBe(false);
    expect(face.lit).toBe(5);
  });

  it('joins the cells of large ones by mean over what is there', () => {
    const large = wide(1000);
    const [face] = shownMaps(large.record, large.arrays);
    expect(face.joined).toBe(true);
    expect(face.cells[0]).toBeLessThanOrEqual(128);
    for (const value of face.values) expect(value).toBeCloseTo(1, 12);
  });

  it('leaves out maps whose values are not at hand', () => {
    expect(shownMaps(record, { ...arrays, maps: [] })).toEqual([]);
  });

  it('cuts a volume across any two axes', () => {
    const volume = shownMaps(record, arrays)[3];
    expect(volume.cells).toEqual([2, 1, 2]);
    expect(Array.from(cutOf(volume, [0, 2], 1, 0).values)).toEqual([1, 2, 3, 4]);
    expect(Array.from(cutOf(volume, [0, 1], 2, 1).values)).toEqual([3, 4]);
    expect(peakCell(volume)).toEqual([1, 0, 1]);
  });

  it('packs values so that they come back to a part in 65 000 of the largest', () => {
    const [face] = shownMaps(record, arrays);
    const bytes = Buffer.from(packValues(face), 'base64');
    const back = Array.from(face.values, (_, i) => bytes.readUInt16LE(2 * i));
    expect(back[5]).toBe(PACKED_NOTHING);
    const { top } = face;
    for (let i = 0; i < 5; i++) {
      expect((back[i] / PACKED_FULL) * top).toBeCloseTo(face.values[i], 3);
    }
  });
});
