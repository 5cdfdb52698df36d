import { FATE_EVENT } from '../view/fate-event.js';

/**
 * Streams of the flow picture say their number and ± under the pointer and on focus. Where the page has a view, it makes
 * buttons of them: a click or Enter tells the document which rows of the ledger are wanted, a second one takes it back.
 */
export const STREAM_SCRIPT = `
const streamReadout = document.getElementById('flow-readout');
const streams = document.querySelectorAll('.stream');
const toView = document.querySelector('.to-view');
const press = (pressed) => {
  for (const stream of streams) {
    if (stream.hasAttribute('aria-pressed')) stream.setAttribute('aria-pressed', String(stream.dataset.rows === pressed));
  }
  if (toView) toView.hidden = pressed === null;
};
for (const stream of streams) {
  const tell = () => { if (streamReadout) streamReadout.textContent = stream.dataset.words; };
  stream.addEventListener('pointerenter', tell);
  stream.addEventListener('focus', tell);
  const choose = () => {
    if (!stream.hasAttribute('aria-pressed')) return;
    const again = stream.getAttribute('aria-pressed') === 'true';
    press(again ? null : stream.dataset.rows);
    const rows = again ? [] : JSON.parse(stream.dataset.rows).map(([fate, light, where]) => ({ fate, light, where }));
    document.dispatchEvent(new CustomEvent('${FATE_EVENT}', { detail: { rows, from: 'flow' } }));
  };
  stream.addEventListener('click', choose);
  stream.addEventListener('keydown', (event) => {
    if (event.key !== 'Enter' && event.key !== ' ') return;
    event.preventDefault();
    choose();
  });
}
document.addEventListener('${FATE_EVENT}', ({ detail }) => { if (detail.from === 'view') press(null); });`;
