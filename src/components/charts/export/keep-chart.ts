import { fileStem, saveFile } from '@/components/runs/save-file.ts';
import { chartSheet, type SheetWords } from './chart-sheet.ts';
import { embeddedFontFaces } from './font-faces.ts';
import { rasterise } from './raster.ts';

export type ChartFile = 'svg' | 'png';

/** Offers the chart as it stands, with legend and provenance, as a file to keep. */
export async function keepChart(drawing: SVGSVGElement, words: SheetWords, file: ChartFile): Promise<void> {
  const svg = chartSheet(drawing, words, await embeddedFontFaces());
  const name = `${fileStem(words.title)}.${file}`;
  if (file === 'svg') saveFile(name, 'image/svg+xml', svg);
  else saveFile(name, 'image/png', await rasterise(svg));
}
