/** Colours by the part they play; pages know light and dark, files of pictures light only. */
export const LIGHT = {
  paper: '#faf8f3',
  panel: '#fff',
  ink: '#1b2226',
  soft: '#565f66',
  line: '#d9d4c8',
  pump: '#2a66ad',
  heat: '#b4461f',
  stray: '#c99a1b',
  output: '#0b7a5c',
  focus: '#7a2fa0',
} as const;

export type ColourName = keyof typeof LIGHT;

export const DARK: Readonly<Record<ColourName, string>> = {
  paper: '#12171a',
  panel: '#1a2125',
  ink: '#e9e6df',
  soft: '#a7b0b6',
  line: '#364046',
  pump: '#6ea9ec',
  heat: '#f08b63',
  stray: '#e3bb52',
  output: '#3ccda2',
  focus: '#d79bf5',
};

/** As CSS variables: `--paper:#faf8f3;…`. */
export function colourVariables(colours: Readonly<Record<ColourName, string>>): string {
  return Object.entries(colours)
    .map(([name, colour]) => `--${name}:${colour}`)
    .join(';');
}
