import { counted, wholeNumber } from '@/components/ui/numbers.ts';
import type { UploadSummary } from '@/core/codes/uploaded-sheet.ts';
import type { UploadFormat } from '@/core/formats/recognise.ts';

export const formatTitles: Record<UploadFormat, string> = {
  alist: 'alist',
  mtx: 'Matrix Market',
  csv: 'CSV of row and column',
  json: 'JSON',
  npz: 'SciPy sparse .npz',
  npy: 'NumPy dense .npy',
  mat: 'MATLAB level-5 sparse .mat',
  c: 'C header',
  qc: 'quasi-cyclic shift table',
  blocks: 'block list, text',
  'blocks-json': 'block list, JSON',
};

/** What a file holds, in a sentence. */
export function summaryText(summary: UploadSummary): string {
  if (summary.kind === 'blocks') {
    const { points, blocks, incidences } = summary;
    return `${counted(blocks, 'block')} on ${counted(points, 'point')}, ${counted(incidences, 'incidence')}`;
  }
  const { rows, cols, ones } = summary;
  return `a matrix of ${wholeNumber(rows)} rows and ${wholeNumber(cols)} columns with ${counted(ones, 'one')}`;
}
