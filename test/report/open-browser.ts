import { existsSync } from 'node:fs';
import { delimiter, join } from 'node:path';
import { type Browser, chromium } from 'playwright-core';

/** Nothing the browser would ask of a network by itself; no sandbox, for containers run as root. */
const QUIET = [
  '--no-sandbox',
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
];

/** The chromium of the machine, found on the path. */
export function openBrowser(more: readonly string[] = []): Promise<Browser> {
  const places = (process.env.PATH ?? '').split(delimiter).map((folder) => join(folder, 'chromium'));
  const executablePath = places.find((place) => existsSync(place));
  if (executablePath === undefined) throw new Error('these tests need chromium: apt-get install chromium');
  return chromium.launch({ executablePath, args: [...QUIET, ...more] });
}
