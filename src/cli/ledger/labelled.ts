import { fitToStyle, type TerminalStyle } from '../terminal-style.js';

const LABEL_WIDTH = 12;
const WIDTH = 80;
/** Stands for a space at which a line may not be broken. */
const GLUE = '\u00a0';

/** A paragraph with its label in the margin; long lines are broken between words. Nothing for no lines. */
export function labelled(label: string, lines: readonly string[], style: TerminalStyle): string[] {
  const broken = lines.flatMap((line) => breakLine(fitToStyle(line, style), WIDTH - LABEL_WIDTH));
  return broken.map((line, index) =>
    index === 0 ? `${style.bold(label.padEnd(LABEL_WIDTH))}${line}` : `${' '.repeat(LABEL_WIDTH)}${line}`,
  );
}

/** Breaks between words; continuation lines are indented by two. A word longer than a line stands alone, whole. */
export function breakLine(line: string, width: number): string[] {
  // A number keeps its sign, its error and its unit.
  const glued = line.replace(/(\d\)?|±|\+-) (?=\S)/g, `$1${GLUE}`);
  const lines: string[] = [];
  let current = '';
  for (const word of glued.split(' ')) {
    const next = current === '' ? word : `${current} ${word}`;
    if (current !== '' && [...next].length > width) {
      lines.push(current);
      current = `  ${word}`;
    } else {
      current = next;
    }
  }
  lines.push(current);
  return lines.map((text) => text.replaceAll(GLUE, ' '));
}
