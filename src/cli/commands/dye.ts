import { join } from 'node:path';
import type { DissolvedDye, MediumDescription } from '../../design/description.js';
import { readDesign, type SoundDesign } from '../../design/read-design.js';
import { dyeNames } from '../../materials/library.js';
import { type DyeSheet, dyeSheet } from '../../outcome/dye-sheet.js';
import { guessStrength } from '../../outcome/guess-strength.js';
import { emissionWeights } from '../../photophysics/emission-weights.js';
import type { StrengthGuess } from '../../photophysics/first-strength.js';
import { dyePathPicture, dyeSpectraPicture } from '../../report/dye/dye-pictures.js';
import { csvText } from '../../run-folder/csv-text.js';
import { freePath } from '../../run-folder/run-folder-path.js';
import { slug } from '../../run-folder/slug.js';
import { type NamedFile, writeFolder } from '../../run-folder/write-folder.js';
import { cellPaths } from '../../scene/cell-paths.js';
import { CommandFault } from '../command-fault.js';
import { designFault } from '../design-fault.js';
import { type Cuvette, readCuvette } from '../dye/cuvette.js';
import { drawnFiles } from '../dye/drawn-files.js';
import { dyeLines, guessLines, strengthText } from '../dye/dye-lines.js';
import { quantityOption } from '../dye/quantity-option.js';
import { atStrength, strengthDial } from '../dye/strength-dial.js';
import { unknownNameFault } from '../dye/unknown-name.js';
import { yieldAt } from '../dye/yield-at.js';
import { EXIT, type ExitCode } from '../exit-codes.js';
import { faultLines } from '../fault-lines.js';
import { labelled } from '../ledger/labelled.js';
import { significant } from '../number-format.js';
import { checkOutputFolder, RESULTS } from '../output-folder.js';
import { print } from '../output-stream.js';
import { safeText } from '../safe-text.js';
import { fitToStyle, styleFor } from '../terminal-style.js';
import { toolVersion } from '../tool-version.js';

export interface DyeOptions {
  readonly strength?: string;
  readonly path?: string;
  readonly pump?: string;
  readonly ph?: string;
  readonly out?: string;
  readonly files: boolean;
  readonly dial: Readonly<Record<string, string>>;
}

const PUMP_NM = 445;
const PATH_MM = 10;
const STRENGTH = '0.1 mmol/L';
const LONGEST_PATH_MM = 10_000;

/** One dye to be told of. */
interface Subject {
  readonly title: string;
  readonly folder: readonly [root: string, name: string];
  readonly medium: MediumDescription;
  readonly dye: DissolvedDye;
  readonly pumpNm: number;
  readonly pathMm: number;
  readonly guess: StrengthGuess | null;
  /** What the guess rests on. */
  readonly way: string;
  readonly warnings: readonly string[];
}

/** `stokeswell dye DYE [SOLVENT]` or `stokeswell dye DESIGN [MEDIUM]`: a dye in its liquid, before any tracing. */
export async function dyeCommand(what: string, medium: string | undefined, options: DyeOptions): Promise<ExitCode> {
  if (options.files) await checkOutputFolder(options.out);
  const subjects = isDesign(what) ? await ofDesign(what, medium, options) : [ofLibrary(what, medium, options)];
  const style = styleFor(process.stdout.isTTY === true, process.env);
  const blocks = subjects.map((subject) => {
    const strength = strengthText(subject.dye.concentration);
    const sheet = dyeSheet(subject.medium, subject.dye, subject.pumpNm, subject.pathMm);
    const guess =
      subject.guess === null
        ? []
        : guessLines(subject.guess, guessText(subject.dye, subject.guess), subject.way, style);
    const warnings = labelled('Warnings', subject.warnings, { ...style, bold: style.warn });
    return { subject, sheet, strength, text: [...dyeLines(sheet, strength, style), ...guess, ...warnings].join('\n') };
  });
  print(fitToStyle(`${blocks.map(({ text }) => text).join('\n\n')}\n`, style));
  if (!options.files) return EXIT.ok;
  const [root, name] = subjects[0].folder;
  const folder = options.out ?? (await freePath(root, name));
  const files: NamedFile[] = [];
  for (const [i, { subject, sheet, strength }] of blocks.entries()) {
    files.push(
      ...(await filesOf(subject, sheet, strength, blocks.length > 1 ? `${slug(sheet.dye, 'dye')}-${i + 1}-` : '')),
    );
  }
  const names = await writeFolder(folder, files);
  print(`\n${safeText(folder)}: ${names.join(', ')}\n`);
  return EXIT.ok;
}

/** Dyes have plain names; files have an ending or a folder. */
const isDesign = (what: string): boolean => !dyeNames().includes(what) && /[./\\]/.test(what);

function ofLibrary(dye: string, solvent: string | undefined, options: DyeOptions): Subject {
  if (Object.keys(options.dial).length > 0) {
    throw new CommandFault(
      EXIT.fault,
      '--dial turns a dial of a design; a dye of the library has --strength and --path.',
    );
  }
  const pumpNm = options.pump === undefined ? PUMP_NM : wavelengthOption(options.pump);
  const pathMm = options.path === undefined ? PATH_MM : pathOption(options.path);
  const strength = options.strength ?? STRENGTH;
  const common = { dye, solvent, pH: options.ph, pathMm, pumpNm };
  const cuvette = readCuvette({ ...common, strength });
  const empty = !(cuvette.dye.concentration !== null && cuvette.dye.concentration > 0);
  return {
    title: dye,
    folder: [RESULTS, `dye-${slug(dye, 'dye')}-${slug(cuvette.medium.name, 'medium')}`],
    ...cuvette,
    pumpNm,
    pathMm,
    guess: empty
      ? null
      : guessIn(cuvette, pumpNm, pathMm, (times) => readCuvette({ ...common, strength: `(${strength}) * ${times}` })),
    way: 'it knows one crossing of the pump and emitted paths as long on average; a cell with walls: stokeswell dye DESIGN',
  };
}

