import { buildAliasTable } from '../numerics/sample-table.js';

/** Alias tables of all spectra of a scene, one after another. */
export class SpectrumPool {
  readonly #keep: number[] = [];
  readonly #other: number[] = [];
  #count = 0;

  constructor(readonly cells: number) {}

  /** @returns number of the table. */
  add(photons: Float64Array): number {
    const { keep, other } = buildAliasTable(photons);
    this.#keep.push(...keep);
    this.#other.push(...other);
    return this.#count++;
  }

  finish(): { keep: readonly number[]; other: readonly number[] } {
    return { keep: this.#keep, other: this.#other };
  }
}
