import type { ChartCurve } from '../chart-curve.ts';
import { plainColour, styledCopy } from './styled-copy.ts';
import { wrapText } from './wrap-text.ts';

/** What stands around the drawing in a file, so that it can be understood without the page it is from. */
export interface SheetWords {
  title: string;
  curves: readonly ChartCurve[];
  /** What the marks mean. */
  key: string;
  /** Runs and seeds the points are from. */
  provenance: string;
}

const SVG = 'http://www.w3.org/2000/svg';
const FACE = "'Atkinson Hyperlegible Next Variable', 'Atkinson Hyperlegible Next', 'Helvetica Neue', Arial, sans-serif";
const MARGIN = 16;
const TITLE_HEIGHT = 40;
const LINE = 18;
/** Mean advance of the face at 12 pixels. */
const ADVANCE = 6.1;

/** The drawing with its title above, its legend, key and provenance below, as one SVG that stands alone.
 *  @param fontFaces `@font-face` rules with the faces in them. */
export function chartSheet(drawing: SVGSVGElement, words: SheetWords, fontFaces = ''): string {
  const { width } = drawing.viewBox.baseVal;
  const height = Math.ceil(drawing.viewBox.baseVal.height);
  const ground = getComputedStyle(drawing);
  const token = (name: string) => plainColour(ground.getPropertyValue(name).trim() || '#000000');
  const ink = token('--ink');
  const quiet = token('--quiet');
  const most = Math.floor((width - 2 * MARGIN) / ADVANCE);
  const below = [
    ...wrapText(words.key, most),
    ...wrapText(words.provenance, most),
    ...wrapText('Rates hold for the channel model and decoder stated, not for a device.', most),
  ];
  const legendTop = TITLE_HEIGHT + height + 14;
  const textTop = legendTop + words.curves.length * LINE + 10;
  const total = textTop + below.length * LINE + MARGIN;

  const copy = styledCopy(drawing);
  place(copy, { x: 0, y: TITLE_HEIGHT, width, height });
  const sheet = make('svg', {
    xmlns: SVG,
    viewBox: `0 0 ${width} ${total}`,
    width,
    height: total,
    'font-family': FACE,
  });
  if (fontFaces) sheet.append(make('style', {}, fontFaces));
  sheet.append(
    make('title', {}, words.title),
    make('rect', { width, height: total, fill: token('--sheet') }),
    make('text', { x: MARGIN, y: 27, fill: ink, 'font-size': 16, 'font-weight': 600 }, words.title),
    copy,
    ...words.curves.flatMap(({ label, style }, i) => {
      const y = legendTop + i * LINE;
      const colour = plainColour(curveColourNow(drawing, style));
      return [
        make('line', {
          ...{ x1: MARGIN, x2: MARGIN + 34, y1: y, y2: y, stroke: colour, 'stroke-width': 2 },
          'stroke-dasharray': style.dash || 'none',
        }),
        make('circle', { cx: MARGIN + 17, cy: y, r: 3.2, fill: colour }),
        make('text', { x: MARGIN + 44, y: y + 4, fill: ink, 'font-size': 12 }, `${style.letter}  ${label}`),
      ];
    }),
    ...below.map((line, i) =>
      make('text', { x: MARGIN, y: textTop + i * LINE + 8, fill: quiet, 'font-size': 12 }, line),
    ),
  );
  return new XMLSerializer().serializeToString(sheet);
}

/** The curve's colour on the ground that the page has now. */
function curveColourNow(drawing: SVGSVGElement, style: ChartCurve['style']): string {
  const scheme = getComputedStyle(drawing).colorScheme;
  const dark = scheme === 'dark' || (scheme !== 'light' && matchMedia('(prefers-color-scheme: dark)').matches);
  return dark ? style.blueprint : style.paper;
}

function make(name: string, attributes: Record<string, string | number>, text?: string): SVGElement {
  const element = document.createElementNS(SVG, name) as SVGElement;
  place(element, attributes);
  if (text !== undefined) element.textContent = text;
  return element;
}

function place(element: Element, attributes: Record<string, string | number>): void {
  for (const [name, value] of Object.entries(attributes)) {
    if (name !== 'xmlns') element.setAttribute(name, String(value));
  }
}
