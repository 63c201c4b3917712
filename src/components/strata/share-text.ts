/** "62 %", "0.3 %", "< 0.1 %". */
export function shareText(share: number): string {
  const percent = 100 * share;
  if (percent < 0.1) return percent === 0 ? '0\u202f%' : '<\u202f0.1\u202f%';
  return `${percent < 10 ? percent.toFixed(1) : Math.min(100, Math.round(percent))}\u202f%`;
}
