import { Argument, Command, Option } from 'commander';
import { PICTURE_CHOICES } from '../report/pictures/picture-choice.js';
import type { CheckOptions } from './commands/check.js';
import type { CoatingOptions } from './commands/coating.js';
import type { DrawOptions } from './commands/draw.js';
import type { DyeOptions } from './commands/dye.js';
import type { ExplainOptions } from './commands/explain.js';
import type { ProveOptions } from './commands/prove.js';
import type { ReportOptions } from './commands/report.js';
import type { StrengthOptions } from './commands/strength.js';
import type { TraceCommandOptions } from './commands/trace.js';
import { EXIT_CODES_HELP, type ExitCode } from './exit-codes.js';
import {
  collectDial,
  parseDuration,
  parseHistories,
  parsePoints,
  parsePrecision,
  parseSeed,
  parseThreads,
  parseWavelengths,
} from './option-values.js';
import { print, tell } from './output-stream.js';
import { toolVersion } from './tool-version.js';

const ABOUT = `Traces pump light through a fluorescent cell, photon by photon, and says where it all goes.`;

const QUICK_START = `
A first run:
  stokeswell new cell.yaml
  stokeswell trace cell.yaml --precision 0.2%
`;

/**
 * The command line. Commands are loaded when they run, so that help is quick.
 * @param done receives the exit status of the command that ran
 */
