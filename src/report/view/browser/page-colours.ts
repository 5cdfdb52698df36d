import { Color } from 'three';

/** Colours of the page as it looks now. */
export interface PageColours {
  readonly dark: boolean;
  readonly paper: Color;
  readonly ink: Color;
  readonly soft: Color;
  readonly pump: Color;
  readonly output: Color;
  readonly focus: Color;
  readonly groups: Readonly<Record<string, Color>>;
}

const LIGHT_PAPER = 0.5;

/** @param print as on white paper, whatever the screen shows */
export function pageColours(element: Element, print: boolean): PageColours {
  const style = getComputedStyle(element);
  const read = (name: string, onPaper: string) => new Color(print ? onPaper : style.getPropertyValue(name).trim());
  const paper = read('--panel', '#ffffff');
  const pump = read('--pump', '#2a66ad');
  const output = read('--output', '#0b7a5c');
  return {
    dark: paper.getHSL({ h: 0, s: 0, l: 0 }).l < LIGHT_PAPER,
    paper,
    ink: read('--ink', '#1b2226'),
    soft: read('--soft', '#565f66'),
    pump,
    output,
    focus: read('--focus', '#7a2fa0'),
    groups: {
      'pump-lost': pump,
      heat: read('--heat', '#b4461f'),
      'light-lost': read('--stray', '#c99a1b'),
      output,
    },
  };
}
