/** Tables of scatter by both directions -> cumulative shares the kernel draws from. */
import type { FinishDescription } from '../design/description.js';
import { cellShares, hemisphereCells } from '../numerics/hemisphere-cells.js';
import { SCATTER } from './scene-layout.js';

/** Adds the head of a finish to `scatterHead`, −1 throughout unless it is such a table, and its numbers to `scatterNumbers`. */
export function addScatterCells(
  out: { readonly scatterHead: number[]; readonly scatterNumbers: number[] },
  finish: FinishDescription,
): void {
  const head = new Array<number>(SCATTER.STRIDE).fill(-1);
  if (finish.kind === 'bsdf') {
    const place = (numbers: Iterable<number>): number => {
      const at = out.scatterNumbers.length;
      for (const number of numbers) out.scatterNumbers.push(number);
      return at;
    };
    const cells = hemisphereCells(finish);
    head[SCATTER.incidences] = finish.incidenceDeg.length;
    head[SCATTER.polarCells] = cells.polar.length - 1;
    head[SCATTER.azimuthCells] = cells.azimuth.length - 1;
    head[SCATTER.incidence] = place(finish.incidenceDeg.map((angle) => (angle * Math.PI) / 180));
    head[SCATTER.polar] = place(cells.polar.map((angle) => Math.sin(angle) ** 2));
    head[SCATTER.azimuth] = place(cells.azimuth);
    for (const [side, at] of [
      [finish.reflected, SCATTER.reflected],
      [finish.transmitted, SCATTER.transmitted],
    ] as const) {
      const shares = side.map((plane) => cellShares(finish, plane, cells));
      head[at] = place(shares.map((row) => row.reduce((sum, share) => sum + share, 0)));
      head[at + 1] = out.scatterNumbers.length;
      for (const row of shares) place(cumulative(row));
    }
  }
  out.scatterHead.push(...head);
}

/** Rising to exactly 1. Where nothing is scattered nothing is drawn; even shares stand in. */
function cumulative(shares: Float64Array): Float64Array {
  const total = shares.reduce((sum, share) => sum + share, 0);
  let sum = 0;
  const rising = shares.map((share) => {
    sum += total > 0 ? share / total : 1 / shares.length;
    return sum;
  });
  // The last cell that scatters anything takes what rounding left over.
  for (let last = rising.length - 1; last >= 0; last--) {
    rising[last] = 1;
    if (total <= 0 || shares[last] > 0) break;
  }
  return rising;
}
