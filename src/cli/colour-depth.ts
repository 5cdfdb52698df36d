import { type Environment, wantsColour } from './terminal-style.js';

/** Colours a terminal can be trusted with: none, the usual 256 with their 24 greys, or any of 24 bits. */
export type ColourDepth = 'none' | '256' | '24-bit';

/** 24 bits only where COLORTERM says so; sixteen colours are too few for a map and count as none. */
export function colourDepth(isTerminal: boolean, environment: Environment): ColourDepth {
  if (!wantsColour(isTerminal, environment)) return 'none';
  if (/^(truecolor|24bit)$/i.test(environment.COLORTERM ?? '')) return '24-bit';
  return /256/.test(environment.TERM ?? '') ? '256' : 'none';
}
