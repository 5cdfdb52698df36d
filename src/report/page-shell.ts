import { createHash } from 'node:crypto';
import { PALETTE } from './charts/palette.js';
import { type Markup, markup, trusted } from './markup.js';
import { shortName } from './name-text.js';
import { PAGE_STYLE } from './page-style.js';
import { PAGE_SCRIPT } from './script/page-script.js';

/**
 * The document around the sections. Its content security policy lets nothing in from outside and runs only our own
 * script, known by its hash: even a text that slipped through unescaped could run nothing.
 */
export function pageShell(title: string, body: Markup): string {
  const hash = createHash('sha256').update(PAGE_SCRIPT).digest('base64');
  const policy = `default-src 'none'; img-src data:; style-src 'unsafe-inline'; script-src 'sha256-${hash}'; base-uri 'none'; form-action 'none'`;
  return markup`<!doctype html>
<html lang="en"><head><meta charset="utf-8"><meta http-equiv="Content-Security-Policy" content="${policy}"><meta name="viewport" content="width=device-width, initial-scale=1"><meta name="color-scheme" content="light dark"><meta name="referrer" content="no-referrer"><title>${shortName(title, 80)}</title><style>${trusted(PAGE_STYLE)}</style></head>
<body data-palette="${Buffer.from(PALETTE).toString('base64')}">${body}<script>${trusted(PAGE_SCRIPT)}</script></body></html>
`.text;
}
