/** The curves a trace goes by, over the scene's wavelengths: of the dyes, the finishes and the bare media in use. */
import type { Description, DissolvedDye, MediumDescription } from '../design/description.js';
import { metalReflectance } from '../optics/metal-reflectance.js';
import type { CompiledScene } from './compile-scene.js';
import { finishResponse } from './finish-response.js';
import { givenFinish } from './given-finish.js';
import { SPLIT } from './scene-layout.js';
import { stackNeighbours } from './stack-neighbours.js';
import type { CurveKind, UsedCurve } from './used-curve.js';
import { cellPhotons, linePhotons, type WavelengthGrid } from './wavelength-grid.js';

/** Media that absorb nothing and finishes that are the same at all wavelengths have no curve. */
export function usedCurves(
  { media, finishes, surroundings }: Pick<Description, 'media' | 'finishes' | 'surroundings'>,
  compiled: CompiledScene,
): UsedCurve[] {
  const { grid, mediaNames } = compiled.legend;
  const used = mediaNames.flatMap((name) => media.get(name) ?? []);
  return [
    ...used.flatMap((medium) => medium.dyes.flatMap((dye) => dyeCurves(dye, medium.name, grid))),
    ...used.flatMap((medium) => mediumCurve(medium, grid)),
    ...finishCurves(compiled),
    ...stackCurves({ media, finishes, surroundings }, compiled),
  ];
}

function dyeCurves(
  { name, absorption, concentration, emission }: DissolvedDye,
  where: string,
  grid: WavelengthGrid,
): UsedCurve[] {
  const perMm = grid.nm.map((nm) => Math.max(0, absorption(nm)));
  // 1 mm⁻¹ = 10 cm⁻¹; Napierian to decadic by ln 10.
  const molar = concentration === null || concentration === 0 ? null : 10 / (Math.LN10 * concentration);
  const photons =
    emission.kind === 'line'
      ? linePhotons(grid, emission.wavelengthNm, 0)
      : cellPhotons(grid, emission.photonsPerNm, emission.fromNm, emission.toNm);
  const total = photons.reduce((a, b) => a + b, 0);
  return [
    curve('dye-absorption', name, where, '1/mm', perMm),
    ...(molar === null
      ? []
      : [
          curve(
            'dye-extinction',
            name,
            where,
            'L/(mol cm)',
            perMm.map((value) => value * molar),
          ),
        ]),
    curve(
      'dye-emission',
      name,
      where,
      '1/nm',
      photons.map((n, i) => n / total / grid.widthNm[i]),
    ),
  ];
}

function mediumCurve({ name, base, absorption }: MediumDescription, grid: WavelengthGrid): UsedCurve[] {
  const perMm = grid.nm.map((nm) => Math.max(0, absorption(nm)));
  return perMm.some((value) => value > 0) ? [curve('medium-absorption', base, name, '1/mm', perMm)] : [];
}

/** From the tables the kernel reads, so that they cannot differ from what was traced. */
function finishCurves({ scene, legend }: CompiledScene): UsedCurve[] {
  const cells = scene.wavelengths;
  const rowOf = (table: Float64Array, row: number) => table.slice(row * cells, (row + 1) * cells);
  return legend.finishNames.flatMap((name, f): UsedCurve[] => {
    const split = scene.finishSplit[f];
    if (split === SPLIT.metal) {
      const [n, k] = [rowOf(scene.finishA, f), rowOf(scene.finishB, f)];
      return mediaBefore(f).map((m) => {
        const values = rowOf(scene.index, m).map((index, w) => metalReflectance(index, n[w], k[w], 1));
        return curve('finish-reflectance', name, legend.mediaNames[m], '1', values);
      });
    }
    if (split === SPLIT.table)
      return bothShares(name, tableAtNormal(scene.tableReflectance), tableAtNormal(scene.tableTransmittance));
    const [reflectance, transmittance] = [rowOf(scene.finishA, f), rowOf(scene.finishB, f)];
    if (split === SPLIT.stack) return [];
    const spectral = split === SPLIT.spectral && transmittance.some((value) => value !== transmittance[0]);
    return spectral ? bothShares(name, reflectance, transmittance) : [];

    function tableAtNormal(table: Float64Array): Float64Array {
      return Float64Array.from({ length: cells }, (_, w) => table[(scene.finishTable[f] + w) * scene.tableAngles]);
    }
  });

  /** Media of the parts that wear a finish. */
  function mediaBefore(finish: number): readonly number[] {
    const owners = Array.from(scene.faceOwner).filter((_, face) => scene.faceFinish[face] === finish);
    return [...new Set(owners.map((owner) => scene.ownerMedium[owner]))];
  }
}

/** Stacks between the media that meet at their faces, from outside. */
function stackCurves(
  { media, finishes, surroundings }: Pick<Description, 'media' | 'finishes' | 'surroundings'>,
  { legend }: CompiledScene,
): UsedCurve[] {
  return legend.finishNames.flatMap((name): UsedCurve[] => {
    const finish = finishes.get(name);
    if (finish?.kind !== 'stack') return [];
    const faces = legend.faces.filter(
      ({ part, reference }) => givenFinish(part.description, faceName(reference)) === name,
    );
    return stackNeighbours(faces, legend.parts, surroundings).flatMap(({ outside, inside }) => {
      const [from, to] = [media.get(outside), media.get(inside)];
      if (from === undefined || to === undefined) return [];
      const at = legend.grid.nm.map((_, i) => i);
      const response = Array.from(at, (i) => {
        const nm = legend.grid.nm[i];
        const [indexHere, indexBeyond] = [from.index(nm), to.index(nm)];
        return finishResponse(finish, { indexHere, indexBeyond, cosine: 1, wavelengthNm: nm, inward: true }).s;
      });
      const where = `${outside} and ${inside}`;
      return [
        curve(
          'finish-transmittance',
          name,
          where,
          '1',
          Float64Array.from(response, (one) => one.transmittance),
        ),
        curve(
          'finish-reflectance',
          name,
          where,
          '1',
          Float64Array.from(response, (one) => one.reflectance),
        ),
      ];
    });
  });
}

/** Of 'part.face' or 'part.piece.face' what follows the part. */
const faceName = (reference: string): string => reference.slice(reference.indexOf('.') + 1);

function bothShares(name: string, reflectance: Float64Array, transmittance: Float64Array): UsedCurve[] {
  return [
    curve('finish-transmittance', name, null, '1', transmittance),
    curve('finish-reflectance', name, null, '1', reflectance),
  ];
}

function curve(
  what: CurveKind,
  name: string,
  where: string | null,
  unit: UsedCurve['unit'],
  values: Float64Array,
): UsedCurve {
  return { id: `${what} ${name}${where === null ? '' : ` in ${where}`}`, what, name, where, unit, values };
}
