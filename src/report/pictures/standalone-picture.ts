/** A chart of the page as an SVG file of its own: title, caption, colours and fonts inside, nothing from a page or a network. */
import { CHART_STYLE } from '../charts/chart-style.js';
import { type Picture, round } from '../charts/picture.js';
import { type ColourName, LIGHT } from '../colours.js';
import { type Markup, markup, trusted } from '../markup.js';

/** Paper of a file is white, for print. */
const COLOURS: Readonly<Record<ColourName, string>> = { ...LIGHT, paper: '#ffffff' };
/** By name, the nearest in width first; a system without any of them takes its own. */
const FONT_FAMILY = 'DejaVu Sans Condensed, DejaVu Sans, Arial, Liberation Sans, sans-serif';

const MARGIN = 16;
const GAP = 22;
const TITLE = 15;
const TEXT = 11;
const LINE = 15;
/** Width of a letter of the text on average, in units of its size; wide enough for the fonts named. */
const LETTER = 0.535;
/** A narrow chart still leaves room for its title. */
const NARROWEST = 340;

export interface PictureWords {
  readonly title: string;
  /** Of the design. */
  readonly subtitle: string;
  /** What the picture shows and how sure it is, a text a paragraph. */
  readonly facts: readonly string[];
  /** What was run. */
  readonly foot: string;
}

export interface DrawnPicture {
  /** Text of an SVG document. */
  readonly svg: string;
  readonly width: number;
}

/** Charts side by side under one title. */
export function standalonePicture(
  pictures: readonly Picture[],
  { title, subtitle, facts, foot }: PictureWords,
): DrawnPicture {
  const inside = Math.max(
    NARROWEST,
    pictures.reduce((sum, { width }) => sum + width + GAP, -GAP),
  );
  const letters = Math.floor(inside / (TEXT * LETTER));
  const titleLines = wrapped(title, Math.floor(inside / (TITLE * LETTER * 1.08)));
  const factLines = facts.flatMap((text) => wrapped(text, letters));
  let y = MARGIN;
  const text = (line: string, size: number, name: string): Markup => {
    y += size === TITLE ? TITLE + 3 : LINE;
    return markup`<text class="${name}" x="${MARGIN}" y="${y}">${line}</text>`;
  };
  const head = [
    ...titleLines.map((line) => text(line, TITLE, 'file-title')),
    ...wrapped(subtitle, letters).map((line) => text(line, TEXT, 'file-text')),
    ...factLines.map((line) => text(line, TEXT, 'file-text')),
  ];
  y += 10;
  let x = MARGIN;
  const charts = pictures.map((picture) => {
    const placed = placedAt(picture, x, y);
    x += picture.width + GAP;
    return placed;
  });
  y += Math.max(0, ...pictures.map(({ height }) => height));
  const feet = wrapped(foot, letters).map((line) => text(line, TEXT, 'file-text'));
  const width = round(inside + 2 * MARGIN);
  const height = round(y + MARGIN);
  const svg = portable(
    markup`<svg xmlns="http://www.w3.org/2000/svg" xmlns:xlink="http://www.w3.org/1999/xlink" width="${width}" height="${height}" viewBox="0 0 ${width} ${height}" font-family="${FONT_FAMILY}"><title>${title}</title><style>${trusted(STYLE)}</style><rect width="${width}" height="${height}" fill="${COLOURS.paper}"/>${head}${charts}${feet}</svg>
`.text,
  );
  return { svg, width };
}

/** Cells of a map must not run into each other: the drawer of PNG files knows the older word for it, and passes over the rule for browsers. */
const STYLE = resolved(`${CHART_STYLE}
.file-title{font-size:${TITLE}px;font-weight:600;fill:var(--ink)}
.file-text{font-size:${TEXT}px;fill:var(--soft)}
.heat-map image{image-rendering:optimizeSpeed}
@supports (image-rendering:pixelated){.heat-map image{image-rendering:pixelated}}
`);

/** Colours in place of their names. */
function resolved(style: string): string {
  return style.replace(/var\(--([a-z]+)\)/g, (_, name: string) => {
    if (!Object.hasOwn(COLOURS, name)) throw new Error(`no colour is called ${name}`);
    return COLOURS[name as ColourName];
  });
}

function placedAt({ text, width, height }: Picture, x: number, y: number): Markup {
  // Its first tag is of our own making.
  return trusted(text.replace('<svg ', `<svg x="${round(x)}" y="${round(y)}" width="${width}" height="${height}" `));
}

/** The older name of a link, which every reader of SVG knows. Texts of a design are escaped and hold no such tag. */
function portable(svg: string): string {
  return svg.replace(/<(image|use) href=/g, '<$1 xlink:href=');
}

/** Lines of at most so many letters, broken between words; a longer word is cut. */
export function wrapped(text: string, letters: number): readonly string[] {
  const lines: string[] = [];
  let line = '';
  for (const word of text.split(/[ \n]+/).filter((part) => part !== '')) {
    const characters = [...word];
    const short = characters.length > letters ? `${characters.slice(0, letters - 1).join('')}…` : word;
    const joined = line === '' ? short : `${line} ${short}`;
    if ([...joined].length > letters) {
      lines.push(line);
      line = short;
    } else line = joined;
  }
  return line === '' ? lines : [...lines, line];
}
