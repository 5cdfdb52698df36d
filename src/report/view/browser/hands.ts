import type { Eye } from './eye.js';

const PER_PIXEL = 0.008;
export const KEY_TURN = Math.PI / 18;
export const KEY_NEARER = 1.2;
const KEY_SHIFT = 40;
/** A press that moved less is a choice, not a turn. */
const STILL = 4;

const TURNS: Readonly<Record<string, readonly [number, number]>> = {
  ArrowLeft: [1, 0],
  ArrowRight: [-1, 0],
  ArrowUp: [0, 1],
  ArrowDown: [0, -1],
};

/**
 * Mouse, touch and keys turn the eye. One finger turns sideways only, so that a page can still be scrolled; the wheel
 * works while the picture has the focus or Ctrl is held.
 */
export function handsOn(
  canvas: HTMLElement,
  eye: Eye,
  changed: () => void,
  chosen: (x: number, y: number) => void,
): void {
  const down = new Map<number, { x: number; y: number }>();
  let moved = 0;

  canvas.addEventListener('pointerdown', (event) => {
    down.set(event.pointerId, { x: event.offsetX, y: event.offsetY });
    canvas.setPointerCapture(event.pointerId);
    moved = 0;
  });
  canvas.addEventListener('pointermove', (event) => {
    const last = down.get(event.pointerId);
    if (last === undefined) return;
    const [dx, dy] = [event.offsetX - last.x, event.offsetY - last.y];
    const other = [...down].find(([id]) => id !== event.pointerId)?.[1];
    down.set(event.pointerId, { x: event.offsetX, y: event.offsetY });
    moved += Math.abs(dx) + Math.abs(dy);
    if (other !== undefined) {
      const before = Math.hypot(last.x - other.x, last.y - other.y);
      const after = Math.hypot(event.offsetX - other.x, event.offsetY - other.y);
      if (before > 0 && after > 0) eye.nearer(after / before);
      eye.shift(dx / 2, dy / 2);
    } else if (event.shiftKey || event.buttons === 2 || event.buttons === 4) eye.shift(dx, dy);
    else if (moved > STILL) eye.turn(-dx * PER_PIXEL, dy * PER_PIXEL);
    changed();
  });
  for (const end of ['pointerup', 'pointercancel'] as const) {
    canvas.addEventListener(end, (event) => {
      const known = down.delete(event.pointerId);
      if (known && end === 'pointerup' && moved <= STILL) chosen(event.offsetX, event.offsetY);
    });
  }
  canvas.addEventListener('contextmenu', (event) => event.preventDefault());
  canvas.addEventListener(
    'wheel',
    (event) => {
      if (!event.ctrlKey && document.activeElement !== canvas) return;
      event.preventDefault();
      eye.nearer(KEY_NEARER ** (-event.deltaY / 100));
      changed();
    },
    { passive: false },
  );
  canvas.addEventListener('keydown', (event) => {
    if (event.ctrlKey || event.metaKey || event.altKey) return;
    const turn = TURNS[event.key];
    if (turn !== undefined && event.shiftKey) eye.shift(KEY_SHIFT * turn[0], KEY_SHIFT * turn[1]);
    else if (turn !== undefined) eye.turn(KEY_TURN * turn[0], KEY_TURN * turn[1]);
    else if (event.key === '+' || event.key === '=') eye.nearer(KEY_NEARER);
    else if (event.key === '-' || event.key === '\u2212') eye.nearer(1 / KEY_NEARER);
    else return;
    event.preventDefault();
    changed();
  });
}
