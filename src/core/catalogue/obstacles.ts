import { hammingBound, plotkinBound } from '../bounds/block-code-bounds.ts';
import { bscConverse } from '../bounds/bsc-converse.ts';
import { type FeasibilityReason, obstacleTo } from '../designs/feasibility/feasibility.ts';
import { treeBound } from '../designs/partial-linear-prediction.ts';
import type { CatalogueQuery } from './query.ts';

/** Orders of planes looked into when a window of lengths has none. */
const MAX_PLANES = 6;

/** Theorems that stand in the way of a query, whatever the catalogue holds: bounds that its numbers break, and planes of its
 *  lengths that cannot exist. Empty when none of these forbids it; what is missing may then be merely unknown here. */
export function obstaclesTo(query: CatalogueQuery): FeasibilityReason[] {
  const asked = shapeOf(query);
  return [distanceObstacle(asked), frameErrorObstacle(asked), treeObstacle(asked), ...missingPlanes(query)].filter(
    (reason) => reason !== null,
  );
}

/** The mildest reading of a query: the longest code, the fewest words. */
interface Shape {
  longest: number;
  leastDimension: number;
  distance: number;
  query: CatalogueQuery;
}

function shapeOf(query: CatalogueQuery): Shape {
  const { n, k, rate, payloadBits, parityBits, shortenTo, distanceMin = 0, radiusMin = 0 } = query;
  const fixed = payloadBits !== undefined && parityBits !== undefined ? payloadBits + parityBits : undefined;
  const longest = Math.floor(Math.min(n?.max ?? Infinity, shortenTo ?? Infinity, fixed ?? Infinity));
  const shortest = Math.max(n?.min ?? 1, shortenTo ?? 1, fixed ?? 1);
  const leastDimension = Math.max(k?.min ?? 0, payloadBits ?? 0, Math.ceil((rate?.min ?? 0) * shortest - 1e-9));
  return { longest, leastDimension, distance: Math.max(distanceMin, 2 * radiusMin + 1), query };
}

/** Any code of that dimension and distance can be lengthened with zeros, so the longest length decides. */
function distanceObstacle({ longest, leastDimension, distance }: Shape): FeasibilityReason | null {
  if (!Number.isFinite(longest) || leastDimension < 1 || distance < 2) return null;
  const asked = `A code of length ${longest} or less with dimension ${leastDimension} and distance ${distance}`;
  if (leastDimension + distance > longest + 1)
    return {
      rule: 'singleton',
      statement: `${asked} is impossible: k + d may not pass n + 1.`,
      source: {
        authors: 'R. C. Singleton',
        year: 1964,
        title: 'Maximum distance q-nary codes',
        where: 'IEEE Trans. Inf. Theory 10, 116–118',
      },
    };
  const words = plotkinBound({ n: longest, d: distance });
  if (words !== null && leastDimension > Math.log2(words) + 1e-9)
    return {
      rule: 'plotkin',
      statement: `${asked} is impossible: so large a distance leaves ${words} words at most.`,
      source: {
        authors: 'M. Plotkin',
        year: 1960,
        title: 'Binary codes with specified minimum distance',
        where: 'IRE Trans. Inf. Theory 6, 445–450',
      },
    };
  const most = hammingBound({ n: longest, d: distance });
  if (leastDimension > most + 1e-6)
    return {
      rule: 'hamming',
      statement: `${asked} is impossible: balls of radius ${Math.floor((distance - 1) / 2)} leave room for dimension ${Math.floor(most + 1e-6)} at most.`,
      source: {
        authors: 'R. W. Hamming',
        year: 1950,
        title: 'Error detecting and error correcting codes',
        where: 'Bell Syst. Tech. J. 29, 147–160',
      },
    };
  return null;
}

function frameErrorObstacle({ longest, leastDimension, query }: Shape): FeasibilityReason | null {
  const { p, targetFer } = query;
  if (p === undefined || targetFer === undefined || p >= 0.5) return null;
  if (!Number.isFinite(longest) || leastDimension < 1 || leastDimension > longest) return null;
  const least = bscConverse({ n: longest, k: leastDimension, p });
  if (least <= targetFer) return null;
  return {
    rule: 'sphere-packing-converse',
    statement: `At a raw error rate of ${p} no code of length ${longest} or less and dimension ${leastDimension} has a frame error rate below ${least.toPrecision(3)}, whatever its decoder; ${targetFer} was asked for.`,
    source: {
      authors: 'Y. Polyanskiy, H. V. Poor, S. Verdú',
      year: 2010,
      title: 'Channel coding rate in the finite blocklength regime',
      where: 'IEEE Trans. Inf. Theory 56, 2307–2359',
      part: 'Theorem 35',
    },
  };
}

/** From any bit a tree of checks and bits must fit below the girth. */
function treeObstacle({ longest, query }: Shape): FeasibilityReason | null {
  const { girthMin = 4, radiusMin = 0, columnWeight, rowWeight } = query;
  const votes = Math.max(columnWeight?.min ?? 2, 2 * radiusMin);
  const others = Math.max(1, (rowWeight?.min ?? 2) - 1);
  if (!Number.isFinite(longest) || girthMin < 6) return null;
  let bits = 1;
  let layer = 1;
  for (let depth = 1; depth <= Math.floor((girthMin / 2 - 1) / 2); depth++) {
    layer *= (depth === 1 ? votes : votes - 1) * others;
    bits += layer;
  }
  bits = Math.max(bits, treeBound(votes, girthMin));
  if (bits <= longest) return null;
  return {
    rule: 'tree-bound',
    statement: `Girth ${girthMin} with ${votes} checks a bit and ${others + 1} bits a check needs ${bits} bits; the longest length asked for is ${longest}.`,
    source: {
      authors: 'R. M. Tanner',
      year: 1981,
      title: 'A recursive approach to low complexity codes',
      where: 'IEEE Trans. Inf. Theory 27, 533–547',
      part: 'Theorem 2',
    },
  };
}

/** Planes, projective and affine, whose numbers of points fall in the window and that a theorem forbids. */
function missingPlanes({ n, shortenTo, payloadBits }: CatalogueQuery): FeasibilityReason[] {
  if (!n || n.max === undefined || shortenTo !== undefined || payloadBits !== undefined) return [];
  const reasons: FeasibilityReason[] = [];
  const first = Math.max(2, Math.floor(Math.sqrt(n.min ?? 0)) - 1);
  for (let order = first; order * order <= n.max && reasons.length < MAX_PLANES; order++) {
    const planes = [
      { t: 2, v: order * order, k: order, lambda: 1 },
      { t: 2, v: order * order + order + 1, k: order + 1, lambda: 1 },
    ];
    for (const plane of planes) {
      if (plane.v < (n.min ?? 0) || plane.v > n.max) continue;
      const reason = obstacleTo(plane);
      if (reason) reasons.push(reason);
    }
  }
  return reasons;
}
