import { type FileHandle, open, rm } from 'node:fs/promises';
import { CommandFault } from '../command-fault.js';
import { EXIT, type ExitCode } from '../exit-codes.js';
import { print } from '../output-stream.js';
import { safeText } from '../safe-text.js';
import { shellQuote } from '../shell-quote.js';

/** `stokeswell new [FILE]`: a commented starter design; never overwrites, leaves nothing half-written. */
export async function newCommand(file: string): Promise<ExitCode> {
  const { starterDesign } = await import('../../design/starter-design.js');
  const handle = await openNew(file);
  try {
    await handle.writeFile(starterDesign());
    await handle.close();
  } catch (error) {
    await rm(file, { force: true });
    throw cannotWrite(file, error);
  }
  const name = safeText(shellQuote(file));
  print(`${safeText(file)} written. Next:\n  stokeswell check ${name}\n  stokeswell trace ${name}\n`);
  print('For completion in an editor: stokeswell schema > design.schema.json\n');
  return EXIT.ok;
}

async function openNew(file: string): Promise<FileHandle> {
  try {
    return await open(file, 'wx');
  } catch (error) {
    if (error instanceof Error && 'code' in error && error.code === 'EEXIST') {
      throw new CommandFault(EXIT.fault, `"${safeText(file)}" exists and is left as it is. Name another file.`);
    }
    throw cannotWrite(file, error);
  }
}

function cannotWrite(file: string, error: unknown): unknown {
  if (!(error instanceof Error && 'code' in error)) return error;
  return new CommandFault(EXIT.unwritable, `cannot write "${safeText(file)}": ${safeText(error.message)}`);
}
