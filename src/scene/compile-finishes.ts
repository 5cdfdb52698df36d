/** Finishes -> how each splits and spreads light, over the wavelength grid. Finish 0 is clear: what a face without a finish is. */
import type { Description, FinishDescription } from '../design/description.js';
import { scatterShares } from '../numerics/hemisphere-cells.js';
import { dichroicShares } from '../optics/dichroic.js';
import { addScatterCells } from './scatter-cells.js';
import { SPLIT, SPREAD } from './scene-layout.js';
import type { WavelengthGrid } from './wavelength-grid.js';

export const TABLE_ANGLES = 91;

export interface CompiledFinishes {
  readonly names: readonly string[];
  readonly split: number[];
  readonly reflectSpread: number[];
  readonly transmitSpread: number[];
  readonly width: number[];
  readonly widthV: number[];
  readonly scatterHead: number[];
  readonly scatterNumbers: number[];
  readonly a: Float64Array;
  readonly b: Float64Array;
  readonly table: number[];
  readonly tableReflectance: number[];
  readonly tableTransmittance: number[];
}

export function compileFinishes(description: Description, grid: WavelengthGrid): CompiledFinishes {
  const cells = grid.nm.length;
  const clear: FinishDescription = { name: 'clear', path: [], kind: 'clear' };
  const used = new Set(description.parts.flatMap(({ faces }) => faces.map(({ finish }) => finish)));
  const finishes = [
    clear,
    ...[...used].filter((name) => name !== 'clear').map((name) => finishNamed(description, name)),
  ];
  const compiled: CompiledFinishes = {
    names: finishes.map(({ name }) => name),
    split: [],
    reflectSpread: [],
    transmitSpread: [],
    width: [],
    widthV: [],
    scatterHead: [],
    scatterNumbers: [],
    a: new Float64Array(finishes.length * cells),
    b: new Float64Array(finishes.length * cells),
    table: [],
    tableReflectance: [],
    tableTransmittance: [],
  };
  for (const [f, finish] of finishes.entries()) compileFinish(compiled, finish, f, grid);
  return compiled;
}

function finishNamed(description: Description, name: string): FinishDescription {
  const finish = description.finishes.get(name);
  if (finish === undefined) throw new Error(`finish ${name} is not in the description`);
  return finish;
}

function compileFinish(out: CompiledFinishes, finish: FinishDescription, f: number, grid: WavelengthGrid): void {
  const cells = grid.nm.length;
  const fill = (shares: (nm: number) => readonly [number, number]) => {
    for (let w = 0; w < cells; w++) {
      [out.a[f * cells + w], out.b[f * cells + w]] = shares(grid.nm[w]);
    }
  };
  let split: number = SPLIT.spectral;
  let spread: number = SPREAD.specular;
  let width = 0;
  let widthV = 0;
  let table = -1;
  switch (finish.kind) {
    case 'clear':
      split = SPLIT.fresnel;
      break;
    case 'black':
      fill(() => [0, 0]);
      break;
    case 'mirror':
      fill(() => [finish.reflectance, 0]);
      break;
    case 'metal':
      split = SPLIT.metal;
      fill((nm) => [finish.n(nm), finish.k(nm)]);
      break;
    case 'dichroic':
      fill((nm) => {
        const { reflectance, transmittance } = dichroicShares(finish, nm);
        return [reflectance, transmittance];
      });
      break;
    case 'stack':
      // Its tables know the media on either side: compile-films.ts.
      split = SPLIT.stack;
      break;
    case 'table':
      split = SPLIT.table;
      table = out.tableReflectance.length / TABLE_ANGLES;
      addTable(out, finish, grid);
      break;
    case 'diffuser':
      spread = SPREAD.lambertian;
      fill(() => [finish.reflects, finish.transmits]);
      break;
    case 'scatter': {
      const gaussian = finish.shape === 'gaussian';
      [width, widthV] = finish.fwhm.map((fwhm) => (gaussian ? fwhm : fwhm / 2));
      if (width === widthV) spread = gaussian ? SPREAD.gaussian : SPREAD.topHat;
      else spread = gaussian ? SPREAD.gaussianOval : SPREAD.topHatOval;
      const shares = finish.split;
      if (shares === null) split = SPLIT.fresnel;
      else fill(() => [shares.reflects, shares.transmits]);
      break;
    }
    case 'bsdf': {
      split = SPLIT.table;
      spread = SPREAD.table;
      table = out.tableReflectance.length / TABLE_ANGLES;
      const { incidenceDeg, reflected, transmitted } = scatterShares(finish);
      addTable(
        out,
        { wavelengthsNm: [0], anglesDeg: incidenceDeg, reflectance: [reflected], transmittance: [transmitted] },
        grid,
      );
      break;
    }
  }
  addScatterCells(out, finish);
  out.split.push(split);
  out.reflectSpread.push(spread);
  out.transmitSpread.push(spread);
  out.width.push(width);
  out.widthV.push(widthV);
  out.table.push(table);
}

type ShareGrid = Omit<Extract<FinishDescription, { kind: 'table' }>, 'name' | 'path' | 'kind'>;

/** Resamples a user's table, bilinear and held at its ends, to the grid and to whole degrees. */
function addTable(out: CompiledFinishes, finish: ShareGrid, grid: WavelengthGrid): void {
  for (const nm of grid.nm) {
    for (let angle = 0; angle < TABLE_ANGLES; angle++) {
      const { reflectance, transmittance } = tableShares(finish, nm, (angle * 90) / (TABLE_ANGLES - 1));
      out.tableReflectance.push(reflectance);
      out.tableTransmittance.push(transmittance);
    }
  }
}

/** A user's table at any wavelength, nm, and angle, degrees: bilinear, held at its ends. */
export function tableShares(
  { wavelengthsNm, anglesDeg, reflectance, transmittance }: ShareGrid,
  nm: number,
  degrees: number,
): { reflectance: number; transmittance: number } {
  const row = bracket(wavelengthsNm, nm);
  const column = bracket(anglesDeg, degrees);
  return { reflectance: bilinear(reflectance, row, column), transmittance: bilinear(transmittance, row, column) };
}

type Bracket = readonly [low: number, high: number, share: number];

function bracket(axis: readonly number[], at: number): Bracket {
  let high = axis.findIndex((value) => value >= at);
  if (high < 0) high = axis.length - 1;
  const low = Math.max(0, high - 1);
  if (high === low || at <= axis[low]) return [low, low, 0];
  if (at >= axis[high]) return [high, high, 0];
  return [low, high, (at - axis[low]) / (axis[high] - axis[low])];
}

function bilinear(table: readonly (readonly number[])[], [r0, r1, r]: Bracket, [c0, c1, c]: Bracket): number {
  const low = table[r0][c0] * (1 - c) + table[r0][c1] * c;
  const high = table[r1][c0] * (1 - c) + table[r1][c1] * c;
  return low * (1 - r) + high * r;
}
