import { wholeNumber } from '@/components/ui/numbers.ts';

/** "812 bytes", "41.3 kB", "2.0 MB": decimal units, as disks are sold. */
export function sizeText(sizeBytes: number): string {
  if (sizeBytes < 1000) return `${wholeNumber(sizeBytes)} bytes`;
  const [value, unit] = sizeBytes < 1e6 ? [sizeBytes / 1e3, 'kB'] : [sizeBytes / 1e6, 'MB'];
  return `${value < 100 ? value.toFixed(1) : wholeNumber(Math.round(value))} ${unit}`;
}
