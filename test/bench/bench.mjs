/**
 * Speed, memory and fixed costs of the built program, on this machine, in about a minute. Nothing passes or fails on time; the two tracers of
 * the same box must agree, or the exit code is 1.
 *   node test/bench/bench.mjs [--json] [--against DIST] [--dist DIST] [--design FILE]
 * `--against` sets another build (its dist folder, with node_modules where it can find them) beside this one, in turns.
 */
import { existsSync } from 'node:fs';
import os from 'node:os';
import { join, relative } from 'node:path';
import { fileURLToPath } from 'node:url';
import { parseArgs } from 'node:util';
import { Worker } from 'node:worker_threads';
import { engineRunner, loadBuild } from './build.mjs';
import { arrayBytes, measureFixedCosts, measurePrecision, measureThreadStart, residentMb } from './costs.mjs';
import { race } from './race.mjs';
import { report } from './report.mjs';
import { paired, spread } from './statistics.mjs';

const here = (path) => fileURLToPath(new URL(path, import.meta.url));
const { values: options } = parseArgs({
  options: {
    json: { type: 'boolean', default: false },
    against: { type: 'string' },
    dist: { type: 'string', default: here('../../dist') },
    design: { type: 'string', default: here('../../geometries/two-bank-box-cell.yaml') },
  },
});
const WARM = 3;
const TOLERANCE = 4;
const PRECISION = 0.002;
const threads = os.availableParallelism();
const say = (text) => process.stderr.write(`${text}\n`);

if (options.against !== undefined && !existsSync(join(options.against, 'kernel/trace-batch.js'))) {
  say(`${options.against} holds no built program; name the dist folder of another build`);
  process.exit(2);
}
const loadedAt = performance.now();
const residentAtStart = residentMb();
const build = await loadBuild(options.dist);
const loadModules = performance.now() - loadedAt;
const machine = {
  node: process.version,
  v8: process.versions.v8,
  platform: `${os.platform()} ${os.arch()}`,
  cores: threads,
  model: os.cpus()[0]?.model.trim() ?? null,
  load: os.loadavg()[0],
};

say('fixed costs, time to a precision …');
const { scene, fixed } = await measureFixedCosts(build, options.design);
const residentWithScene = residentMb();
const threadStart = await measureThreadStart(build, scene, threads);
const precision = await measurePrecision(build, scene, threads, PRECISION);

say('one thread and all …');
const engine = await race(
  [...new Set([1, threads])].map((count) => engineRunner(build, `${count}`, scene, count, 'rate')),
  { warmSeconds: WARM, rounds: 6, seconds: 0.7 },
);

say('yardstick …');
const against = options.against === undefined ? [] : [options.against];
const builds = [options.dist, ...against];
const timing = { warmSeconds: WARM, rounds: 16, seconds: 0.25 };
const box = await inThread('./duel-thread.mjs', { design: null, builds, hand: true, timing });
const duel =
  against.length === 0
    ? null
    : await inThread('./duel-thread.mjs', { design: options.design, builds, hand: false, timing });

say('profile …');
const profile = await inThread('./profile-thread.mjs', {
  folder: options.dist,
  design: options.design,
  warmSeconds: WARM,
  seconds: 3,
});

const result = {
  machine: { ...machine, loadAtEnd: os.loadavg()[0] },
  design: relative(process.cwd(), options.design),
  rates: {
    lanes: Object.fromEntries(Object.entries(engine).map(([name, lane]) => [name, rates(lane)])),
    threads,
    speedUp: paired(engine[threads].wall, engine[1].wall),
  },
  yardstick: {
    hand: rates(box.hand),
    general: rates(box.this),
    ratio: paired(box.this.cpu, box.hand.cpu),
    agreement: agreement(box.this.exit, box.hand.exit),
  },
  against: duel === null ? null : { folder: options.against, ...comparison(duel), box: comparison(box) },
  precision,
  memory: {
    residentMb: { atStart: residentAtStart, withScene: residentWithScene, withThreads: precision.residentAfterMb },
    perThreadMb: (precision.residentAfterMb - residentWithScene) / threads,
    arrayBytes: arrayBytes(build, scene),
  },
  profile,
  fixed: { loadModules, ...fixed, startThreads: threadStart },
  seconds: performance.now() / 1000,
};
process.stdout.write(options.json ? `${JSON.stringify(result, null, 2)}\n` : report(result));

const agreements = [result.yardstick.agreement, result.against?.agreement, result.against?.box.agreement];
if (agreements.some((found) => found !== undefined && !found.agrees)) {
  say('\nTHE TRACERS DISAGREE: one of them is wrong, and no rate above is worth anything.');
  process.exitCode = 1;
}

function inThread(file, workerData) {
  return new Promise((resolve, reject) => {
    const worker = new Worker(new URL(file, import.meta.url), { workerData });
    worker.once('message', resolve);
    worker.once('error', reject);
  });
}

function rates({ wall, cpu, discarded }) {
  return { wall: spread(wall), cpu: spread(cpu), discarded };
}

function agreement(one, other) {
  const standardErrors = (one.fraction - other.fraction) / Math.hypot(one.standardError, other.standardError);
  return { exits: [one, other], standardErrors, agrees: Math.abs(standardErrors) <= TOLERANCE };
}

/** This build against the other. */
function comparison(lanes) {
  return {
    this: rates(lanes.this),
    other: rates(lanes.other),
    ratio: paired(lanes.this.cpu, lanes.other.cpu),
    agreement: agreement(lanes.this.exit, lanes.other.exit),
  };
}