function guessIn(
  { dye }: Cuvette,
  wavelengthNm: number,
  pathMm: number,
  read: (times: number) => Cuvette,
): StrengthGuess {
  const paths = { pumps: [{ share: 1, wavelengthNm, pathMm }], emittedPathMm: pathMm };
  return guessStrength(
    dye,
    paths,
    yieldAt((times) => read(times).dye.quantumYield, dye.quantumYield),
  );
}

async function ofDesign(file: string, name: string | undefined, options: DyeOptions): Promise<Subject[]> {
  for (const own of ['strength', 'ph'] as const) {
    if (options[own] !== undefined) {
      throw new CommandFault(EXIT.fault, `--${own} is for a dye of the library. Of a design, turn a dial with --dial.`);
    }
  }
  const reading = await readDesign(file, { dials: options.dial });
  if (!reading.ok) throw designFault(reading.faults);
  const { description } = reading;
  const used = [...new Set(description.parts.map(({ medium }) => medium))].flatMap(
    (one) => description.media.get(one) ?? [],
  );
  const dyed = used.filter(({ dyes }) => dyes.length > 0);
  const medium = name === undefined ? dyed[0] : dyed.find((one) => one.name === name);
  if (medium === undefined)
    throw unknownNameFault(
      'medium with a dye',
      name ?? '',
      dyed.map((one) => one.name),
    );
  const pumpNm = options.pump === undefined ? description.pumps[0].wavelengthNm : wavelengthOption(options.pump);
  return medium.dyes.map((dye): Subject => {
    const { nm, weights } = emissionWeights(dye.emission, 1);
    const meanNm = nm.reduce((sum, at, i) => sum + at * weights[i], 0);
    const paths = cellPaths(description, medium, meanNm);
    const crossing = paths.pumps.reduce((sum, { share, pathMm }) => sum + share * pathMm, 0);
    const yields = yieldsOf(reading, options.dial, medium.name, dye);
    return {
      title: description.title,
      folder: [join(RESULTS, slug(description.title, 'design')), `dye-${slug(medium.name, 'medium')}`],
      medium,
      dye,
      pumpNm,
      pathMm: options.path === undefined ? crossing : pathOption(options.path),
      guess: guessStrength(dye, paths, yields),
      way: `it knows the pump’s straight way of ${significant(crossing, 3)} mm and a mean way of ${significant(paths.emittedPathMm, 2)} mm for emitted light: ${significant(paths.meanChordMm, 2)} mm (4 V/S) from wall to wall, where ${significant(100 * paths.lostAtWall, 2)} % is let through or taken. It does not know which wall is the exit. Then trace: stokeswell strength ${safeText(file)}`,
      warnings: reading.warnings.flatMap(faultLines),
    };
  });
}

/** By way of the strength's dial, if it has one. */
function yieldsOf(
  reading: SoundDesign,
  dials: DyeOptions['dial'],
  medium: string,
  dye: DissolvedDye,
): (times: number) => number {
  const read = (times: number): number | null => {
    try {
      const turned = atStrength(reading, dials, strengthDial(reading, dials, undefined), times);
      const found = turned.description.media.get(medium)?.dyes.find(({ name }) => name === dye.name);
      return found?.quantumYield ?? null;
    } catch (error) {
      if (error instanceof CommandFault) return null;
      throw error;
    }
  };
  return yieldAt(read, dye.quantumYield);
}

const pathOption = (text: string): number => quantityOption('--path', text, 'length', [0, LONGEST_PATH_MM]);
const wavelengthOption = (text: string): number => quantityOption('--pump', text, 'wavelength', [200, 2000]);

const guessText = ({ concentration }: DissolvedDye, { times }: StrengthGuess): string =>
  concentration === null ? `${significant(times, 3)} times the strength` : strengthText(concentration * times);

async function filesOf(subject: Subject, sheet: DyeSheet, strength: string, prefix: string): Promise<NamedFile[]> {
  const { spectra, paths, ...numbers } = sheet;
  const foot = `${subject.title}. stokeswell ${toolVersion()}, nothing traced.`;
  const shown = { ...sheet, strength };
  const json = { ...numbers, guess: subject.guess, warnings: subject.warnings };
  return [
    [`${prefix}dye.json`, `${JSON.stringify(json, null, 2)}\n`],
    [
      `${prefix}spectra.csv`,
      csvText(
        ['wavelength_nm', 'absorbance', 'emission_relative'],
        spectra.nm.map((nm, i) => [nm, spectra.absorbance[i], spectra.emission[i]]),
      ),
    ],
    [
      `${prefix}path.csv`,
      csvText(
        ['path_mm', 'pump_taken', 'emitted_taken_back'],
        paths.mm.map((mm, i) => [mm, paths.pump[i], paths.emitted[i]]),
      ),
    ],
    ...(await drawnFiles([
      [`${prefix}spectra`, dyeSpectraPicture(shown, foot)],
      [`${prefix}path`, dyePathPicture(shown, foot)],
    ])),
  ];
}
