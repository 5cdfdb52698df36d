/** A built program, by its folder: the modules the benchmark drives, and how it drives them. */
import { resolve } from 'node:path';
import { pathToFileURL } from 'node:url';

const MODULES = {
  readDesign: 'design/read-design.js',
  compileScene: 'scene/compile-scene.js',
  RegionGraph: 'scene/region-graph.js',
  mapMeasure: 'scene/map-measure.js',
  voxelMeasure: 'scene/map-measure.js',
  runBatches: 'engine/run-batches.js',
  openPool: 'engine/thread-pool.js',
  traceShare: 'engine/trace-share.js',
  CONTROL: 'engine/messages.js',
  grownBytes: 'kernel/batch-tally.js',
  BATCH_HISTORIES: 'tallies/run-tallies.js',
  createBatchTally: 'kernel/batch-tally.js',
  grownTally: 'kernel/batch-tally.js',
  FIGURE: 'tallies/run-tallies.js',
};

/** @throws Error when the folder holds no built program with these modules. */
export async function loadBuild(folder) {
  const build = { folder };
  for (const [name, file] of Object.entries(MODULES)) {
    const path = resolve(folder, file);
    const module = await import(pathToFileURL(path).href).catch((cause) => {
      throw new Error(`${path} cannot be loaded; \`npm run build\` makes it (${cause.message})`, { cause });
    });
    if (module[name] === undefined)
      throw new Error(`${path} has no ${name}: that build is too old or too new to compare with`);
    build[name] = module[name];
  }
  return build;
}

/** @throws Error with every fault of the design in one line each. */
export async function describe(build, file) {
  const reading = await build.readDesign(file);
  if (reading.ok) return reading.description;
  throw new Error(reading.faults.map(({ line, problem }) => `${file}:${line}: ${problem}`).join('\n'));
}

const MANY = 2 ** 30;
/** Batches claimed between two looks at the clock. */
const STRETCH = 8;
let runs = 0;

/** Contestant that does in this thread what each thread of a run does; knows the exit fraction of all it has traced. */
export function shareRunner(build, name, scene, seed) {
  const { CONTROL, BATCH_HISTORIES } = build;
  const control = new Int32Array(new SharedArrayBuffer(4 * CONTROL.COUNT));
  const grown = new SharedArrayBuffer(build.grownBytes(scene));
  const task = { runId: --runs, scene, grown, control, seed, histories: MANY };
  const exitPhotons = 2 * scene.slots + build.FIGURE.exitPhotons;
  const exits = exitCounter(BATCH_HISTORIES);
  const run = (seconds) => {
    const end = performance.now() + 1000 * seconds;
    let histories = 0;
    do {
      control[CONTROL.endOfRound] = control[CONTROL.nextBatch] + STRETCH;
      const { batches, defects } = build.traceShare(task);
      if (defects > 0) throw new Error(`${defects} histories ended in no fate`);
      for (const { vector } of batches) exits.add(vector[exitPhotons]);
      histories += STRETCH * BATCH_HISTORIES;
    } while (performance.now() < end);
    return histories;
  };
  return { name, run, exits };
}

/** Contestant that runs the whole engine on `threads` threads (0: in this one). */
export function engineRunner(build, name, scene, threads, seed) {
  let run = 0;
  return {
    name,
    run: async (seconds) => {
      const plan = { histories: MANY, precision: null, seconds, seed: `${seed}/${run++}`, threads };
      const { fold } = await build.runBatches(scene, plan);
      return fold.histories;
    },
  };
}

/** Exit fraction and its standard error, from the differences between batches. */
export function exitCounter(batchHistories) {
  let batches = 0;
  let sum = 0;
  let squares = 0;
  return {
    add(photons) {
      batches++;
      sum += photons;
      squares += photons * photons;
    },
    result() {
      const mean = sum / batches;
      const variance = Math.max(0, squares / batches - mean * mean) / (batches - 1);
      return {
        histories: batches * batchHistories,
        fraction: mean / batchHistories,
        standardError: Math.sqrt(variance) / batchHistories,
      };
    },
  };
}
