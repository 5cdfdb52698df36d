/** Scatter at a surface by a table of both directions. */
import { nextUnit } from '../numerics/random-stream.js';
import { SCATTER, type Scene } from '../scene/scene-layout.js';

/** Draws a direction into `ray` [3..5] on the side the unit normal h points to, given the direction of incidence that is there. */
export function scatterByTable(
  scene: Scene,
  finish: number,
  reflects: boolean,
  ray: Float64Array,
  hx: number,
  hy: number,
  hz: number,
  random: Int32Array,
): void {
  const { scatterHead: head, scatterNumbers: numbers } = scene;
  const first = finish * SCATTER.STRIDE;
  const side = first + (reflects ? SCATTER.reflected : SCATTER.transmitted);
  const cosine = ray[3] * hx + ray[4] * hy + ray[5] * hz;
  const row = drawIncidence(
    numbers,
    head[first + SCATTER.incidence],
    head[first + SCATTER.incidences],
    head[side],
    Math.abs(cosine),
    random,
  );

  // ---- a cell by its cumulative share, a place in it even in solid angle times cosine
  const columns = head[first + SCATTER.azimuthCells];
  const cells = columns * head[first + SCATTER.polarCells];
  const start = head[side + 1] + row * cells;
  const pick = nextUnit(random);
  let low = 0;
  let high = cells - 1;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (numbers[start + middle] > pick) high = middle;
    else low = middle + 1;
  }
  const polar = head[first + SCATTER.polar] + Math.floor(low / columns);
  const azimuth = head[first + SCATTER.azimuth] + (low % columns);
  const sine2 = numbers[polar] + nextUnit(random) * (numbers[polar + 1] - numbers[polar]);
  const turn = numbers[azimuth] + nextUnit(random) * (numbers[azimuth + 1] - numbers[azimuth]);
  const sine = Math.sqrt(sine2);
  const forward = sine * Math.cos(turn);
  const aside = nextUnit(random) < 0.5 ? sine * Math.sin(turn) : -sine * Math.sin(turn);
  const up = Math.sqrt(1 - sine2);

  // ---- about the normal, azimuth from the side light heads for; head-on any side will do
  let tx = ray[3] - cosine * hx;
  let ty = ray[4] - cosine * hy;
  let tz = ray[5] - cosine * hz;
  if (tx * tx + ty * ty + tz * tz < 1e-18) {
    tx = Math.abs(hx) < 0.8 ? 1 - hx * hx : -hx * hy;
    ty = Math.abs(hx) < 0.8 ? -hx * hy : 1 - hy * hy;
    tz = Math.abs(hx) < 0.8 ? -hx * hz : -hy * hz;
  }
  const per = 1 / Math.sqrt(tx * tx + ty * ty + tz * tz);
  tx *= per;
  ty *= per;
  tz *= per;
  ray[3] = forward * tx + aside * (hy * tz - hz * ty) + up * hx;
  ray[4] = forward * ty + aside * (hz * tx - hx * tz) + up * hy;
  ray[5] = forward * tz + aside * (hx * ty - hy * tx) + up * hz;
}

/** One of the two tabulated incidences about an angle: so drawn, the function itself is linear between them. */
function drawIncidence(
  numbers: Float64Array,
  incidence: number,
  count: number,
  shares: number,
  cosine: number,
  random: Int32Array,
): number {
  const angle = Math.acos(cosine < 1 ? cosine : 1);
  let row = 0;
  while (row < count - 1 && numbers[incidence + row + 1] <= angle) row++;
  const from = numbers[incidence + row];
  if (row === count - 1 || angle <= from) return row;
  const share = (angle - from) / (numbers[incidence + row + 1] - from);
  const upper = share * numbers[shares + row + 1];
  const both = upper + (1 - share) * numbers[shares + row];
  return nextUnit(random) * both < upper ? row + 1 : row;
}
