/** How a curve is drawn. Colour, line pattern and end label each tell the curves apart on their own. */
export interface CurveStyle {
  /** On paper and on blueprint. */
  paper: string;
  blueprint: string;
  /** Dash lengths for `stroke-dasharray`; empty is a solid line. */
  dash: string;
  /** The pattern in words, for descriptions. */
  pattern: string;
  /** A, B, C …: the end label where there is no room for the full one. */
  letter: string;
}

/** Eight colours on each ground, chosen by a search for the largest least distance between any two under normal
 *  vision and under simulated protanopia, deuteranopia and tritanopia. tests/components/charts/palette holds them to it. */
export const CURVE_COLOURS = {
  paper: ['#1f5a96', '#b23a22', '#143a1a', '#d47600', '#4a175d', '#1d98b9', '#7d3b57', '#a66f6c'],
  blueprint: ['#7fb8f0', '#ff9473', '#d3ffbc', '#f9d42f', '#917aeb', '#85eaff', '#a46c81', '#d96020'],
} as const;

export const CURVE_PATTERNS = [
  { dash: '', pattern: 'solid' },
  { dash: '8 4', pattern: 'dashed' },
  { dash: '2 3.5', pattern: 'dotted' },
  { dash: '10 3.5 2 3.5', pattern: 'dash-dot' },
  { dash: '18 5', pattern: 'long dashes' },
  { dash: '10 3 2 3 2 3', pattern: 'dash-dot-dot' },
  { dash: '5 2.5', pattern: 'short dashes' },
  { dash: '18 4 4 4', pattern: 'long and short dashes' },
] as const;

const COUNT = CURVE_PATTERNS.length;

/** The style of the i-th curve. Past eight, patterns shift against colours, so that 64 curves differ in the pair. */
export function curveStyle(i: number): CurveStyle {
  const colour = i % COUNT;
  const { dash, pattern } = CURVE_PATTERNS[(colour + Math.floor(i / COUNT)) % COUNT]!;
  return {
    paper: CURVE_COLOURS.paper[colour]!,
    blueprint: CURVE_COLOURS.blueprint[colour]!,
    dash,
    pattern,
    letter: curveLetter(i),
  };
}

/** A … Z, then AA, AB …, as columns are lettered. */
function curveLetter(i: number): string {
  const last = String.fromCharCode(65 + (i % 26));
  return i < 26 ? last : curveLetter(Math.floor(i / 26) - 1) + last;
}

/** The colour as CSS, following the ground. */
export const curveColour = (style: CurveStyle): string => `light-dark(${style.paper}, ${style.blueprint})`;

/** For small text in the curve's colour: drawn towards the ink so that it can be read. */
export const curveTextColour = (style: CurveStyle): string =>
  `color-mix(in oklab, ${curveColour(style)} ${LABEL_COLOUR_SHARE}%, var(--ink))`;

export const LABEL_COLOUR_SHARE = 60;
