/** Exit statuses of every command. Documented in `--help` and README; scripts rely on them. */
export const EXIT = {
  ok: 0,
  /** A proof lies outside its band. */
  deviation: 1,
  /** A fault in the design or the command line. */
  fault: 2,
  /** Results cannot be written. */
  unwritable: 3,
  /** Stopped by Ctrl-C or SIGTERM; what was traced is kept. */
  interrupted: 4,
  /** A defect of the program. */
  defect: 70,
  /** Stopped at once by a second Ctrl-C, or before anything was traced; nothing is kept. */
  killed: 130,
} as const;

export type ExitCode = (typeof EXIT)[keyof typeof EXIT];

export const EXIT_CODES_HELP = `Exit status:
  ${EXIT.ok}    done
  ${EXIT.deviation}    a proof lies outside its band
  ${EXIT.fault}    a fault in the design or on the command line; nothing was written
  ${EXIT.unwritable}    results cannot be written
  ${EXIT.interrupted}    interrupted (Ctrl-C once); what was traced is kept and written
  ${EXIT.defect}   a defect of stokeswell itself
  ${EXIT.killed}  stopped at once (Ctrl-C twice); nothing was written`;