export function buildProgram(done: (code: ExitCode) => void): Command {
  const program = new Command('stokeswell')
    .description(ABOUT)
    .version(toolVersion(), '--version', 'print the version')
    .helpOption('-h, --help', 'print help')
    .helpCommand(false)
    .showHelpAfterError('(stokeswell --help lists commands and options)')
    .configureOutput({ writeOut: print, writeErr: tell })
    .exitOverride()
    .addHelpText('after', `${QUICK_START}\n${EXIT_CODES_HELP}`);

  program
    .command('new')
    .description('write a commented starter design')
    .argument('[file]', 'file to write; an existing one is never overwritten', 'design.yaml')
    .action(async (file: string) => {
      const { newCommand } = await import('./commands/new.js');
      done(await newCommand(file));
    });

  program
    .command('check')
    .description('tell every fault of designs without tracing them')
    .argument('<design...>', 'design files')
    .option('--faces', 'list the faces with centre, normal, area and what touches them')
    .option('--json', 'print one JSON document instead of text')
    .addOption(dialOption())
    .action(async (files: string[], options: CheckOptions) => {
      const { checkCommand } = await import('./commands/check.js');
      done(await checkCommand(files, options));
    });

  program
    .command('draw')
    .description('draw a design before any tracing: a page and a dimensioned sheet of three views')
    .argument('<design>', 'design file')
    .option('--out <folder>', 'new or empty folder for the drawing (default: a new one below results)')
    .addOption(dialOption())
    .action(async (file: string, options: DrawOptions) => {
      const { drawCommand } = await import('./commands/draw.js');
      done(await drawCommand(file, options));
    });

  program
    .command('trace')
    .description('trace a design: ledger, figures, maps; ends at whichever bound is met first')
    .argument('<design>', 'design file')
    .option('--histories <number>', 'pump photons to follow, for example 200000 or 2e6', parseHistories)
    .option('--precision <percent>', 'relative standard error wanted on the exit fraction, e.g. 0.2%', parsePrecision)
    .option('--for <time>', 'time to trace, with unit ms, s, min or h, e.g. 30s', parseDuration)
    .option(
      '--seed <text>',
      "seed of the random streams; same seed, same bits (default: the design's, else 1)",
      parseSeed,
    )
    .option('--threads <number>', 'worker threads (default: all cores); the results do not depend on it', parseThreads)
    .option('--out <folder>', 'new or empty folder for the run (default: a new one below results)')
    .addOption(
      new Option(
        '--polarisation <mode>',
        "whether light keeps its polarisation (default: the design's, else carried where a pump is polarised)",
      ).choices(['carried', 'averaged']),
    )
    .option('--saturation', 'let dyes absorb with the molecules left in the ground state, found by iteration')
    .option('--no-files', 'write no files')
    .addOption(picturesOption().default('all'))
    .option('--plain', 'print the record of the run as JSON and nothing else')
    .addOption(new Option('--ledger <of>', 'ledger to print').choices(['watts', 'photons']).default('watts'))
    .option('--map', 'a small map of the exit also where standard output is no terminal')
    .option('--no-map', 'no map')
    .option('--progress', 'progress also where standard error is no terminal, a line per quarter')
    .option('--no-progress', 'no progress')
    .addOption(dialOption())
    .action(async (file: string, options: TraceCommandOptions) => {
      const { traceCommand } = await import('./commands/trace.js');
      done(await traceCommand(file, options));
    });

  program
    .command('report')
    .description('make the page and the pictures of a run again from its record')
    .argument('<folder>', 'folder of a run')
    .addOption(picturesOption().default(undefined, 'those the run has'))
    .action(async (folder: string, options: ReportOptions) => {
      const { reportCommand } = await import('./commands/report.js');
      done(await reportCommand(folder, options));
    });

  program
    .command('coating')
    .description('what a finish of a design does over wavelength and angle: table, CSV and pictures')
    .argument('<design>', 'design file')
    .argument('<finish>', 'name of a finish of the design')
    .option(
      '--between <media...>',
      'the medium outside the face, then that of its part (default: as on the first face with the finish)',
    )
    .addOption(
      new Option('--wavelengths <range>', 'first and last wavelength, e.g. "420 nm to 650 nm"')
        .argParser(parseWavelengths)
        .default([400, 700], '400 nm to 700 nm'),
    )
    .option('--out <folder>', 'new or empty folder for the files (default: a new one below results)')
    .option('--no-files', 'write no files')
    .addOption(dialOption())
    .action(async (file: string, finish: string, options: CoatingOptions) => {
      const { coatingCommand } = await import('./commands/coating.js');
      done(await coatingCommand(file, finish, options));
    });

  program
    .command('dye')
    .description(
      'a dye in a liquid before any tracing: absorbance, depth, overlap, saturation, a first guess of strength',
    )
    .argument('<what>', 'a dye of the library, or a design file')
    .argument('[medium]', 'a solvent for a dye of the library, or a medium of the design (default: the first there is)')
    .option('--strength <strength>', 'of a dye of the library, e.g. "0.2 mmol/L" or "65 mg/L"')
    .option('--path <length>', 'path in the liquid (default: 10 mm, or the way of the pumps through the cell)')
    .option('--pump <wavelength>', "wavelength of the pump (default: 445 nm, or the design's first)")
    .option('--ph <number>', 'pH, for a dye of the library')
    .option('--out <folder>', 'new or empty folder for the files (default: a new one below results)')
    .option('--no-files', 'write no files')
    .addOption(dialOption())
    .action(async (what: string, medium: string | undefined, options: DyeOptions) => {
      const { dyeCommand } = await import('./commands/dye.js');
      done(await dyeCommand(what, medium, options));
    });

  program
    .command('strength')
    .description('exit fraction against the strength of the dye, traced over three decades, with the best one')
    .argument('<design>', 'design file whose dye strength is a dial')
    .option('--turn <dial>', 'the dial that holds the strength (default: the one that changes it)')
    .option('--points <number>', 'strengths to trace, 3 to 101', parsePoints, 13)
    .option('--histories <number>', 'pump photons at each strength, for example 50000 or 2e5', parseHistories, 50_000)
    .option(
      '--seed <text>',
      "seed of the random streams, the same at each strength (default: the design's, else 1)",
      parseSeed,
    )
    .option('--threads <number>', 'worker threads (default: all cores); the results do not depend on it', parseThreads)
    .option('--out <folder>', 'new or empty folder for the files (default: a new one below results)')
    .option('--no-files', 'write no files')
    .addOption(dialOption())
    .action(async (file: string, options: StrengthOptions) => {
      const { strengthCommand } = await import('./commands/strength.js');
      done(await strengthCommand(file, options));
    });

  program
    .command('prove')
    .description('hold the tracer against laws and tables from outside, on this machine')
    .option('--quick', 'fewer histories, wider bands')
    .option('--only <text>', 'only proofs whose name holds this text')
    .action(async (options: ProveOptions) => {
      const { proveCommand } = await import('./commands/prove.js');
      done(await proveCommand(options));
    });

  program
    .command('explain')
    .description('say what a word on the terminal or the page means, its formula, assumptions and source')
    .argument('[term...]', 'a figure, fate, check or other word, for example exit power; without one, the list')
    .option('--json', 'print JSON instead of text')
    .addOption(new Option('--markdown', 'print the glossary of README, a line a term').hideHelp())
    .action(async (words: string[], options: ExplainOptions) => {
      const { explainCommand } = await import('./commands/explain.js');
      done(explainCommand(words, options));
    });

  program
    .command('schema')
    .description('print a JSON Schema, for editors and readers of results')
    .addArgument(new Argument('[of]', 'what it describes').choices(['design', 'run']).default('design'))
    .action(async (of: 'design' | 'run') => {
      const { schemaCommand } = await import('./commands/schema.js');
      done(await schemaCommand(of));
    });

  return program;
}

function picturesOption(): Option {
  return new Option('--pictures <which>', 'plots as files: svg, svg and png (all), or none').choices(PICTURE_CHOICES);
}

function dialOption(): Option {
  return new Option('--dial <name=value>', 'turn a dial of the design, e.g. "depth=10 mm"; may be repeated')
    .argParser(collectDial)
    .default({}, 'as in the design');
}
