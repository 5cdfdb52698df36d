import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { drawDescription } from '../../src/drawing/draw-description.js';
import type { Drawing } from '../../src/record/drawing.js';
import { drawingJson, keptDrawing } from '../../src/run-folder/drawing-json.js';
import { readDrawing } from '../../src/run-folder/read-drawing.js';
import { RunFolderError } from '../../src/run-folder/run-folder-error.js';
import { shipped } from '../geometries/shipped.js';
import { sampleDrawing } from './sample-run.js';

let folder = '';
beforeEach(async () => {
  folder = await mkdtemp(join(tmpdir(), 'stokeswell-'));
});
afterEach(() => rm(folder, { recursive: true, force: true }));

const write = (text: string) => writeFile(join(folder, 'drawing.json'), text);
const roundTrip = async (drawing: Drawing) => {
  await write(drawingJson(drawing));
  return readDrawing(folder);
};

describe('drawing.json', () => {
  it('gives a drawing back to 1e-4 mm; powers and wavelengths to the last bit', async () => {
    expect(await roundTrip(sampleDrawing())).toEqual(sampleDrawing());
    const round = drawDescription(shipped('box-with-bonded-dome'));
    const read = await roundTrip(round);
    expect(read).toEqual(keptDrawing(round));
    expect(keptDrawing(keptDrawing(round))).toEqual(keptDrawing(round));
    const corners = (drawing: Drawing | null) =>
      drawing?.parts.flatMap((part) => part.faces.flatMap((face) => face.triangles));
    const [before, after] = [corners(round) ?? [], corners(read) ?? []];
    expect(after.length).toBe(before.length);
    expect(Math.max(...after.map((c, i) => Math.abs(c - before[i])))).toBeLessThanOrEqual(0.5001e-4);
  });

  it('writes the normal of a flat face once', () => {
    const written: Drawing = JSON.parse(drawingJson(sampleDrawing()));
    expect(written).toMatchObject({ format: 1 });
    expect(written.parts[0].faces[0].normals).toEqual([0, 0, 1]);
    expect(written.parts[0].faces[1].normals.length).toBe(9);
  });

  it('is null where there is no such file', async () => {
    expect(await readDrawing(folder)).toBeNull();
  });

  it.each([
    ['half a file', (text: string) => text.slice(0, text.length / 2), 'not whole JSON'],
    ['null', () => 'null', 'no drawing'],
    ['a later format', (text: string) => text.replace('"format":1', '"format":9'), 'format'],
    ['a lost corner', (text: string) => text.replace('"triangles":[0,0,0,', '"triangles":[0,0,'), 'triangles'],
    ['a lost normal', (text: string) => text.replace('"normals":[0.6,0,0.8,', '"normals":['), 'normal'],
    [
      'a word for a number',
      (text: string) => text.replace('"watts":0.', '"watts":"0.').replace(',"wavelengthNm"', '","wavelengthNm"'),
      'watts',
    ],
    ['a path without its colours', (text: string) => text.replace('[445.123456,530.25]', '[445]'), 'wavelength'],
  ])('tells of %s', async (_, harm, words) => {
    await write(harm(drawingJson(sampleDrawing())));
    await expect(readDrawing(folder)).rejects.toThrow(RunFolderError);
    await expect(readDrawing(folder)).rejects.toThrow(words);
    await expect(readDrawing(folder)).rejects.toThrow('drawing.json');
  });
});
