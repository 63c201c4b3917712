/** "Gallager B, bit flipping: this engine has no WebAssembly SIMD: 32 frames at a time in TypeScript.", a sentence a
 *  reason. */
export function kernelSentences(kernels: readonly { name: string; reason: string }[]): string[] {
  const byReason = new Map<string, Set<string>>();
  for (const { name, reason } of kernels) byReason.set(reason, (byReason.get(reason) ?? new Set()).add(name));
  return [...byReason].map(([reason, names]) => `${[...names].join(', ')}: ${reason}.`);
}
