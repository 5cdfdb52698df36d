import { join } from 'node:path';
import type { Description, FinishDescription, MediumDescription } from '../../design/description.js';
import { formatFault } from '../../design/format-fault.js';
import { readDesign, type SoundDesign } from '../../design/read-design.js';
import { gasNames, readGas, readSolid, readSolvent, solidNames, solventNames } from '../../materials/library.js';
import { coatingCurvesPicture } from '../../report/coating/coating-curves-picture.js';
import { coatingMapPicture } from '../../report/coating/coating-map-picture.js';
import { csvText } from '../../run-folder/csv-text.js';
import { slug } from '../../run-folder/slug.js';
import { writeFolder } from '../../run-folder/write-folder.js';
import { checkScene } from '../../scene/check-scene.js';
import { type CoatingCurves, coatingCurves, type Passage } from '../../scene/coating-curves.js';
import { nearestName } from '../../units/nearest-name.js';
import { coatingTable } from '../coating-table.js';
import { CommandFault } from '../command-fault.js';
import { EXIT, type ExitCode } from '../exit-codes.js';
import { RESULTS } from '../output-folder.js';
import { print, tell } from '../output-stream.js';
import { safeText } from '../safe-text.js';
import { fitToStyle, styleFor } from '../terminal-style.js';

export interface CoatingOptions {
  /** Medium outside the face, medium of its part. */
  readonly between?: readonly string[];
  /** nm */
  readonly wavelengths: readonly [number, number];
  readonly out?: string;
  readonly files: boolean;
  readonly dial: Readonly<Record<string, string>>;
}

/** Steps between the ends of the wavelengths. */
const STEPS = 300;

/** `stokeswell coating DESIGN FINISH`: what a finish does over wavelength and angle, dry and wetted. */
export async function coatingCommand(file: string, name: string, options: CoatingOptions): Promise<ExitCode> {
  const reading = await readDesign(file, { dials: options.dial });
  if (!reading.ok) throw new CommandFault(EXIT.fault, reading.faults.map(formatFault).join('\n'));
  const { description } = reading;
  const finish = finishNamed(description, name);
  const [outside, inside] = mediaBetween(description, name, options.between);
  const [low, high] = options.wavelengths;
  const wavelengthsNm = Array.from({ length: STEPS + 1 }, (_, i) => low + ((high - low) * i) / STEPS);
  checkRange(finish, low, high, reading);
  const anglesDeg = Array.from({ length: 91 }, (_, i) => i);
  const curves = passages(outside, inside).map((passage) => coatingCurves(finish, passage, wavelengthsNm, anglesDeg));

  const style = styleFor(process.stdout.isTTY === true, process.env);
  const title = `${style.bold(safeText(name))} on ${safeText(inside.name)}, ${safeText(outside.name)} outside; mean of s and p`;
  const lines = [title, ...curves.flatMap((each) => ['', ...coatingTable(each, style)])];
  print(fitToStyle(`${lines.join('\n')}\n`, style));
  if (!options.files) return EXIT.ok;
  const pair = `${slug(outside.name, 'medium')}-${slug(inside.name, 'medium')}`;
  const folder =
    options.out ?? join(RESULTS, slug(description.title, 'design'), `coating-${slug(name, 'finish')}-${pair}`);
  await writeFolder(folder, [
    ['coating.csv', coatingCsv(curves)],
    ['curves.svg', coatingCurvesPicture(name, curves, 'mean')],
    ['polarised.svg', coatingCurvesPicture(name, curves, 'apart')],
    ['map.svg', coatingMapPicture(name, curves)],
  ]);
  print(`\n${safeText(folder)}: coating.csv, curves.svg, polarised.svg, map.svg\n`);
  return EXIT.ok;
}

/** Dry first where the finish is wetted, then into the part, then out of it. */
function passages(outside: MediumDescription, inside: MediumDescription): Passage[] {
  const air = { ...libraryMedium('air'), name: 'air' } as MediumDescription;
  const dry = outside.index(550) === air.index(550) ? [] : [{ from: air, to: inside, inward: true }];
  return [...dry, { from: outside, to: inside, inward: true }, { from: inside, to: outside, inward: false }];
}

function finishNamed(description: Description, name: string): FinishDescription {
  const finish = description.finishes.get(name);
  if (finish !== undefined) return finish;
  const names = [...description.finishes.keys()];
  refuse('finish', name, names);
}

