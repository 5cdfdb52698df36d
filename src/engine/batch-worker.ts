/** The thread's side: a pool starts this file by its URL. */
export { traceShare as default } from './trace-share.js';
