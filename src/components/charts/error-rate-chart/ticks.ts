import { scaleLinear } from 'd3-scale';

export interface Tick {
  value: number;
  at: number;
  isLabelled: boolean;
}

type Place = (value: number) => number;

/** Digits in the order in which they earn a label when there is not room for all. */
const LABEL_ORDER = [1, 5, 2, 3, 1.5, 7, 4, 6, 8, 9];
const CHANNEL_DIGITS = [1, 1.5, 2, 3, 4, 5, 6, 7, 8, 9];
const RATE_DIGITS = [1, 2, 3, 4, 5, 6, 7, 8, 9];

/** Ticks of the p axis at every digit of every decade in the window, and at 1.5 in the wide gap after 1; as many labelled as stand `gapPx` apart. A window
 *  too short to hold three of them is ticked evenly instead. */
export function channelTicks(pMax: number, pMin: number, place: Place, gapPx: number): Tick[] {
  const values = digitMultiples(pMin, pMax, CHANNEL_DIGITS);
  const all = values.length >= 3 ? values : scaleLinear().domain([pMin, pMax]).ticks(5);
  const rank = (value: number) => LABEL_ORDER.indexOf(leadingDigit(value));
  const taken: number[] = [];
  const labelled = new Set<number>();
  for (const value of [...all].sort((a, b) => rank(a) - rank(b) || b - a)) {
    const at = place(value);
    if (taken.some((other) => Math.abs(other - at) < gapPx)) continue;
    taken.push(at);
    labelled.add(value);
  }
  return all.map((value) => ({ value, at: place(value), isLabelled: labelled.has(value) }));
}

/** Decades of the rate axis, every one, second or fifth labelled as room allows, with the digits between as minor
 *  ticks; inside a single decade the digits themselves are labelled. */
export function rateTicks(top: number, bottom: number, place: Place, gapPx: number): { major: Tick[]; minor: Tick[] } {
  const first = Math.floor(Math.log10(top) + 1e-9);
  const last = Math.ceil(Math.log10(bottom) - 1e-9);
  const decades: number[] = [];
  for (let e = first; e >= last; e--) decades.push(e);
  const decadePx = Math.abs(place(1e-2) - place(1e-1));
  const digits = digitMultiples(bottom, top, RATE_DIGITS).filter((value) => leadingDigit(value) !== 1);
  if (decades.length < 2) {
    const inside =
      digits.length >= 2 ? [...digits, ...decades.map(power)] : scaleLinear().domain([bottom, top]).ticks(5);
    return { major: spaced(inside, place, gapPx), minor: [] };
  }
  const step = [1, 2, 5, 10, 20].find((s) => s * decadePx >= gapPx) ?? 50;
  const major = decades.map((e) => ({ value: power(e), at: place(power(e)), isLabelled: e % step === 0 }));
  const minor = decadePx >= 36 ? digits.map((value) => ({ value, at: place(value), isLabelled: false })) : [];
  return { major, minor };
}

function spaced(values: readonly number[], place: Place, gapPx: number): Tick[] {
  let lastAt = -Infinity;
  return [...values]
    .sort((a, b) => b - a)
    .map((value) => {
      const at = place(value);
      const isLabelled = at - lastAt >= gapPx;
      if (isLabelled) lastAt = at;
      return { value, at, isLabelled };
    });
}

/** Powers of ten as the decimal literal has them, so that −4 gives 0.0001 and not its neighbour. */
const power = (e: number) => Number(`1e${e}`);

const leadingDigit = (value: number) => Number(value.toExponential(1).split('e')[0]);

/** d·10^e for each digit d within [low, high], ascending. */
function digitMultiples(low: number, high: number, digits: readonly number[]): number[] {
  const values: number[] = [];
  for (let e = Math.floor(Math.log10(low)); e <= Math.ceil(Math.log10(high)); e++)
    for (const digit of digits) {
      const value = Number(`${digit}e${e}`);
      if (value >= low * (1 - 1e-9) && value <= high * (1 + 1e-9)) values.push(value);
    }
  return values;
}
