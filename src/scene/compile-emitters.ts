/** What pumps know from measurement or by chance: far fields, pointing errors of single emitters, rays. */
import type { FarField, PumpDescription, RayTable } from '../design/description.js';
import { nextUnit, seedStream } from '../numerics/random-stream.js';
import { buildAliasTable } from '../numerics/sample-table.js';
import { nearestIndex, type WavelengthGrid } from './wavelength-grid.js';

export interface CompiledEmitters {
  /** [pump]: place of its far field in `farFields`, −1; points of its cuts. */
  readonly farFieldStart: number[];
  readonly farFieldPoints: number[];
  /** Of a pump: its angles, then density and cumulative density along u, then along v, each as long as the angles. */
  readonly farFields: number[];
  /** [pump]: place of its first emitter in `pointing`, −1. */
  readonly pointingStart: number[];
  /** Error of each emitter about u and about v, rad: across first, then along, then rows. */
  readonly pointing: number[];
  /** [pump]: first ray and number of rays, −1 and 0 for other beams. */
  readonly rayStart: number[];
  readonly rayCount: number[];
  /** [ray · 6]: position, mm, and direction, in the axes of the pump. */
  readonly rays: number[];
  /** Alias tables over the rays of each pump, by photons. */
  readonly rayKeep: number[];
  readonly rayOther: number[];
  /** [ray]: place in the wavelength grid, −1: as the pump's spectrum says. */
  readonly rayWavelength: number[];
}

export function compileEmitters(pumps: readonly PumpDescription[], grid: WavelengthGrid): CompiledEmitters {
  const out: CompiledEmitters = {
    farFieldStart: [],
    farFieldPoints: [],
    farFields: [],
    pointingStart: [],
    pointing: [],
    rayStart: [],
    rayCount: [],
    rays: [],
    rayKeep: [],
    rayOther: [],
    rayWavelength: [],
  };
  for (const { beam } of pumps) {
    const farField = beam.kind === 'diodes' || beam.kind === 'patch' ? (beam.farField ?? null) : null;
    addFarField(out, farField);
    addPointing(out, beam);
    addRays(out, beam.kind === 'rays' ? beam.rays : null, grid);
  }
  return out;
}

function addFarField(out: CompiledEmitters, farField: FarField | null): void {
  out.farFieldStart.push(farField === null ? -1 : out.farFields.length);
  out.farFieldPoints.push(farField?.anglesRad.length ?? 0);
  if (farField === null) return;
  const { anglesRad, u, v } = farField;
  out.farFields.push(...anglesRad, ...densities(anglesRad, u), ...densities(anglesRad, v));
}

/** Density, of area 1, and its integral up to each angle. */
function densities(angles: readonly number[], relative: readonly number[]): number[] {
  const cumulative = [0];
  for (let i = 1; i < angles.length; i++) {
    cumulative.push(cumulative[i - 1] + ((relative[i] + relative[i - 1]) / 2) * (angles[i] - angles[i - 1]));
  }
  const area = cumulative[cumulative.length - 1];
  return [...relative, ...cumulative].map((value) => value / area);
}

function addPointing(out: CompiledEmitters, beam: PumpDescription['beam']): void {
  const { pointing = null } = beam.kind === 'diodes' ? beam : {};
  if (beam.kind !== 'diodes' || pointing === null) {
    out.pointingStart.push(-1);
    return;
  }
  out.pointingStart.push(out.pointing.length);
  const stream = streamOf(pointing.seed);
  const emitters = beam.across * beam.along * (beam.stack?.rows ?? 1);
  for (let i = 0; i < emitters; i++) {
    // Box and Muller, Ann. Math. Stat. 29 610 (1958).
    const radius = pointing.spread * Math.sqrt(-2 * Math.log(nextUnit(stream)));
    const turn = 2 * Math.PI * nextUnit(stream);
    out.pointing.push(radius * Math.cos(turn), radius * Math.sin(turn));
  }
}

/** A stream of its own for each text (FNV-1a over its characters). */
function streamOf(seed: string): Int32Array {
  const words = Int32Array.from({ length: 4 }, (_, word) => {
    let hash = 0x811c9dc5 ^ word;
    for (const character of `pointing ${seed}`) hash = Math.imul(hash ^ (character.codePointAt(0) ?? 0), 0x01000193);
    return hash;
  });
  const state = new Int32Array(4);
  seedStream(state, words);
  return state;
}

function addRays(out: CompiledEmitters, rays: RayTable | null, grid: WavelengthGrid): void {
  const first = out.rayWavelength.length;
  out.rayStart.push(rays === null ? -1 : first);
  out.rayCount.push(rays?.watts.length ?? 0);
  if (rays === null) return;
  const { position, direction, watts, wavelengthNm } = rays;
  watts.forEach((_, i) => {
    for (let axis = 0; axis < 3; axis++) out.rays.push(position[3 * i + axis]);
    for (let axis = 0; axis < 3; axis++) out.rays.push(direction[3 * i + axis]);
    out.rayWavelength.push(wavelengthNm === null ? -1 : nearestIndex(grid.nm, wavelengthNm[i]));
  });
  const { keep, other } = buildAliasTable(watts.map((watt, i) => watt * (wavelengthNm?.[i] ?? 1)));
  for (let i = 0; i < keep.length; i++) {
    out.rayKeep.push(keep[i]);
    out.rayOther.push(other[i]);
  }
}
