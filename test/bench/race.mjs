/** The optimiser works beside the program, takes about half a second a time, longer on a busy machine, and comes more than once. */
const WARM_TURN = 0.5;
const LONGEST_WARM_UP = 5;
/** Rates of two turns in a row that differ by less count as settled. */
const SETTLED = 0.1;

/**
 * Runs programs in turns, so that whatever else the machine does meets all of them alike.
 *
 * A contestant has a `name` and `run(seconds)`, which traces for about that long and gives back (a promise of) the histories traced. Rates
 * are in thousands of histories per second of wall time and per second of processor time of the process, threads together.
 */
export async function race(contestants, { warmSeconds, rounds, seconds }) {
  const lanes = contestants.map(({ name, run }) => ({ name, run, wall: [], cpu: [], discarded: null }));
  const warm = lanes.map(() => []);
  for (let spent = 0; spent < warmSeconds || (spent < LONGEST_WARM_UP && !warm.every(isSettled)); spent += WARM_TURN) {
    for (const [i, lane] of lanes.entries()) warm[i].push(await measure(lane, WARM_TURN));
  }
  for (const [i, lane] of lanes.entries()) {
    lane.discarded = {
      histories: warm[i].reduce((sum, { histories }) => sum + histories, 0),
      seconds: warm[i].reduce((sum, slice) => sum + slice.seconds, 0),
      firstRate: warm[i][0].wall,
      lastRate: warm[i].at(-1).wall,
    };
  }
  for (let round = 0; round < rounds; round++) {
    for (const lane of round % 2 === 0 ? lanes : lanes.toReversed()) {
      const { wall, cpu } = await measure(lane, seconds);
      lane.wall.push(wall);
      lane.cpu.push(cpu);
    }
  }
  return Object.fromEntries(lanes.map(({ name, wall, cpu, discarded }) => [name, { wall, cpu, discarded }]));
}

function isSettled(turns) {
  const [one, other] = turns.slice(-2);
  return Math.abs(one.cpu / other.cpu - 1) < SETTLED;
}

async function measure({ run }, seconds) {
  const cpuBefore = process.cpuUsage();
  const before = performance.now();
  const histories = await run(seconds);
  const elapsed = (performance.now() - before) / 1000;
  const { user, system } = process.cpuUsage(cpuBefore);
  return { histories, seconds: elapsed, wall: histories / elapsed / 1e3, cpu: (histories / (user + system)) * 1e3 };
}
