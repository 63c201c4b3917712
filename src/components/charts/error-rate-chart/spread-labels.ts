/** A label that wants to stand at height `y` and covers [x, x + width]. */
export interface WantedLabel {
  x: number;
  y: number;
  width: number;
}

/** Heights that keep labels `gap` apart wherever their extents overlap sideways, each as near to where it wants to be
 *  as can be (least sum of squared moves), in the wanted order, within [top, bottom].
 *
 *  With z_i = y_i − i·gap the condition "at least gap apart" becomes "z does not fall", which is isotonic regression;
 *  pool-adjacent-violators solves it exactly (Ayer and others, Ann. Math. Statist. 26 (1955) 641–647). */
export function spreadLabels(labels: readonly WantedLabel[], gap: number, top: number, bottom: number): number[] {
  const heights = labels.map((label) => label.y);
  for (const cluster of sidewaysClusters(labels)) {
    cluster.sort((a, b) => labels[a]!.y - labels[b]!.y);
    const wanted = cluster.map((index, i) => labels[index]!.y - i * gap);
    const highest = bottom - (cluster.length - 1) * gap;
    isotonic(wanted).forEach((z, i) => {
      heights[cluster[i]!] = Math.max(top, Math.min(highest, z)) + i * gap;
    });
  }
  return heights;
}

/** Groups of labels linked by sideways overlap. */
function sidewaysClusters(labels: readonly WantedLabel[]): number[][] {
  const order = labels.map((_, i) => i).sort((a, b) => labels[a]!.x - labels[b]!.x);
  const clusters: number[][] = [];
  let reach = -Infinity;
  for (const index of order) {
    const { x, width } = labels[index]!;
    if (x < reach) clusters.at(-1)!.push(index);
    else clusters.push([index]);
    reach = Math.max(reach, x + width);
  }
  return clusters;
}

function isotonic(values: readonly number[]): number[] {
  const blocks: { sum: number; count: number }[] = [];
  const mean = (block: { sum: number; count: number }) => block.sum / block.count;
  for (const value of values) {
    blocks.push({ sum: value, count: 1 });
    while (blocks.length > 1 && mean(blocks.at(-2)!) > mean(blocks.at(-1)!)) {
      const last = blocks.pop()!;
      const before = blocks.at(-1)!;
      before.sum += last.sum;
      before.count += last.count;
    }
  }
  return blocks.flatMap((block) => Array<number>(block.count).fill(mean(block)));
}
