import { shellQuote } from './shell-quote.js';

/** The command that repeats a run to the same bits; without a new folder, which is the repeater's to choose. */
export function repeatCommand(
  file: string,
  histories: number,
  seed: string,
  dials: Readonly<Record<string, string>>,
  polarisation?: 'carried' | 'averaged',
  saturation = false,
): string {
  const turned = Object.entries(dials).flatMap(([name, value]) => ['--dial', `${name}=${value}`]);
  const words = ['stokeswell', 'trace', file, '--histories', String(histories), '--seed', seed, ...turned];
  if (polarisation !== undefined) words.push('--polarisation', polarisation);
  if (saturation) words.push('--saturation');
  return words.map(shellQuote).join(' ');
}
