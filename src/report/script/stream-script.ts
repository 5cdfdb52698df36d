/** Streams of the flow picture say their number and ± under the pointer and on focus. */
export const STREAM_SCRIPT = `
const streamReadout = document.getElementById('flow-readout');
for (const stream of document.querySelectorAll('.stream')) {
  const tell = () => { if (streamReadout) streamReadout.textContent = stream.dataset.words; };
  stream.addEventListener('pointerenter', tell);
  stream.addEventListener('focus', tell);
}`;
