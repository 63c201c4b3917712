import type { Curve } from './curve.ts';
import { decoderShortName, decoderText } from './decoder-text.ts';

/** What decoded a curve's frames, in words. */
export const curveDecoderText = ({ decoder }: Pick<Curve, 'decoder'>): string =>
  decoder ? decoderText(decoder) : 'measured data';

/** For the end of a curve, where room is short. */
export const curveShortName = ({ decoder }: Pick<Curve, 'decoder'>): string =>
  decoder ? decoderShortName(decoder) : 'measured';
