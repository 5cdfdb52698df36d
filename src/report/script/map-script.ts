/**
 * Maps: the value and the cross-sections under the pointer or the arrow keys, and the slider of a cut. The packing is
 * that of shown-map.ts, the path that of charts/profile.ts.
 */
import { PACKED_FULL, PACKED_NOTHING } from '../shown-map.js';

export const MAP_SCRIPT = String.raw`
const bytesOf = (text) => Uint8Array.from(atob(text), (c) => c.charCodeAt(0));
const palette = bytesOf(document.body.dataset.palette);
const short = (value, digits) => String(Number(value.toPrecision(digits))).replace('-', '\u2212');

const mapOf = (figure) => {
  const data = figure.dataset;
  const cells = data.cells.split(' ').map(Number);
  const ends = data.extent.split(' ').map(Number);
  const packed = new DataView(bytesOf(data.values).buffer);
  const maximum = Number(data.maximum);
  const top = Number(data.top);
  const axes = data.axes.split('|');
  return {
    cells, axes, maximum, unit: data.unit, axisUnit: data.axisUnit,
    centre: (axis, cell) => ends[2 * axis] + ((cell + 0.5) / cells[axis]) * (ends[2 * axis + 1] - ends[2 * axis]),
    value: (at) => {
      const one = packed.getUint16(2 * (at[0] + cells[0] * (at[1] + cells[1] * at[2])), true);
      return one === ${PACKED_NOTHING} ? NaN : (one / ${PACKED_FULL}) * top;
    },
  };
};

const lineOf = (map, at, axis) => Array.from({ length: map.cells[axis] }, (_, i) => {
  const cell = at.slice();
  cell[axis] = i;
  return map.value(cell);
});

const pathOf = ([x, y, width, height], values, maximum) => {
  const step = width / values.length;
  let path = '';
  let drawing = false;
  values.forEach((value, i) => {
    if (!Number.isFinite(value)) { drawing = false; return; }
    const level = (y + height * (1 - Math.min(1, maximum > 0 ? value / maximum : 0))).toFixed(2);
    path += (drawing ? 'V' : 'M' + (x + i * step).toFixed(2) + ' ') + level + 'H' + (x + (i + 1) * step).toFixed(2);
    drawing = true;
  });
  return path;
};

const cutImage = (map, a, b, at) => {
  const canvas = document.createElement('canvas');
  canvas.width = map.cells[a];
  canvas.height = map.cells[b];
  const context = canvas.getContext('2d');
  const image = context.createImageData(canvas.width, canvas.height);
  const cell = at.slice();
  for (let v = 0; v < canvas.height; v++) {
    for (let u = 0; u < canvas.width; u++) {
      cell[a] = u;
      cell[b] = v;
      const value = map.value(cell);
      if (!Number.isFinite(value)) continue;
      const colour = 3 * Math.min(255, Math.max(0, Math.floor(map.maximum > 0 ? (256 * value) / map.maximum : 0)));
      const pixel = 4 * (u + canvas.width * (canvas.height - 1 - v));
      for (let c = 0; c < 3; c++) image.data[pixel + c] = palette[colour + c];
      image.data[pixel + 3] = 255;
    }
  }
  context.putImageData(image, 0, 0);
  return canvas.toDataURL();
};

for (const figure of document.querySelectorAll('.map[data-values]')) {
  let known = null;
  const map = () => (known ??= mapOf(figure));
  for (const cut of figure.querySelectorAll('.cut')) {
    const svg = cut.querySelector('svg');
    const image = svg.querySelector('image');
    const slider = cut.querySelector('input');
    const readout = cut.querySelector('.readout');
    const [a, b] = cut.dataset.across.split(' ').map(Number);
    const along = Number(cut.dataset.along);
    const at = cut.dataset.at.split(' ').map(Number);
    const size = (name) => Number(image.getAttribute(name));

    const show = () => {
      const { axes, axisUnit, cells, maximum, unit, centre, value } = map();
      const place = (axis) => axes[axis] + ' = ' + short(centre(axis, at[axis]), 3) + axisUnit;
      const x = size('x') + ((at[a] + 0.5) / cells[a]) * size('width');
      const y = size('y') + (1 - (at[b] + 0.5) / cells[b]) * size('height');
      for (const name of ['x1', 'x2']) svg.querySelector('.cross-u').setAttribute(name, x);
      for (const name of ['y1', 'y2']) svg.querySelector('.cross-v').setAttribute(name, y);
      for (const [name, axis, other] of [['u', a, b], ['v', b, a]]) {
        const path = svg.querySelector('.profile-' + name);
        path.setAttribute('d', pathOf(path.dataset.box.split(' ').map(Number), lineOf(map(), at, axis), maximum));
        svg.querySelector('.profile-caption-' + name).textContent = 'over ' + axes[axis] + '; ' + place(other);
      }
      const here = value(at);
      readout.textContent = place(a) + ', ' + place(b) + ': ' +
        (Number.isFinite(here) ? short(here, 3) + ' ' + unit : 'nothing to light here');
    };

    const point = (event) => {
      const spot = new DOMPoint(event.clientX, event.clientY).matrixTransform(svg.getScreenCTM().inverse());
      const u = (spot.x - size('x')) / size('width');
      const v = 1 - (spot.y - size('y')) / size('height');
      if (u < 0 || u >= 1 || v < 0 || v >= 1) return;
      at[a] = Math.floor(u * map().cells[a]);
      at[b] = Math.min(map().cells[b] - 1, Math.floor(v * map().cells[b]));
      show();
    };
    svg.addEventListener('pointermove', point);
    svg.addEventListener('pointerdown', point);

    cut.addEventListener('keydown', (event) => {
      if (event.target === slider) return;
      const move = { ArrowLeft: [a, -1], ArrowRight: [a, 1], ArrowDown: [b, -1], ArrowUp: [b, 1] }[event.key];
      if (!move) return;
      event.preventDefault();
      at[move[0]] = Math.min(map().cells[move[0]] - 1, Math.max(0, at[move[0]] + move[1]));
      show();
    });

    if (slider) slider.addEventListener('input', () => {
      at[along] = Number(slider.value);
      const words = map().axes[along] + ' = ' + short(map().centre(along, at[along]), 3) + ' mm';
      cut.querySelector('.slice-text').textContent = words;
      cut.querySelector('.print-only').textContent = 'cut at ' + words;
      image.setAttribute('href', cutImage(map(), a, b, at));
      show();
    });
  }
}`;
