/** The browser's side of the 3D view. It starts when the view comes near the screen or a stream of the flow is chosen. */
import { FATE_EVENT } from '../fate-event.js';
import type { PackedDrawing } from '../packed-drawing.js';
import { unpackDrawing } from '../unpack-drawing.js';
import { Desk } from './desk.js';
import { find } from './labels.js';
import { Stage } from './stage.js';

const NEAR = '600px';

function start(view: HTMLElement): Desk | null {
  const canvas = find(view, 'canvas') as HTMLCanvasElement;
  const context = canvas.getContext('webgl2', { antialias: true, alpha: false });
  if (context === null) {
    view.classList.add('no-3d');
    return null;
  }
  const drawing = unpackDrawing(JSON.parse(view.dataset.drawing ?? '') as PackedDrawing);
  view.classList.add('live');
  canvas.addEventListener('webglcontextlost', (event) => {
    event.preventDefault();
    view.classList.remove('live');
  });
  const stage = new Stage(view, canvas, context, drawing);
  canvas.addEventListener('webglcontextrestored', () => {
    view.classList.add('live');
    stage.ask();
  });
  return new Desk(view, stage, drawing);
}

for (const view of document.querySelectorAll<HTMLElement>('.view[data-drawing]')) {
  let started = false;
  let desk: Desk | null = null;
  const once = (): Desk | null => {
    if (!started) {
      started = true;
      watch.disconnect();
      desk = start(view);
    }
    return desk;
  };
  const watch = new IntersectionObserver((entries) => entries.some(({ isIntersecting }) => isIntersecting) && once(), {
    rootMargin: NEAR,
  });
  watch.observe(view);
  document.addEventListener(FATE_EVENT, (event) => {
    if (event instanceof CustomEvent && event.detail.from === 'flow') once()?.choose(event.detail.rows);
  });
  for (const stream of document.querySelectorAll('.stream[data-rows]')) {
    stream.setAttribute('role', 'button');
    stream.setAttribute('aria-pressed', 'false');
  }
}
