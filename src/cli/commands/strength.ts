import { availableParallelism } from 'node:os';
import { join } from 'node:path';
import { locateFaults, readDesign } from '../../design/read-design.js';
import { runFigures } from '../../outcome/figures.js';
import type { Figure } from '../../record/run-record.js';
import { lost, strengthPicture } from '../../report/dye/strength-picture.js';
import { csvText } from '../../run-folder/csv-text.js';
import { freePath } from '../../run-folder/run-folder-path.js';
import { slug } from '../../run-folder/slug.js';
import { writeFolder } from '../../run-folder/write-folder.js';
import { checkScene } from '../../scene/check-scene.js';
import { NothingTraced, traceDescription } from '../../trace/trace-design.js';
import { CommandFault } from '../command-fault.js';
import { designFault } from '../design-fault.js';
import { bestStrength } from '../dye/best-strength.js';
import { drawnFiles } from '../dye/drawn-files.js';
import { atStrength, strengthDial, strengthIn } from '../dye/strength-dial.js';
import { EXIT, type ExitCode } from '../exit-codes.js';
import { listenForInterrupt } from '../interrupt.js';
import { formatWithError, groupedCount, significant } from '../number-format.js';
import { checkOutputFolder, RESULTS } from '../output-folder.js';
import { print, tell } from '../output-stream.js';
import { safeText } from '../safe-text.js';
import { fitToStyle, styleFor } from '../terminal-style.js';
import { toolVersion } from '../tool-version.js';

export interface StrengthOptions {
  readonly turn?: string;
  readonly points: number;
  readonly histories: number;
  readonly seed?: string;
  readonly threads?: number;
  readonly out?: string;
  readonly files: boolean;
  readonly dial: Readonly<Record<string, string>>;
}

const DECADES = 3;
const INTERRUPT_NOTE =
  '\nStopping: strengths that are done will be kept. Ctrl-C again quits at once and keeps nothing.\n';

interface Traced {
  /** Of the strength in the design. */
  readonly factor: number;
  /** mmol/L, or the factor of a dye given by its absorption. */
  readonly strength: number;
  readonly dial: string;
  readonly exit: Figure;
  readonly efficiency: Figure;
  readonly absorbed: Figure;
  readonly warnings: readonly string[];
}

/** `stokeswell strength DESIGN`: exit fraction against the strength of the dye, over three decades about that of the design. */
export async function strengthCommand(file: string, options: StrengthOptions): Promise<ExitCode> {
  const reading = await readDesign(file, { dials: options.dial });
  if (!reading.ok) throw designFault(reading.faults);
  const dial = strengthDial(reading, options.dial, options.turn);
  const { faults } = checkScene(reading.description);
  if (faults.some(({ severity }) => severity === 'error')) throw designFault(locateFaults(reading, faults));
  if (options.files) await checkOutputFolder(options.out);
  const { description } = reading;
  const seed = options.seed ?? description.defaults.seed ?? '1';
  const threads = options.threads ?? availableParallelism();
  const molar = description.media.get(dial.medium)?.dyes.find(({ name }) => name === dial.dye)?.concentration ?? null;
  const style = styleFor(process.stdout.isTTY === true, process.env);
  const plain = (text: string) => print(fitToStyle(text, style));
  plain(
    `${style.bold(safeText(description.title))}: ${safeText(dial.dye)} in ${safeText(dial.medium)}, dial ${safeText(dial.name)}\n` +
      `${options.points} strengths over ${DECADES} decades, ${groupedCount(options.histories)} histories each, seed ${safeText(seed)}, ${threads} threads\n\n` +
      `${style.dim(HEADING)}\n`,
  );

  const interrupt = listenForInterrupt(() => tell(INTERRUPT_NOTE));
  const done: Traced[] = [];
  try {
    for (let i = 0; i < options.points && !interrupt.signal.aborted; i++) {
      const factor = Number((10 ** (DECADES * (i / (options.points - 1) - 0.5))).toPrecision(6));
      const turned = atStrength(reading, options.dial, dial, factor);
      const plan = {
        histories: options.histories,
        precision: null,
        seconds: null,
        seed,
        threads,
        signal: interrupt.signal,
      };
      const result = await traceDescription(turned.description, plan);
      if (result.stopReason === 'interrupted') break;
      const figures = runFigures(result, []);
      const strength = molar === null ? factor : 1e3 * strengthIn(turned.description, dial.medium, dial.dye);
      const said = [...turned.warnings, ...result.warnings].filter(({ problem }) => !problem.startsWith('voxels'));
      const traced: Traced = {
        factor,
        strength,
        dial: `(${dial.text}) * ${factor}`,
        exit: figures.exitPhotonFraction,
        efficiency: figures.opticalEfficiency,
        absorbed: figures.pumpAbsorbedFraction,
        warnings: [...new Set(said.map(({ problem }) => problem))],
      };
      done.push(traced);
      plain(`${rowText(traced, style.plusMinus)}\n`);
      await new Promise(setImmediate);
    }
  } catch (error) {
    if (!(error instanceof NothingTraced)) throw error;
  } finally {
    interrupt.release();
  }
  if (done.length === 0)
    throw new CommandFault(EXIT.killed, 'Interrupted before any strength was done; nothing was written.');

  const unit = molar === null ? 'times that of the design' : 'mmol/L';
  const points = done.map(({ strength, exit, absorbed }) => ({
    strength,
    exit: exit.value ?? 0,
    exitError: exit.standardError,
    unabsorbed: 1 - (absorbed.value ?? 0),
  }));
  const best = bestStrength(points);
  const now = molar === null ? 1 : 1e3 * molar;
  const told = bestWords(best, unit, now);
  plain(
    `\n${told}\n${newWarnings(done, unit)
      .map((line) => `${line}\n`)
      .join('')}`,
  );
  if (options.files) {
    const folder =
      options.out ??
      (await freePath(join(RESULTS, slug(description.title, 'design')), `strength-seed-${slug(seed, 'other')}`));
    const picture = strengthPicture(points, {
      design: description.title,
      dye: dial.dye,
      unit,
      best: told,
      band: [best.from, best.to],
      marks: [{ x: now, words: `the design, ${significant(now, 3)}` }],
      foot: `${groupedCount(options.histories)} histories a strength, seed ${seed}, the same at each. stokeswell ${toolVersion()}.`,
    });
    const about = {
      tool: { name: 'stokeswell', version: toolVersion() },
      design: description.title,
      file,
      dial: dial.name,
      dye: dial.dye,
      medium: dial.medium,
      unit,
    };
    const json = {
      ...about,
      histories: options.histories,
      seed,
      whole: done.length === options.points,
      best,
      points: done,
    };
    const names = await writeFolder(folder, [
      [
        'strength.csv',
        csvText(
          COLUMNS,
          done.map((one, i) => csvRow(one, lost(points[i]))),
        ),
      ],
      ['strength.json', `${JSON.stringify(json, null, 2)}\n`],
      ...(await drawnFiles([['strength', picture]])),
    ]);
    print(`\n${safeText(folder)}: ${names.join(', ')}\n`);
  }
  return done.length < options.points ? EXIT.interrupted : EXIT.ok;
}

