/** What the hand-written tracer of the box reads and counts into. */
const CELLS = { wavelengths: 351, exit: [40, 16], voxels: 40 * 16 * 16, polar: 45, azimuth: 72, counts: 64, path: 100 };
const FATES = 18;
const FIGURES = 16;
/** Absorption, emission and weights of light at 445, 445.5 … 620 nm. The observer is a rough stand-in: only its cost counts here. */
export function spectralTables() {
  const nm = Float64Array.from({ length: CELLS.wavelengths }, (_, i) => 445 + 0.5 * i);
  const bell = (at, width) => nm.map((x) => Math.exp(-((x - at) ** 2) / (2 * width * width)));
  const shortSide = (x) => (x < 470 ? 8000 : 8000 + (x - 470) * 2800);
  const molar = nm.map((x) => (x < 500 ? shortSide(x) : 92000 * Math.exp(-(((x - 500) / 16) ** 2))));
  const weight = nm.map((x) => (x < 490 ? 0 : Math.exp(-(((x - 525) / 20) ** 2))));
  return {
    nm,
    freePath: molar.map((epsilon) => 1 / (Math.LN10 * 0.0002 * 0.1 * epsilon)),
    energy: nm.map((x) => Math.round((2 ** 22 * 445) / x)),
    observerX: bell(600, 38).map((x, i) => 1.06 * x + 0.36 * bell(446, 20)[i]),
    observerY: bell(557, 45),
    observerZ: bell(450, 22).map((z) => 1.8 * z),
    ...aliasTable(weight),
  };
}

/** Walker, ACM Trans. Math. Softw. 3 253 (1977). */
function aliasTable(weight) {
  const total = weight.reduce((a, b) => a + b);
  const keep = weight.map((w) => (w * weight.length) / total);
  const other = Int32Array.from(weight.keys());
  const small = [...weight.keys()].filter((i) => keep[i] < 1);
  const large = [...weight.keys()].filter((i) => keep[i] >= 1);
  while (small.length > 0 && large.length > 0) {
    const poor = small.pop();
    const rich = large.at(-1);
    other[poor] = rich;
    keep[rich] -= 1 - keep[poor];
    if (keep[rich] < 1) small.push(large.pop());
  }
  for (const i of [...small, ...large]) keep[i] = 1;
  return { keep, other };
}

export function emptyTally() {
  const doubles = (length) => new Float64Array(length);
  const exitCells = CELLS.exit[0] * CELLS.exit[1];
  const half = () => ({
    exitMap: doubles(exitCells),
    arrivingMap: doubles(2 * exitCells),
    pumpVoxels: doubles(CELLS.voxels),
    allVoxels: doubles(CELLS.voxels),
  });
  return {
    vector: doubles(2 * FATES + FIGURES),
    before: doubles(2 * FATES + FIGURES),
    groupSquares: doubles(2 * FATES + FIGURES),
    groupCross: doubles(FIGURES * FIGURES),
    halves: [half(), half()],
    launched: doubles(CELLS.wavelengths),
    absorbedPump: doubles(CELLS.wavelengths),
    emitted: doubles(CELLS.wavelengths),
    exitSpectrum: doubles(CELLS.wavelengths),
    angles: doubles(CELLS.polar * CELLS.azimuth),
    absorptionCounts: doubles(CELLS.counts),
    reabsorptionCounts: doubles(CELLS.counts),
    pathCounts: doubles(CELLS.path),
  };
}

/** Adds the squares of what `histories` histories have added since the last call. */
export function closeGroup({ vector, before, groupSquares, groupCross }, histories) {
  for (let i = 0; i < vector.length; i++) {
    const x = vector[i] - before[i];
    groupSquares[i] += (x * x) / histories;
    before[i] = x;
  }
  for (let i = 0; i < FIGURES; i++) {
    const x = before[2 * FATES + i] / histories;
    for (let j = 0; j < FIGURES; j++) groupCross[i * FIGURES + j] += x * before[2 * FATES + j];
  }
  before.set(vector);
}
