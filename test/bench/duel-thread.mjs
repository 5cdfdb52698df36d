/**
 * One thread's rates, in a thread of its own so that the optimiser starts from nothing: the hand-written box against the general kernel,
 * and builds against each other. Takes { design: file or null for the box, builds: [folder], hand, timing }; posts the race's result.
 */
import { parentPort, workerData } from 'node:worker_threads';
import { boxCell } from './box-cell.mjs';
import { describe, exitCounter, loadBuild, shareRunner } from './build.mjs';
import { BATCH, createHandBox } from './hand-box.mjs';
import { race } from './race.mjs';

const { design, builds, hand, timing } = workerData;
const contestants = hand ? [handRunner()] : [];
for (const [i, folder] of builds.entries()) {
  const build = await loadBuild(folder);
  const description = design === null ? boxCell : await describe(build, design);
  contestants.push(shareRunner(build, i === 0 ? 'this' : 'other', build.compileScene(description).scene, 'bench'));
}
const lanes = await race(contestants, timing);
for (const { name, exits } of contestants) lanes[name].exit = exits.result();
parentPort.postMessage(lanes);

function handRunner() {
  const trace = createHandBox();
  const exits = exitCounter(BATCH);
  let batch = 0;
  const run = (seconds) => {
    const end = performance.now() + 1000 * seconds;
    let histories = 0;
    do {
      for (let i = 0; i < 8; i++) exits.add(trace(batch++));
      histories += 8 * BATCH;
    } while (performance.now() < end);
    return histories;
  };
  return { name: 'hand', run, exits };
}
