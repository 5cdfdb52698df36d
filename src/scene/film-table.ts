/**
 * What a stack does to light of every wavelength and angle, tabulated once between two media. The angle runs along the cosine in the
 * rarer of the two media, in which R and T have no kink: in the angle itself, and in the cosine of the denser medium, T falls to
 * nothing with an infinite slope. Beyond the critical angle, where a stack that absorbs nothing needs a table for its phases only, cos θ = cos θc·sin φ runs with φ
 * for the same reason. A cubic through four nodes leads from one to the next; nodes lie as close as it needs, in each block of angles and
 * each group of wavelengths, for the resonances of a stack are narrow where they are and nowhere else.
 */
import { AMPLITUDES, stackAmplitudes } from '../optics/thin-film-stack.js';
import type { ThinFilms } from '../optics/thin-films.js';
import type { FilmChannels } from './film-channels.js';
import { FILM } from './scene-layout.js';

/** One direction of light through a stack: everything [wavelength]. */
export interface FilmPassage {
  readonly films: readonly ThinFilms[];
  readonly indexIn: Float64Array;
  readonly indexOut: Float64Array;
}

/** Blocks of angles in groups of wavelengths: [group · FILM.blocks + block]. */
export interface FilmBlocks {
  /** Intervals of each block; 0: none would do, the stack is worked out where it is met. */
  readonly cells: readonly number[];
  /** Of each block [(wavelength in the group · (cells + 1) + node) · channels + channel]. */
  readonly nodes: readonly Float32Array[];
  /** Largest error of half as many nodes, at the others. */
  readonly error: number;
}

export interface FilmTable {
  readonly travelling: FilmBlocks;
  /** Beyond the critical angle, φ from 0 (grazing) to 90° (critical); null where no such angle is, or nothing absorbs and no phases are kept. */
  readonly beyond: FilmBlocks | null;
}

/** Error at which nodes need not be halved once more; those used are twice as many. */
const TARGET = 1e-3;
const FEWEST = 4;
const NONE = new Float32Array(0);

export function tabulateFilms(passage: FilmPassage, channels: FilmChannels): FilmTable {
  const absorbing = passage.films.some((films) => films.absorbing);
  const denser = passage.indexIn.some((index, w) => index > passage.indexOut[w]);
  return {
    travelling: fillBlocks(passage, channels, false),
    beyond: denser && (absorbing || channels.phases) ? fillBlocks(passage, channels, true) : null,
  };
}

function fillBlocks(passage: FilmPassage, channels: FilmChannels, beyond: boolean): FilmBlocks {
  const cells: number[] = [];
  const nodes: Float32Array[] = [];
  let error = 0;
  for (let first = 0; first < passage.films.length; first += FILM.group) {
    const last = Math.min(passage.films.length, first + FILM.group);
    for (let block = 0; block < FILM.blocks; block++) {
      const filled = fillBlock(passage, channels, beyond, first, last, block);
      cells.push(filled.cells);
      nodes.push(filled.nodes);
      error = Math.max(error, filled.error);
    }
  }
  return { cells, nodes, error };
}

function fillBlock(
  passage: FilmPassage,
  channels: FilmChannels,
  beyond: boolean,
  first: number,
  last: number,
  block: number,
) {
  const { count } = channels;
  let cells = FEWEST;
  let nodes: Float32Array | null = null;
  for (;;) {
    const finer = new Float32Array((last - first) * (2 * cells + 1) * count);
    let error = 0;
    for (let w = first; w < last; w++) {
      const from = (w - first) * (cells + 1) * count;
      const to = (w - first) * (2 * cells + 1) * count;
      for (let i = 0; i <= 2 * cells; i++) {
        const at = to + i * count;
        if (nodes !== null && i % 2 === 0) {
          for (let c = 0; c < count; c++) finer[at + c] = nodes[from + (i / 2) * count + c];
        } else sample(passage, channels, beyond, w, (block + i / (2 * cells)) / FILM.blocks, finer, at);
      }
      error = Math.max(error, oddError(finer, to, cells, count));
    }
    // Beyond the critical angle the phases of a stack without absorption turn round within any angle, however small.
    if (error > TARGET && cells >= channels.most && channels.direct) return { cells: 0, nodes: NONE, error: 0 };
    if (error <= TARGET || cells >= channels.most) return { cells: 2 * cells, nodes: finer, error };
    cells *= 2;
    nodes = finer;
  }
}

const amplitudes = new Float64Array(AMPLITUDES.COUNT);

/** @param x place along the angle, 0..1; grazing and critical incidence themselves are limits */
function sample(
  { films, indexIn, indexOut }: FilmPassage,
  channels: FilmChannels,
  beyond: boolean,
  w: number,
  x: number,
  nodes: Float32Array,
  at: number,
): void {
  const n1 = indexIn[w];
  const n2 = indexOut[w];
  const gap2 = Math.abs((n1 - n2) * (n1 + n2));
  if (!beyond) {
    const lower = Math.min(n1, n2);
    const rare = lower * Math.max(1e-9, x);
    const dense = Math.sqrt(gap2 + rare * rare);
    const normalIn = n1 <= n2 ? rare : dense;
    const normalOut = n1 <= n2 ? dense : rare;
    stackAmplitudes(films[w], n1, n2, lower * lower - rare * rare, normalIn, normalOut, true, amplitudes);
  } else if (n1 > n2) {
    const phi = (Math.PI / 2) * Math.max(1e-9, x);
    const decay = Math.sqrt(gap2) * Math.cos(phi);
    stackAmplitudes(
      films[w],
      n1,
      n2,
      n2 * n2 + decay * decay,
      Math.sqrt(gap2) * Math.sin(phi),
      decay,
      false,
      amplitudes,
    );
  } else return;
  channels.pick(amplitudes, n2 / n1, !beyond, nodes, at);
}

/** How far the nodes between miss the cubic through those with even numbers. */
function oddError(nodes: Float32Array, start: number, cells: number, count: number): number {
  let worst = 0;
  for (let i = 0; i < cells; i++) {
    const first = Math.min(Math.max(0, i - 1), cells - 3);
    for (let c = 0; c < count; c++) {
      const found = cubic(nodes, start + 2 * first * count + c, 2 * count, i + 0.5 - first);
      worst = Math.max(worst, Math.abs(found - nodes[start + (2 * i + 1) * count + c]));
    }
  }
  return worst;
}

/** Lagrange's cubic through four numbers `stride` apart from `at`, at t = 0..3 of their places. */
export function cubic(nodes: Float32Array, at: number, stride: number, t: number): number {
  const a = t - 1;
  const b = t - 2;
  const c = t - 3;
  return (
    (-a * b * c * nodes[at]) / 6 +
    0.5 * t * b * c * nodes[at + stride] -
    0.5 * t * a * c * nodes[at + 2 * stride] +
    (t * a * b * nodes[at + 3 * stride]) / 6
  );
}
