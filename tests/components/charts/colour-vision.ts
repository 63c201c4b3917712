/** Colour arithmetic for the palette's test. */

export type Triple = readonly [number, number, number];
type Matrix = readonly [Triple, Triple, Triple];

/** Dichromacies as matrices on linear sRGB. Machado, Oliveira and Fernandes, "A physiologically-based model for
 *  simulation of color vision deficiency", IEEE TVCG 15 (2009), severity 1.0; and Viénot, Brettel and Mollon,
 *  "Digital video colourmaps for checking the legibility of displays by dichromats", Color Res. Appl. 24 (1999). */
export const DICHROMACIES: Readonly<Record<string, Matrix>> = {
  'protanopia (Machado)': [
    [0.152286, 1.052583, -0.204868],
    [0.114503, 0.786281, 0.099216],
    [-0.003882, -0.048116, 1.051998],
  ],
  'deuteranopia (Machado)': [
    [0.367322, 0.860646, -0.227968],
    [0.280085, 0.672501, 0.047413],
    [-0.01182, 0.04294, 0.968881],
  ],
  'tritanopia (Machado)': [
    [1.255528, -0.076749, -0.178779],
    [-0.078411, 0.930809, 0.147602],
    [0.004733, 0.691367, 0.3039],
  ],
  'protanopia (Viénot)': [
    [0.11238, 0.88762, 0],
    [0.11238, 0.88762, 0],
    [0.00401, -0.00401, 1],
  ],
  'deuteranopia (Viénot)': [
    [0.29275, 0.70725, 0],
    [0.29275, 0.70725, 0],
    [-0.02234, 0.02234, 1],
  ],
};

/** "#rrggbb" in linear light (IEC 61966-2-1). */
export function linear(hex: string): Triple {
  const channel = (at: number) => {
    const c = Number.parseInt(hex.slice(at, at + 2), 16) / 255;
    return c <= 0.04045 ? c / 12.92 : ((c + 0.055) / 1.055) ** 2.4;
  };
  return [channel(1), channel(3), channel(5)];
}

const dot = (a: Triple, b: Triple) => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
const clamp = (x: number) => Math.min(1, Math.max(0, x));

export const seenWith = (matrix: Matrix, colour: Triple): Triple => [
  clamp(dot(matrix[0], colour)),
  clamp(dot(matrix[1], colour)),
  clamp(dot(matrix[2], colour)),
];

/** Ottosson's OKLab (2020), a space in which equal steps look about equally far apart. */
export function oklab(c: Triple): Triple {
  const l = Math.cbrt(dot([0.4122214708, 0.5363325363, 0.0514459929], c));
  const m = Math.cbrt(dot([0.2119034982, 0.6806995451, 0.1073969566], c));
  const s = Math.cbrt(dot([0.0883024619, 0.2817188376, 0.6299787005], c));
  return [
    dot([0.2104542553, 0.793617785, -0.0040720468], [l, m, s]),
    dot([1.9779984951, -2.428592205, 0.4505937099], [l, m, s]),
    dot([0.0259040371, 0.7827717662, -0.808675766], [l, m, s]),
  ];
}

function fromOklab([L, a, b]: Triple): Triple {
  const l = (L + 0.3963377774 * a + 0.2158037573 * b) ** 3;
  const m = (L - 0.1055613458 * a - 0.0638541728 * b) ** 3;
  const s = (L - 0.0894841775 * a - 1.291485548 * b) ** 3;
  return [
    dot([4.0767416621, -3.3077115913, 0.2309699292], [l, m, s]),
    dot([-1.2684380046, 2.6097574011, -0.3413193965], [l, m, s]),
    dot([-0.0041960863, -0.7034186147, 1.707614701], [l, m, s]),
  ];
}

/** What `color-mix(in oklab, a share%, b)` paints. */
export function mixed(a: Triple, b: Triple, share: number): Triple {
  const [x, y] = [oklab(a), oklab(b)];
  const at = (i: 0 | 1 | 2) => x[i] * share + y[i] * (1 - share);
  return fromOklab([at(0), at(1), at(2)]).map(clamp) as unknown as Triple;
}

/** Distance in OKLab, in hundredths. */
export function distance(a: Triple, b: Triple): number {
  const [x, y] = [oklab(a), oklab(b)];
  return 100 * Math.hypot(x[0] - y[0], x[1] - y[1], x[2] - y[2]);
}

/** Contrast ratio as WCAG 2 defines it. */
export function contrast(a: Triple, b: Triple): number {
  const luminance = (c: Triple) => dot([0.2126, 0.7152, 0.0722], c) + 0.05;
  const [x, y] = [luminance(a), luminance(b)];
  return Math.max(x, y) / Math.min(x, y);
}