const HEADING = '  strength    exit photons per pump photon    not absorbed    absorbed, not out';

function rowText({ strength, exit, absorbed }: Traced, plusMinus: string): string {
  const [out, taken] = [exit.value ?? 0, absorbed.value ?? 0];
  const percent = (share: number) => `${(100 * share).toFixed(2)} %`;
  return `${significant(strength, 3).padStart(10)}    ${formatWithError(out, exit.standardError, '', plusMinus).padStart(28)}    ${percent(1 - taken).padStart(12)}    ${percent(Math.max(0, taken - out)).padStart(17)}`;
}

function bestWords({ at, from, to, edge }: ReturnType<typeof bestStrength>, unit: string, now: number): string {
  const number = (value: number) => significant(value, 3);
  const range = from === to ? '' : ` Between ${number(from)} and ${number(to)} no difference is seen.`;
  const end = edge ? ' It lies at the end of the strengths tried: start from another strength.' : '';
  return `Most light comes out at about ${number(at)} ${unit} (the design has ${number(now)}).${range}${end}`;
}

/** What is said of strong points only, and from where on. */
function newWarnings(done: readonly Traced[], unit: string): string[] {
  const all = [...new Set(done.flatMap(({ warnings }) => warnings))];
  return all.flatMap((problem) => {
    const where = done.filter(({ warnings }) => warnings.includes(problem)).map(({ strength }) => strength);
    if (where.length === done.length) return [`Warning: ${safeText(problem)}`];
    return [
      `Warning from ${significant(Math.min(...where), 3)} to ${significant(Math.max(...where), 3)} ${unit}: ${safeText(problem)}`,
    ];
  });
}

const COLUMNS = [
  'strength',
  'dial',
  'exit_photon_fraction',
  'exit_photon_fraction_error',
  'optical_efficiency',
  'optical_efficiency_error',
  'pump_absorbed_fraction',
  'pump_absorbed_fraction_error',
  'absorbed_not_out_fraction',
];

const csvRow = ({ strength, dial, exit, efficiency, absorbed }: Traced, lostShare: number) => [
  strength,
  dial,
  exit.value,
  exit.standardError,
  efficiency.value,
  efficiency.standardError,
  absorbed.value,
  absorbed.standardError,
  lostShare,
];
