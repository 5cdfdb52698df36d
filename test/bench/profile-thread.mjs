/**
 * Where the time of a one-thread run goes, by the optimiser's own sampling profiler. A thread of its own, profiled from its first
 * history on: only code compiled under the profiler tells inlined functions apart. Takes { folder, design, warmSeconds, seconds }.
 */
import { readFileSync } from 'node:fs';
import { Session } from 'node:inspector/promises';
import { resolve } from 'node:path';
import { pathToFileURL } from 'node:url';
import { parentPort, workerData } from 'node:worker_threads';
import { describe, loadBuild } from './build.mjs';

const HISTORIES = 200_000;
const SAMPLING_MICROSECONDS = 500;

/** Step of each file of the program; the first that fits. */
const STEPS = [
  [/^kernel\/launch|^numerics\/(sobol|sample-table)/, 'launch'],
  [/^kernel\/trace-batch/, 'flight and boundaries'],
  [/^kernel\/next-boundary|^scene\//, 'oblique and curved surfaces, regions'],
  [/^kernel\/split|^optics\//, 'splitting light at interfaces'],
  [/^kernel\/scatter/, 'scattering surfaces'],
  [/^kernel\/(record|close)|^tallies\//, 'recording maps and fates'],
  [/^numerics\/random|seedrandom/, 'random numbers'],
  [/^engine\//, 'handing out and folding batches'],
  [/^kernel\//, 'other files of the kernel'],
];
const REST = 'rest';

const { folder, design, warmSeconds, seconds } = workerData;
const build = await loadBuild(folder);
const { scene } = build.compileScene(await describe(build, design));
const session = new Session();
session.connect();
await session.post('Profiler.enable');
await session.post('Profiler.setSamplingInterval', { interval: SAMPLING_MICROSECONDS });
const warm = await profiledRuns(warmSeconds);
const { profile, histories } = await profiledRuns(seconds);
session.disconnect();
parentPort.postMessage({ ...shares(profile), histories, discarded: warm.histories });

async function profiledRuns(atLeast) {
  await session.post('Profiler.start');
  const end = performance.now() + 1000 * atLeast;
  let histories = 0;
  do {
    const plan = { histories: HISTORIES, precision: null, seconds: null, seed: `profile/${histories}`, threads: 0 };
    histories += (await build.runBatches(scene, plan)).fold.histories;
  } while (performance.now() < end);
  return { ...(await session.post('Profiler.stop')), histories };
}

/** Shares of the samples by step, and within the kernel's main file by its own headings (`// ---- …`). */
function shares({ nodes, samples }) {
  const root = pathToFileURL(`${resolve(folder)}/`).href;
  const parents = new Map(nodes.flatMap(({ id, children = [] }) => children.map((child) => [child, id])));
  const byId = new Map(nodes.map((node) => [node.id, node]));
  const hits = new Map();
  for (const id of samples) hits.set(id, (hits.get(id) ?? 0) + 1);
  const steps = new Map();
  const headings = new Map();
  const headingOf = headingsOf(resolve(folder, 'kernel/trace-batch.js'));
  let total = 0;
  const add = (map, key, count) => map.set(key, (map.get(key) ?? 0) + count);
  for (const node of nodes) {
    const count = hits.get(node.id) ?? 0;
    if (count === 0 || node.callFrame.functionName === '(idle)') continue;
    total += count;
    const file = fileOf(node, root);
    add(steps, stepOf(file), count);
    if (file !== 'kernel/trace-batch.js') continue;
    for (const { line, ticks } of node.positionTicks ?? []) add(headings, headingOf(line), ticks);
  }
  const kernelTicks = [...headings.values()].reduce((a, b) => a + b, 0);
  const kernelShare = (steps.get('flight and boundaries') ?? 0) / total;
  const ranked = (map, scale) =>
    [...map].map(([name, count]) => ({ name, share: count * scale })).sort((a, b) => b.share - a.share);
  return { samples: total, steps: ranked(steps, 1 / total), within: ranked(headings, kernelShare / kernelTicks) };

  /** File of a function of the program; built-in functions count where they were called. */
  function fileOf(node, base) {
    for (let at = node; at !== undefined; at = byId.get(parents.get(at.id))) {
      const { url, functionName, scriptId } = at.callFrame;
      if (url.startsWith(base)) return url.slice(base.length);
      if (url !== '') return url;
      if (functionName.startsWith('(')) return functionName;
      // Code written at run time has a script but no file.
      if (scriptId !== '0') return `kernel/trace-batch written at run time`;
    }
    return REST;
  }
}

function stepOf(file) {
  if (file === '(garbage collector)') return 'garbage collection';
  return STEPS.find(([pattern]) => pattern.test(file))?.[1] ?? REST;
}

function headingsOf(file) {
  const lines = readFileSync(file, 'utf8').split('\n');
  return (line) => {
    for (let at = line - 1; at >= 0; at--) {
      const heading = /^\s*\/\/ ---- (.+?):?$/.exec(lines[at] ?? '');
      if (heading !== null) return heading[1];
    }
    return 'start of a history';
  };
}
