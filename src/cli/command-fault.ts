import type { ExitCode } from './exit-codes.js';

/** Something the user can mend, told in plain sentences; ends the command with its exit status. */
export class CommandFault extends Error {
  constructor(
    readonly exitCode: ExitCode,
    message: string,
  ) {
    super(message);
    this.name = 'CommandFault';
  }
}
