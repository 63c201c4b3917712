import { type CurveStyle, curveStyle } from '@/components/charts/palette.ts';

/** How a group of blocks is drawn: colour and line pattern, 64 pairs that all differ, and always its name beside. */
export const groupStyle = (group: number): CurveStyle => curveStyle(group % 64);
