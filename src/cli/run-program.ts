import { CommanderError } from 'commander';
import { RunFolderError } from '../run-folder/run-folder-error.js';
import { CommandFault } from './command-fault.js';
import { EXIT, type ExitCode } from './exit-codes.js';
import { guardStreams, tell } from './output-stream.js';
import { buildProgram } from './program.js';
import { safeText } from './safe-text.js';
import { toolVersion } from './tool-version.js';

/**
 * Runs one command line and sets the exit status of the process (not process.exit(): a pipe must get all of the output
 * first). Every fault leaves as sentences on standard error, never as a stack trace — but with STOKESWELL_DEBUG=1, for
 * defects of our own.
 * @param words command line without node and script
 */
export async function runProgram(words: readonly string[]): Promise<void> {
  let outputFailed = false;
  guardStreams((reason) => {
    if (!outputFailed) tell(`cannot write the output: ${reason}\n`);
    outputFailed = true;
    process.exitCode = EXIT.unwritable;
  });
  for (const event of ['uncaughtException', 'unhandledRejection'] as const) {
    process.on(event, (error: unknown) => process.exit(tellFault(error)));
  }
  const code = await exitCodeOf(words);
  if (!outputFailed) process.exitCode = code;
}

async function exitCodeOf(words: readonly string[]): Promise<ExitCode> {
  let code: ExitCode = EXIT.ok;
  const program = buildProgram((result) => {
    code = result;
  });
  if (words.length === 0) {
    tell(program.helpInformation());
    return EXIT.fault;
  }
  try {
    await program.parseAsync(words, { from: 'user' });
    return code;
  } catch (error) {
    return tellFault(error);
  }
}

function tellFault(error: unknown): ExitCode {
  // Commander has printed its own sentence.
  if (error instanceof CommanderError) return error.exitCode === 0 ? EXIT.ok : EXIT.fault;
  if (error instanceof RunFolderError) {
    tell(`${error.message}\n`);
    return EXIT.unwritable;
  }
  if (error instanceof CommandFault) {
    tell(`${error.message}\n`);
    return error.exitCode;
  }
  const message = error instanceof Error ? error.message : String(error);
  tell(
    `stokeswell ${toolVersion()} met a defect of its own: ${safeText(message, 1000)}\n` +
      'Your input is not to blame. Please report this to whoever keeps your copy of stokeswell, with the command,\n' +
      'the design file and what the same command prints with STOKESWELL_DEBUG=1 set.\n',
  );
  if (process.env.STOKESWELL_DEBUG === '1' && error instanceof Error && error.stack) tell(`${error.stack}\n`);
  return EXIT.defect;
}
