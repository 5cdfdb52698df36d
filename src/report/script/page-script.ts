import { MAP_SCRIPT } from './map-script.js';
import { STREAM_SCRIPT } from './stream-script.js';

/** All the script of a page. It reads attributes and writes text, numbers and paths; it never writes markup. */
export const PAGE_SCRIPT = `'use strict';
document.documentElement.classList.add('scripted');
${STREAM_SCRIPT}
${MAP_SCRIPT}
`;
