import { availableParallelism } from 'node:os';
import type { Proof, ProofCase } from '../../proofs/proof.js';
import { CommandFault } from '../command-fault.js';
import { EXIT, type ExitCode } from '../exit-codes.js';
import { formatWithError, significant } from '../number-format.js';
import { print } from '../output-stream.js';
import { safeText } from '../safe-text.js';
import { fitToStyle, styleFor, type TerminalStyle } from '../terminal-style.js';

export interface ProveOptions {
  readonly quick?: boolean;
  readonly only?: string;
}

const HISTORIES = 200_000;
const QUICK_HISTORIES = 20_000;
/** Proofs are repeatable: a deviation can be looked into. */
const SEED = 'proof';
const LABEL_WIDTH = 58;

/** `stokeswell prove`: outside truths checked on this machine, a line per case as it is done. */
export async function proveCommand(options: ProveOptions): Promise<ExitCode> {
  const { runProofs } = await import('../../proofs/run-proofs.js');
  const style = styleFor(process.stdout.isTTY === true, process.env);
  const say = (text: string): void => print(fitToStyle(`${text}\n`, style));
  let shown: Proof | null = null;
  const summary = await runProofs(
    {
      histories: options.quick ? QUICK_HISTORIES : HISTORIES,
      seed: SEED,
      threads: availableParallelism(),
      ...(options.only === undefined ? {} : { only: options.only }),
    },
    (proof, proofCase, passed) => {
      if (proof !== shown) say(proofHeading(proof, style));
      shown = proof;
      say(caseLine(proofCase, passed, style));
    },
  );
  if (summary.proofs === 0) {
    throw new CommandFault(EXIT.fault, `No proof has "${safeText(options.only ?? '')}" in its name.`);
  }
  const verdict = summary.failed === 0 ? 'all within their bands' : `${summary.failed} outside their bands`;
  const proofs = summary.proofs === 1 ? '1 proof' : `${summary.proofs} proofs`;
  say(`\n${style.bold(`${proofs}, ${summary.cases} cases: ${verdict}`)}`);
  return summary.failed === 0 ? EXIT.ok : EXIT.deviation;
}

function proofHeading(proof: Proof, style: TerminalStyle): string {
  return `\n${style.bold(proof.name)}: ${proof.law}\n${style.dim(`  source: ${proof.source} (${proof.status})`)}`;
}

/** Case, measured ± standard error, expected, deviation in standard errors. */
export function caseLine(proofCase: ProofCase, passed: boolean, style: TerminalStyle): string {
  const measured = formatWithError(proofCase.measured, proofCase.standardError, '', style.plusMinus);
  const expected = significant(proofCase.expected, 6);
  const deviation =
    proofCase.deviation === null
      ? `off by ${significant(proofCase.measured - proofCase.expected, 2)}`
      : `${proofCase.deviation < 0 ? '' : '+'}${proofCase.deviation.toFixed(1)} standard errors`;
  const mark = passed ? style.good('holds ') : style.warn('FAILS ');
  const label = safeText(proofCase.label);
  const law = passed || proofCase.against === '' ? '' : ` (${safeText(proofCase.against)})`;
  return `  ${mark} ${label.padEnd(LABEL_WIDTH)} ${measured}, expected ${expected}${law}, ${deviation}`;
}