function mediaBetween(
  description: Description,
  name: string,
  between: readonly string[] | undefined,
): readonly [MediumDescription, MediumDescription] {
  if (between !== undefined) {
    if (between.length !== 2) {
      throw new CommandFault(EXIT.fault, '--between takes two media: the one outside the face, then that of its part.');
    }
    return [mediumNamed(description, between[0]), mediumNamed(description, between[1])];
  }
  const face = checkScene(description).faces.find((one) => one.finish === name && one.exposed > 0);
  const part = description.parts.find((one) => one.name === face?.part);
  if (face === undefined || part === undefined) {
    const text = `No face carries ${safeText(name)}. Say what it lies between, for example --between air ethanol.`;
    throw new CommandFault(EXIT.fault, text);
  }
  const touched = description.parts.find((one) => one.name === face.touches[0]?.split('.')[0]);
  const outside = touched?.medium ?? description.surroundings;
  return [mediumNamed(description, outside), mediumNamed(description, part.medium)];
}

function mediumNamed(description: Description, name: string): MediumDescription {
  const medium = description.media.get(name) ?? libraryMedium(name);
  if (medium !== null) return medium;
  refuse('medium', name, [...description.media.keys(), ...solventNames(), ...solidNames(), ...gasNames()]);
}

function libraryMedium(name: string): MediumDescription | null {
  const read = solventNames().includes(name)
    ? readSolvent
    : solidNames().includes(name)
      ? readSolid
      : gasNames().includes(name)
        ? readGas
        : null;
  if (read === null) return null;
  const { kind, index, absorption, thermal } = read(name);
  return { name, path: [], kind, base: name, index, absorption, dyes: [], scatterers: [], thermal };
}

function refuse(what: 'finish' | 'medium', name: string, names: readonly string[]): never {
  const nearest = nearestName(name, names);
  const hint = nearest === null ? '' : ` Did you mean ${safeText(nearest)}?`;
  const known = [...new Set(names)].map((each) => safeText(each)).join(', ');
  throw new CommandFault(EXIT.fault, `There is no ${what} called "${safeText(name)}".${hint} There is ${known}.`);
}

/** As in a design, materials without data are refused unless the stack allows it, and then told. */
function checkRange(finish: FinishDescription, low: number, high: number, reading: SoundDesign): void {
  if (finish.kind !== 'stack') return;
  const bare = finish.layers.find(({ rangeNm }) => rangeNm !== null && (rangeNm[0] > low || rangeNm[1] < high));
  if (bare === undefined) return;
  const { line, column } = reading.locate(bare.path);
  const text = `${safeText(reading.file)}:${line}:${column}: ${safeText(bare.material)} has data from ${bare.rangeNm?.[0]} to ${bare.rangeNm?.[1]} nm only, and curves from ${low} to ${high} nm are asked for`;
  if (finish.extrapolates) tell(`${text}; beyond, the nearest value is held.\n`);
  else
    throw new CommandFault(
      EXIT.fault,
      `${text}. Ask for less with --wavelengths, or write \`extrapolate: yes\` in the stack.`,
    );
}

function coatingCsv(curves: readonly CoatingCurves[]): string {
  const header = ['from', 'to', 'wavelength_nm', 'angle_deg'];
  for (const share of ['reflectance', 'transmittance', 'absorptance']) header.push(`${share}_s`, `${share}_p`, share);
  return csvText(header, csvRows(curves));
}

/** Every other wavelength and angle: what the pictures need would make a file no spreadsheet likes. */
function* csvRows(curves: readonly CoatingCurves[]): Generator<(string | number)[]> {
  for (const each of curves) {
    const { from, to, wavelengthsNm, anglesDeg } = each;
    for (const [w, nm] of wavelengthsNm.entries()) {
      if (w % 2 !== 0) continue;
      for (const [a, degrees] of anglesDeg.entries()) {
        if (a % 2 !== 0) continue;
        const at = w * anglesDeg.length + a;
        const r = [each.reflectanceS[at], each.reflectanceP[at]];
        const t = [each.transmittanceS[at], each.transmittanceP[at]];
        const lost = [0, 1].map((i) => Math.max(0, 1 - r[i] - t[i]));
        yield [from, to, rounded(nm), degrees, ...[r, t, lost].flatMap(([s, p]) => [s, p, 0.5 * (s + p)].map(rounded))];
      }
    }
  }
}

/** Six digits are more than anyone knows of a film. */
const rounded = (value: number): number => Number(value.toPrecision(6));
