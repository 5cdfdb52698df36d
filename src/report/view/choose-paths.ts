import type { FateRow } from './fate-event.js';
import type { PackedFate } from './packed-drawing.js';
import type { OpenPath } from './unpack-drawing.js';

export interface PathChoice {
  /** Indices of the fates that are wanted; empty: all. */
  readonly fates: ReadonlySet<number>;
  /** Only paths that ended at this face or in this part. */
  readonly place: string | null;
  /** Only paths a dye sent out anew: at all, or again after that. */
  readonly reemitted: 'any' | 'once' | 'again';
  /** The first so many of them. */
  readonly most: number;
}

/** The paths that are wanted, and how many there would be without the limit. */
export function choosePaths(
  paths: readonly OpenPath[],
  fates: readonly PackedFate[],
  { fates: wanted, place, reemitted, most }: PathChoice,
): { readonly shown: readonly OpenPath[]; readonly fitting: number } {
  const fitting = paths.filter(
    (path) =>
      (wanted.size === 0 || wanted.has(path.fate)) &&
      (place === null || isAt(fates[path.fate].where, place)) &&
      (reemitted === 'any' || emissions(path) >= (reemitted === 'once' ? 1 : 2)),
  );
  return { shown: fitting.slice(0, most), fitting: fitting.length };
}

/** A part holds its faces. */
export function isAt(where: string | null, place: string): boolean {
  return where !== null && (where === place || where.startsWith(`${place}.`));
}

/** What rows of the ledger mean for the paths: their fates, and for Stokes heat, which is left on the way, the re-emitted ones. */
export function fatesOfRows(
  rows: readonly FateRow[],
  fates: readonly PackedFate[],
): { readonly fates: ReadonlySet<number>; readonly reemitted: PathChoice['reemitted'] } {
  const heat = rows.filter(({ fate }) => fate === 'stokes-heat');
  const others = rows.filter(({ fate }) => fate !== 'stokes-heat');
  const wanted = fates.flatMap((fate, i) =>
    others.some((row) => row.fate === fate.fate && row.light === fate.light && row.where === fate.where) ? [i] : [],
  );
  const reemitted =
    heat.length === 0 || others.length > 0 ? 'any' : heat.some(({ light }) => light === 'pump') ? 'once' : 'again';
  return { fates: new Set(wanted), reemitted };
}

/** How often a dye sent a path out anew: the light changes, be it by one step of the light index. */
function emissions({ lights, pumpSegments }: OpenPath): number {
  let count = 0;
  for (let i = Math.max(1, pumpSegments); i < lights.length; i++) {
    if (i === pumpSegments || lights[i] !== lights[i - 1]) count++;
  }
  return count;
}
