import { type ChildProcess, spawn } from 'node:child_process';
import { fileURLToPath } from 'node:url';

/** The built command; `pretest` builds it. */
export const MAIN = fileURLToPath(new URL('../../dist/main.js', import.meta.url));

export interface CliResult {
  /** null: ended by a signal. */
  readonly code: number | null;
  readonly out: string;
  readonly err: string;
}

export interface CliRun {
  readonly cwd: string;
  readonly env?: Readonly<Record<string, string>>;
  /** Called once it runs, to send signals or close pipes. */
  readonly meanwhile?: (child: ChildProcess) => void;
}

/** Runs the built command line to its end in a folder, with pipes for its output. */
export function runCli(words: readonly string[], { cwd, env = {}, meanwhile }: CliRun): Promise<CliResult> {
  return new Promise((resolve, reject) => {
    const child = spawn(process.execPath, [MAIN, ...words], {
      cwd,
      env: { PATH: process.env.PATH ?? '', LANG: 'C.UTF-8', ...env },
    });
    let out = '';
    let err = '';
    child.stdout.setEncoding('utf8').on('data', (text: string) => {
      out += text;
    });
    child.stderr.setEncoding('utf8').on('data', (text: string) => {
      err += text;
    });
    child.on('error', reject);
    child.on('close', (code) => resolve({ code, out, err }));
    meanwhile?.(child);
  });
}
