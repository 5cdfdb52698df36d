/** The benchmark's results in words. */
/** Measured once on two x86-64 cores, 15 alternating runs of g++ 12 -O3 and Node 20, processor time: quartiles 0.65 to 0.71. */
const PLACING = `To place it: the hand-written tracer ran at about 0.7 of the same program in C++, and a leaner pair in laboratory
    trials at 0.92 (quartiles 0.87 to 0.96). Both are figures of other days, not of this run.`;
const BUSY = 0.5;

const whole = (value) => value.toFixed(0);
const two = (value) => value.toFixed(2);
const range = ({ median, least, largest }, show) => `${show(median)} (${show(least)}–${show(largest)})`;
const line = (label, text) => `  ${label.padEnd(36)} ${text}`;
const kilobytes = (bytes) => `${(bytes / 1024).toFixed(0)} kB`;
const percent = (share) => `${(100 * share).toFixed(1).padStart(5)} %`;

/** @returns the whole report, ending in a line feed. */
export function report(result) {
  const { machine, design, seconds } = result;
  const load = `load ${machine.load.toFixed(1)} at the start, ${machine.loadAtEnd.toFixed(1)} at the end`;
  return [
    `Node ${machine.node} (V8 ${machine.v8}), ${machine.platform}, ${machine.cores} cores, ${machine.model ?? 'model unknown'}; ${load}`,
    `Design ${design}. k/s: thousand histories per second; median (least–largest). Took ${whole(seconds)} s.`,
    ...(machine.load > BUSY * machine.cores
      ? [
          'The machine was busy with other work: wall rates, speed-up and seconds suffer; trust processor seconds and paired ratios.',
        ]
      : []),
    '',
    ...ratesLines(result.rates),
    '',
    ...yardstickLines(result.yardstick),
    '',
    ...(result.against === null ? [] : [...againstLines(result.against), '']),
    ...precisionLines(result.precision),
    '',
    ...memoryLines(result.memory, result.precision.threads),
    '',
    ...profileLines(result.profile),
    '',
    ...fixedLines(result.fixed, result.precision.threads),
    '',
  ].join('\n');
}

const rate = ({ wall, cpu }) => `${range(wall, whole)} k/s wall, ${range(cpu, whole)} k per processor second`;

function discarded(lanes) {
  return lanes.map(({ discarded: { seconds, firstRate, lastRate } }) => {
    return `${seconds.toFixed(1)} s (${whole(firstRate)} k/s in the first half second, ${whole(lastRate)} in the last)`;
  });
}

function ratesLines({ lanes, threads, speedUp }) {
  const all = Object.entries(lanes);
  return [
    'Histories, whole engine, in turns',
    ...all.map(([name, lane]) => line(name === '1' ? 'one thread' : `${name} threads`, rate(lane))),
    ...(threads === 1 ? [] : [line('speed-up', range(speedUp, two))]),
    line('warm-up discarded', discarded(all.map(([, lane]) => lane)).join('; ')),
  ];
}

function agreementLine({ exits, standardErrors, agrees }) {
  const shown = exits.map(({ fraction, standardError }) => `${fraction.toFixed(5)} ± ${standardError.toFixed(5)}`);
  const verdict = agrees ? 'agree' : 'DISAGREE';
  return line(
    'exit fractions',
    `${shown.join(' and ')}, ${two(Math.abs(standardErrors))} standard errors apart: they ${verdict}`,
  );
}

function yardstickLines({ hand, general, ratio, agreement }) {
  return [
    'Yardstick: the fixed box of test/bench/box-cell.mjs, one thread, in turns',
    line('general kernel', rate(general)),
    line('hand-written for this box', rate(hand)),
    line('general / hand, paired', `${range(ratio, two)}`),
    `    ${PLACING}`,
    agreementLine(agreement),
    line('warm-up discarded', discarded([general, hand]).join('; ')),
  ];
}

function againstLines({ folder, box, ...design }) {
  const lines = (what, { this: mine, other, ratio, agreement }) => [
    line(`${what}: this build`, rate(mine)),
    line(`${what}: other build`, rate(other)),
    line('this / other, paired', range(ratio, two)),
    agreementLine(agreement),
  ];
  return [`Against ${folder}, one thread, in turns`, ...lines('design', design), ...lines('box', box)];
}

function precisionLines({ precision, threads, cold, warm }) {
  const runs = warm.seconds.values.length;
  return [
    `To ${(100 * precision).toFixed(1)} % relative standard error of the exit fraction, ${threads} threads`,
    line(`warm, ${runs} seeds`, `${range(warm.histories, whole)} histories, ${range(warm.seconds, two)} s`),
    line('threads that never traced before', `${cold.histories} histories, ${two(cold.seconds)} s`),
  ];
}

function memoryLines({ residentMb, perThreadMb, arrayBytes }, threads) {
  const { atStart, withScene, withThreads } = residentMb;
  return [
    'Memory',
    line('resident set', `${whole(atStart)} MB at the start, ${whole(withScene)} with program and scene,`),
    line('', `${whole(withThreads)} after a run on ${threads} threads: ${whole(perThreadMb)} MB a thread`),
    line('arrays of the scene, shared', kilobytes(arrayBytes.scene)),
    line(
      'tallies, each thread',
      `${kilobytes(arrayBytes.talliesPerThread)}, and ${kilobytes(arrayBytes.batchPerThread)} of the batch in hand`,
    ),
  ];
}

function profileLines({ steps, within, samples, histories }) {
  const inside = within.map(({ name, share }) => `    ${percent(share)}  ${name}`);
  return [
    `Share of time in one thread (${samples} samples, ${histories} histories; approximate)`,
    ...steps.flatMap(({ name, share }) => [
      `  ${percent(share)}  ${name}`,
      ...(name === 'flight and boundaries' && inside.length > 1 ? inside : []),
    ]),
  ];
}

function fixedLines({ loadModules, startThreads, ...stages }, threads) {
  const names = {
    readDesign: 'read the design',
    compileScene: 'compile the scene',
    measureMaps: 'measure the cells of its maps',
  };
  const show = ({ first, later }) => `${first.toFixed(1)} ms the first time, ${later.toFixed(1)} later`;
  const { first, later } = startThreads;
  return [
    'Fixed costs',
    line('load the program', `${whole(loadModules)} ms`),
    ...Object.entries(names).map(([stage, name]) => line(name, show(stages[stage]))),
    line(`start ${threads} threads`, `${whole(first)} ms; a task there and back once they run ${two(later)} ms`),
  ];
}
