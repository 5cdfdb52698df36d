import { createHash } from 'node:crypto';
import { PALETTE } from './charts/palette.js';
import { type Markup, markup, trusted } from './markup.js';
import { shortName } from './name-text.js';
import { PAGE_STYLE } from './page-style.js';
import { PAGE_SCRIPT } from './script/page-script.js';
import { VIEW_STYLE } from './view/view-style.js';

/**
 * The document around the sections. Its content security policy lets nothing in from outside and runs only our own
 * scripts, known by their hashes: even a text that slipped through unescaped could run nothing.
 * @param moreScripts run after the page's own; never anything from a design or a record
 */
export function pageShell(title: string, body: Markup, moreScripts: readonly string[] = []): string {
  const scripts = [PAGE_SCRIPT, ...moreScripts];
  const hashes = scripts.map((script) => `'sha256-${createHash('sha256').update(script).digest('base64')}'`).join(' ');
  const policy = `default-src 'none'; img-src data:; style-src 'unsafe-inline'; script-src ${hashes}; base-uri 'none'; form-action 'none'`;
  return markup`<!doctype html>
<html lang="en"><head><meta charset="utf-8"><meta http-equiv="Content-Security-Policy" content="${policy}"><meta name="viewport" content="width=device-width, initial-scale=1"><meta name="color-scheme" content="light dark"><meta name="referrer" content="no-referrer"><title>${shortName(title, 80)}</title><style>${trusted(PAGE_STYLE + VIEW_STYLE)}</style></head>
<body data-palette="${Buffer.from(PALETTE).toString('base64')}">${body}${scripts.map((script) => markup`<script>${trusted(script)}</script>`)}</body></html>
`.text;
}
