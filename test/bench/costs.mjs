/** What a run costs besides tracing: time before it starts and after it ends, and memory. */
import { describe, engineRunner } from './build.mjs';
import { spread } from './statistics.mjs';

const REPEATS = 5;
const SEEDS = 4;
const MEGABYTE = 2 ** 20;

/** Resident set of the process, all threads, MB. */
export const residentMb = () => process.memoryUsage.rss() / MEGABYTE;

const clock = async (work) => {
  const before = performance.now();
  const value = await work();
  return { value, ms: performance.now() - before };
};

/** First time (code not yet compiled) and median of later times, ms. */
async function repeated(work) {
  const first = await clock(work);
  const later = [];
  for (let i = 0; i < REPEATS; i++) later.push((await clock(work)).ms);
  return { value: first.value, ms: { first: first.ms, later: spread(later).median } };
}

/** Reads and compiles the design, and measures its maps. */
export async function measureFixedCosts(build, design) {
  const read = await repeated(() => describe(build, design));
  const compile = await repeated(() => build.compileScene(read.value));
  const measure = await repeated(() => {
    const graph = new build.RegionGraph(compile.value.scene);
    for (const plan of compile.value.legend.recorders) build.mapMeasure(plan, graph);
    build.voxelMeasure(compile.value);
  });
  return {
    scene: compile.value.scene,
    fixed: { readDesign: read.ms, compileScene: compile.ms, measureMaps: measure.ms },
  };
}

/** Starts `threads` threads, ms until each has taken a task and given it back; and the same again once they run. */
export async function measureThreadStart(build, scene, threads) {
  const control = new Int32Array(new SharedArrayBuffer(4 * build.CONTROL.COUNT));
  control[build.CONTROL.stop] = 1;
  const grown = new SharedArrayBuffer(build.grownBytes(scene));
  const task = { runId: -1, scene, grown, control, seed: 'bench', histories: 1 };
  const round = async () => {
    const pool = build.openPool(threads);
    await pool.run(Array.from({ length: threads }, () => task));
  };
  return (await repeated(round)).ms;
}

/** Time to a precision of the exit fraction: by threads that have never traced, then by warm ones with other seeds. */
export async function measurePrecision(build, scene, threads, precision) {
  const run = async (seed) => {
    const plan = { histories: 2 ** 30, precision, seconds: null, seed, threads };
    const { fold, seconds } = await build.runBatches(scene, plan);
    return { histories: fold.histories, seconds, reached: fold.exitPrecision() };
  };
  const cold = await run('precision/cold');
  const residentAfterMb = residentMb();
  await engineRunner(build, 'warm', scene, threads, 'precision/warm').run(2);
  const warm = [];
  for (let i = 0; i < SEEDS; i++) warm.push(await run(`precision/${i}`));
  return {
    precision,
    threads,
    cold,
    warm: { histories: spread(warm.map((r) => r.histories)), seconds: spread(warm.map((r) => r.seconds)) },
    residentAfterMb,
  };
}

/** Bytes of the arrays a run keeps. */
export function arrayBytes(build, scene) {
  const sum = (values) => values.reduce((total, { byteLength = 0 }) => total + byteLength, 0);
  const grownBytes = build.grownBytes(scene);
  const batch = build.createBatchTally(scene, build.grownTally(scene, new ArrayBuffer(grownBytes)));
  return { scene: sum(Object.values(scene)), talliesPerThread: grownBytes, batchPerThread: sum(Object.values(batch)) };
}
