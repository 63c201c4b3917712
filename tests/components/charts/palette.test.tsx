import { describe, expect, it } from 'vitest';
import { CURVE_COLOURS, CURVE_PATTERNS, curveStyle, LABEL_COLOUR_SHARE } from '@/components/charts/palette.ts';
import { contrast, DICHROMACIES, distance, linear, mixed, seenWith } from './colour-vision.ts';

const grounds = {
  paper: { sheet: linear('#fffdf7'), ink: linear('#1d2b34') },
  blueprint: { sheet: linear('#17303f'), ink: linear('#e8eff3') },
} as const;

/** Hundredths of OKLab; two differs by about a just noticeable difference, so eight is plain to see. */
const LEAST_DISTANCE = 9;

const leastDistance = (colours: readonly ReturnType<typeof linear>[]) =>
  Math.min(...colours.flatMap((a, i) => colours.slice(0, i).map((b) => distance(a, b))));

describe.each(['paper', 'blueprint'] as const)('the eight curve colours on %s', (ground) => {
  const colours = CURVE_COLOURS[ground].map(linear);

  it('differ under normal vision', () => {
    expect(leastDistance(colours)).toBeGreaterThan(LEAST_DISTANCE);
  });

  it.each(Object.entries(DICHROMACIES))('differ under %s', (_, matrix) => {
    expect(leastDistance(colours.map((colour) => seenWith(matrix, colour)))).toBeGreaterThan(LEAST_DISTANCE);
  });

  it('stand 3:1 or better against the sheet, as WCAG 2 asks of graphics', () => {
    for (const colour of colours) expect(contrast(colour, grounds[ground].sheet)).toBeGreaterThanOrEqual(3);
  });

  it('give labels that hold 5:1 against the sheet', () => {
    const { sheet, ink } = grounds[ground];
    for (const colour of colours)
      expect(contrast(mixed(colour, ink, LABEL_COLOUR_SHARE / 100), sheet)).toBeGreaterThanOrEqual(5);
  });
});

describe('curve styles', () => {
  it('have eight line patterns, all different', () => {
    expect(new Set(CURVE_PATTERNS.map((pattern) => pattern.dash)).size).toBe(8);
  });

  it('differ in colour or pattern for 64 curves, and always in the letter', () => {
    const styles = Array.from({ length: 64 }, (_, i) => curveStyle(i));
    expect(new Set(styles.map((style) => style.paper + style.dash)).size).toBe(64);
    expect(new Set(styles.map((style) => style.letter)).size).toBe(64);
    expect(styles[26]?.letter).toBe('AA');
  });
});
