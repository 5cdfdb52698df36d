import { Markup, markup, type Piece } from '../markup.js';

export interface PictureText {
  /** Unique on the page. */
  readonly id: string;
  readonly title: string;
  /** What the picture shows, in words, for those who do not see it. */
  readonly description: string;
  /** group: its parts can be reached one by one. */
  readonly role?: 'img' | 'group';
}

/** An SVG drawing that knows its size, in the units of its contents. */
export class Picture extends Markup {
  constructor(
    text: string,
    readonly width: number,
    readonly height: number,
  ) {
    super(text);
  }
}

/** An SVG drawing with its alternative text; `width` and `height` are the units of its contents. */
export function picture(
  { id, title, description, role = 'img' }: PictureText,
  width: number,
  height: number,
  contents: Piece,
  className = '',
): Picture {
  const { text } =
    markup`<svg role="${role}" class="picture ${className}" viewBox="0 0 ${round(width)} ${round(height)}" aria-labelledby="${id}-title ${id}-description"><title id="${id}-title">${title}</title><desc id="${id}-description">${description}</desc>${contents}</svg>`;
  return new Picture(text, round(width), round(height));
}

/** Coordinates need no more than a hundredth of a unit. */
export function round(value: number): number {
  return Math.round(value * 100) / 100 + 0;
}
