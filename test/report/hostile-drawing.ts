import type { Drawing } from '../../src/record/drawing.js';
import { boxDrawing } from './box-drawing.js';

/** A drawing of which every name is hostile, the texts taking turns. */
export function hostileDrawing(texts: readonly string[]): Drawing {
  const drawing = boxDrawing();
  let turn = 0;
  const next = () => texts[turn++ % texts.length];
  return {
    ...drawing,
    parts: drawing.parts.map((part) => ({
      ...part,
      name: next(),
      medium: next(),
      faces: part.faces.map((face) => ({ ...face, name: next(), finish: next(), finishKind: next() })),
    })),
    pumps: drawing.pumps.map((pump) => ({ ...pump, name: next() })),
    planes: [{ name: next(), isExit: false, normal: [0, 0, 1], edges: [0, 0, 9, 5, 0, 9, 5, 0, 9, 5, 5, 9] }],
    paths: drawing.paths.map((path) => ({ ...path, end: { ...path.end, where: next(), by: next() } })),
  };
}
