/** Files beside a design. Only files inside the folder of the design are opened, whatever links lead out of it. */
import { lstatSync, readdirSync, readFileSync, realpathSync, statSync } from 'node:fs';
import { dirname, isAbsolute, join, normalize, relative, resolve, sep } from 'node:path';
import { nearestName } from '../units/nearest-name.js';

export interface CompanionRules {
  /** 'table', 'mesh': for messages. */
  readonly what: string;
  readonly largestBytes: number;
  /** Names of files that might be meant. */
  readonly pattern: RegExp;
}

export type CompanionFile =
  | { readonly ok: true; readonly bytes: Uint8Array /** As shown in faults. */; readonly file: string }
  | CompanionFault;

export interface CompanionFault {
  readonly ok: false;
  readonly problem: string;
  readonly expected?: string;
  readonly suggestion?: string;
}

/** The bytes of `name`, a path from the folder of the design. Never throws for what a file system can do. */
export function readCompanionFile(designFile: string, name: string, rules: CompanionRules): CompanionFile {
  const { what, largestBytes } = rules;
  const outside: CompanionFault = {
    ok: false,
    problem: 'the path leaves the folder of the design',
    expected: 'a file in the folder of the design or below it',
    suggestion: `copy the ${what} beside the design`,
  };
  const folder = dirname(resolve(designFile));
  const path = resolve(folder, name);
  if (isAbsolute(name) || name.includes('\0') || leaves(folder, path)) return outside;
  try {
    if (leaves(realpathSync(folder), realpathSync(path))) return outside;
    const status = statSync(path);
    if (!status.isFile()) return { ok: false, problem: 'this is not a file' };
    if (status.size > largestBytes) {
      return { ok: false, problem: `the ${what} is too large`, expected: `at most ${largestBytes} bytes` };
    }
    return { ok: true, bytes: readFileSync(path), file: join(dirname(designFile), normalize(name)) };
  } catch (error) {
    return explain(error, folder, name, rules.pattern);
  }
}

function leaves(folder: string, path: string): boolean {
  const way = relative(folder, path);
  return way === '..' || way.startsWith(`..${sep}`) || isAbsolute(way);
}

function explain(error: unknown, folder: string, name: string, pattern: RegExp): CompanionFault {
  const code = error instanceof Error && 'code' in error ? String(error.code) : '';
  if (code === 'ENOENT' || code === 'ENOTDIR') {
    // A link that dangles is no missing file.
    if (lstatSync(resolve(folder, name), { throwIfNoEntry: false })?.isSymbolicLink()) {
      return { ok: false, problem: 'the link leads nowhere' };
    }
    const nearest = nearestName(
      name,
      readdirSync(folder).filter((each) => pattern.test(each)),
    );
    return { ok: false, problem: 'there is no such file', ...(nearest === null ? {} : { suggestion: nearest }) };
  }
  if (code === '') throw error;
  return { ok: false, problem: `the file cannot be read (${code})` };
}
