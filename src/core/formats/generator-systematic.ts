import { systematicEncoder } from '../codes/encode/systematic-encoder.ts';
import type { SparseMatrix } from '../codes/sparse-matrix.ts';
import { FormatError, LimitError } from '../errors.ts';
import { wordBitOrder, wordFromHex, wordToHex } from './hexadecimal.ts';
import { linesOf } from './keyed-lines.ts';
import { refuseBeyondLimits } from './matrix-limits.ts';

/** Most bits that the parity part may hold. */
const maxParityBits = 2 ** 28;

/** A systematic generator matrix: which positions carry the information, and the parity bits of each. */
export interface SystematicGenerator {
  n: number;
  /** Position of information bit i, ascending. */
  infoPositions: Uint32Array;
  /** All other positions, ascending. */
  parityPositions: Uint32Array;
  /** Row i: the parity bits, in the order of their positions, of the word whose only information bit is i. */
  parity: Uint8Array[];
}

/** @throws LimitError when the parity part would pass 2^28 bits. */
export function systematicGenerator(H: SparseMatrix): SystematicGenerator {
  const encoder = systematicEncoder({ H });
  const { k, infoPositions } = encoder;
  const n = H.cols;
  refuseParity(k, n);
  const isInfo = new Uint8Array(n);
  for (const c of infoPositions) isInfo[c] = 1;
  const parityPositions = Uint32Array.from({ length: n }, (_, c) => c).filter((c) => !isInfo[c]);
  return { n, infoPositions, parityPositions, parity: [...encoder.parityRows()] };
}

/** The systematic generator as text: positions, then one row of parity bits a line in hexadecimal. */
export function writeGeneratorSystematic(H: SparseMatrix): Uint8Array {
  const { n, infoPositions, parityPositions, parity } = systematicGenerator(H);
  const text = `# systematic generator of the code { c : H c = 0 }; positions count from 0
# row i belongs to information bit i, which stands at the i-th information position: its parity bits, in the order of
# the parity positions. The word of several information bits is the sum modulo 2 of their rows.
# ${wordBitOrder}
n=${n}
k=${infoPositions.length}
information-positions=${infoPositions.join(' ')}
parity-positions=${parityPositions.join(' ')}
${parity.map((row) => `${wordToHex(row)}\n`).join('')}`;
  return new TextEncoder().encode(text);
}

/** @throws FormatError with line and column; LimitError on size. */
export function readGeneratorSystematic(bytes: Uint8Array): SystematicGenerator {
  const lines = linesOf(bytes);
  const n = lines.number('n', 1);
  const k = lines.number('k', 0);
  refuseBeyondLimits(k, n, 0);
  refuseParity(k, n);
  const infoPositions = positions('information-positions', k);
  const parityPositions = positions('parity-positions', n - k);
  const all = new Set([...infoPositions, ...parityPositions]);
  if (all.size !== n)
    throw new FormatError(
      lines.value('parity-positions').line,
      1,
      'each position once, for information or for parity',
      `${all.size} of ${n} positions`,
    );
  const rows = n === k ? [] : lines.rest;
  if (n !== k && rows.length !== k)
    throw new FormatError(lines.rest.at(-1)?.line ?? 1, 1, `${k} rows of parity bits`, String(rows.length));
  const parity = rows.map(({ text, line }) => {
    const word = wordFromHex(text, n - k);
    if (!word) throw new FormatError(line, 1, `${n - k} bits in hexadecimal`, JSON.stringify(text.slice(0, 40)));
    return word;
  });
  return {
    n,
    infoPositions,
    parityPositions,
    parity: n === k ? Array.from({ length: k }, () => new Uint8Array(0)) : parity,
  };

  function positions(key: string, count: number): Uint32Array {
    const { text, line } = lines.value(key);
    const list = text === '' ? [] : text.split(/\s+/).map(Number);
    if (list.length !== count || list.some((c, i) => !(Number.isInteger(c) && c >= 0 && c < n && !(c <= list[i - 1]!))))
      throw new FormatError(line, key.length + 2, `${count} ascending positions below ${n}`, `${list.length} numbers`);
    return Uint32Array.from(list);
  }
}

function refuseParity(k: number, n: number): void {
  if (k * (n - k) > maxParityBits) throw new LimitError('systematic generator', k * (n - k), maxParityBits, 'bits');
}
