/** The ground's colours as a canvas needs them. */
export interface PlotColours {
  sheet: string;
  ink: string;
  quiet: string;
  hair: string;
  act: string;
}

export function coloursOf(element: Element): PlotColours {
  const style = getComputedStyle(element);
  const token = (name: string, otherwise: string) => style.getPropertyValue(name).trim() || otherwise;
  return {
    sheet: token('--sheet', '#ffffff'),
    ink: token('--ink', '#000000'),
    quiet: token('--quiet', '#666666'),
    hair: token('--hair', '#dddddd'),
    act: token('--act', '#b23a22'),
  };
}

/** Little-endian RGBA words for 0…full ones: from nothing to full ink. */
export function shadeTable(ink: string, full: number): Uint32Array {
  const hex = /^#([0-9a-f]{6})$/i.exec(ink)?.[1] ?? '000000';
  const rgb = Number.parseInt(hex, 16);
  const bgr = ((rgb & 0xff) << 16) | (rgb & 0xff00) | (rgb >> 16);
  return Uint32Array.from({ length: full + 1 }, (_, count) => ((Math.round((255 * count) / full) << 24) | bgr) >>> 0);
}
