/** Stacks of thin films -> tables, one for each stack, pair of media that can meet at it, and direction of light. */
import { carriesPolarisation } from '../design/carries-polarisation.js';
import type { Description, FinishDescription } from '../design/description.js';
import { type ThinFilms, thinFilms } from '../optics/thin-films.js';
import type { CompiledMedia } from './compile-media.js';
import type { SceneFace } from './compile-solids.js';
import { type FilmChannels, POLARISED, UNPOLARISED } from './film-channels.js';
import { type FilmBlocks, type FilmTable, tabulateFilms } from './film-table.js';
import type { PlacedPart } from './place-parts.js';
import { sharedDoubles, sharedFloats } from './shared-arrays.js';
import { type MediaPair, stackNeighbours } from './stack-neighbours.js';
import type { WavelengthGrid } from './wavelength-grid.js';

type Stack = Extract<FinishDescription, { kind: 'stack' }>;

export interface CompiledFilms {
  readonly filmOf: readonly number[];
  readonly filmBlock: readonly number[];
  readonly filmBeyond: readonly number[];
  readonly filmStart: readonly number[];
  readonly filmCells: readonly number[];
  readonly filmNodes: Float32Array;
  readonly filmLayerStart: readonly number[];
  readonly filmLayers: Float64Array;
  /** Stacks whose curves are finer than the tables, with the largest error. */
  readonly coarse: readonly { readonly finish: string; readonly error: number }[];
}

/** Half as many nodes as there are may be this far out before a table is called coarse: the table itself is ten times better. */
const COARSE = 1e-2;

/** A description never changes, and is compiled for its check, its trial and its trace. */
const known = new WeakMap<Description, CompiledFilms>();

export function compileFilms(
  description: Description,
  parts: readonly PlacedPart[],
  faces: readonly SceneFace[],
  faceFinish: readonly number[],
  finishNames: readonly string[],
  media: CompiledMedia,
  grid: WavelengthGrid,
): CompiledFilms {
  const before = known.get(description);
  if (before !== undefined) return before;
  const films = new FilmPool(
    finishNames.length,
    media,
    grid,
    carriesPolarisation(description) ? POLARISED : UNPOLARISED,
  );
  finishNames.forEach((name, f) => {
    const finish = description.finishes.get(name);
    if (finish?.kind !== 'stack') return;
    const coated = faces.filter((_, i) => faceFinish[i] === f);
    for (const pair of stackNeighbours(coated, parts, description.surroundings)) films.add(finish, f, pair);
  });
  const compiled = films.finish();
  known.set(description, compiled);
  return compiled;
}

class FilmPool {
  readonly #filmOf: number[];
  readonly #filmBlock: number[] = [];
  readonly #filmBeyond: number[] = [];
  readonly #filmStart: number[] = [];
  readonly #filmCells: number[] = [];
  readonly #nodes: Float32Array[] = [];
  readonly #layerStart: number[] = [0];
  readonly #layers: number[] = [];
  readonly #coarse = new Map<string, number>();
  readonly #made = new Map<string, number>();
  /** First medium with the same index at every wavelength. */
  readonly #alike: readonly number[];
  #length = 0;

  constructor(
    finishes: number,
    readonly media: CompiledMedia,
    readonly grid: WavelengthGrid,
    readonly channels: FilmChannels,
  ) {
    this.#filmOf = new Array(finishes * 2 * media.names.length ** 2).fill(-1);
    const rows = media.names.map((_, m) => this.#index(m).join());
    this.#alike = rows.map((row) => rows.indexOf(row));
  }

  add(stack: Stack, f: number, { outside, inside }: MediaPair): void {
    const out = this.media.names.indexOf(outside);
    const own = this.media.names.indexOf(inside);
    const size = this.media.names.length;
    this.#filmOf[((2 * f + 0) * size + out) * size + own] = this.#film(
      stack,
      f,
      this.#alike[out],
      this.#alike[own],
      true,
    );
    this.#filmOf[((2 * f + 1) * size + own) * size + out] = this.#film(
      stack,
      f,
      this.#alike[own],
      this.#alike[out],
      false,
    );
  }

  /** Number of the film for light from medium `from` to `to`. */
  #film(stack: Stack, f: number, from: number, to: number, inward: boolean): number {
    // Where nothing absorbs, both ways let the same through (reciprocity), and the table runs along the same cosine. Phases differ.
    const alike = !this.channels.phases && stack.layers.every(({ k }) => this.grid.nm.every((nm) => k(nm) === 0));
    const [out, own] = inward ? [from, to] : [to, from];
    const key = `${f} ${out} ${own}${alike ? '' : inward ? ' in' : ' out'}`;
    const made = this.#made.get(key);
    if (made !== undefined) return made;
    const layers = inward ? stack.layers : stack.layers.toReversed();
    const films = Array.from(this.grid.nm, (nm) =>
      thinFilms(
        layers.map(({ n, k, thicknessNm }) => ({ n: n(nm), k: k(nm), thicknessNm })),
        nm,
      ),
    );
    const table = tabulateFilms({ films, indexIn: this.#index(from), indexOut: this.#index(to) }, this.channels);
    this.#made.set(key, this.#filmBlock.length);
    if (this.channels.direct) this.#keepLayers(films);
    return this.#store(stack.name, table);
  }

  #store(name: string, { travelling, beyond }: FilmTable): number {
    this.#filmBlock.push(this.#blocks(name, travelling));
    this.#filmBeyond.push(beyond === null ? -1 : this.#blocks(name, beyond));
    return this.#filmBlock.length - 1;
  }

  /** What the kernel needs to work the stack out itself, as laid out in scene-layout.ts. */
  #keepLayers(films: readonly ThinFilms[]): void {
    for (const { squareReal, squareImaginary, turns, count } of films) {
      for (let j = 0; j < count; j++) this.#layers.push(squareReal[j], squareImaginary[j], turns[j]);
    }
    this.#layerStart.push(this.#layers.length);
  }

  #blocks(name: string, { cells, nodes, error }: FilmBlocks): number {
    const first = this.#filmStart.length;
    cells.forEach((count, i) => {
      this.#filmStart.push(this.#length);
      this.#filmCells.push(count);
      this.#nodes.push(nodes[i]);
      this.#length += nodes[i].length;
    });
    if (error > COARSE) this.#coarse.set(name, Math.max(error, this.#coarse.get(name) ?? 0));
    return first;
  }

  #index(medium: number): Float64Array {
    const wavelengths = this.grid.nm.length;
    return this.media.index.subarray(medium * wavelengths, (medium + 1) * wavelengths);
  }

  finish(): CompiledFilms {
    return {
      filmOf: this.#filmOf,
      filmBlock: this.#filmBlock,
      filmBeyond: this.#filmBeyond,
      filmStart: this.#filmStart,
      filmCells: this.#filmCells,
      filmNodes: sharedFloats(this.#nodes, this.#length),
      filmLayerStart: this.#layerStart,
      filmLayers: sharedDoubles(this.#layers),
      coarse: [...this.#coarse].map(([finish, error]) => ({ finish, error })),
    };
  }
}
