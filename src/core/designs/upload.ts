import { LimitError, ParamError } from '../errors.ts';
import { type BlockDesign, designFromBlocks } from './block-design.ts';
import { binomial } from './subset-rank.ts';
import { type DesignCertificate, verifyDesign } from './verify.ts';

export const MAX_UPLOADED_BLOCKS = 1_000_000;
const MAX_UPLOADED_INCIDENCES = 50_000_000;

export interface UploadCertificate {
  /** Largest t ≤ 5 for which it is a t-design; 0 when not even every point lies on equally many blocks. */
  t: number;
  /** λ for that t; the number of blocks when t = 0. */
  lambda: number;
  /** The certificate for that t, or the failed one for t = 1. */
  certificate: DesignCertificate;
  /** Why a larger t was not reached. */
  stoppedBy: string;
}

export interface UploadedDesign extends UploadCertificate {
  design: BlockDesign;
}

/** A design from a list of blocks, points counted from 0, with the largest t that holds.
 *  @param v number of points; one more than the largest point when left out.
 *  @throws ParamError for no blocks, a point that is no whole number or is repeated in a block; LimitError when too large. */
export function designFromUpload(blocks: readonly ArrayLike<number>[], v?: number): UploadedDesign {
  if (blocks.length === 0) throw new ParamError('blocks', 0, 'at least one block');
  if (blocks.length > MAX_UPLOADED_BLOCKS)
    throw new LimitError('uploaded design', blocks.length, MAX_UPLOADED_BLOCKS, 'blocks');
  const points = v ?? largestPoint(blocks) + 1;
  const design = designFromBlocks(points, blocks);
  return { design, ...certifyUpload(design) };
}

/** The largest t ≤ 5 for which blocks are a t-design, with its certificate. @throws LimitError on more blocks than that. */
export function certifyUpload(design: BlockDesign): UploadCertificate {
  if (design.b > MAX_UPLOADED_BLOCKS) throw new LimitError('uploaded design', design.b, MAX_UPLOADED_BLOCKS, 'blocks');
  let best: { t: number; lambda: number; certificate: DesignCertificate } | undefined;
  for (let t = 1; t <= 5; t++) {
    const lambda = lambdaFor(design, t);
    const attempt =
      lambda === undefined ? `λ would not be a whole number for t = ${t}` : tryStrength(design, t, lambda);
    if (typeof attempt !== 'string' && attempt.holds) {
      best = { t, lambda: lambda!, certificate: attempt };
      continue;
    }
    const stoppedBy = typeof attempt === 'string' ? attempt : (attempt.reason ?? `t = ${t} does not hold`);
    if (best) return { ...best, stoppedBy };
    const certificate = typeof attempt === 'string' ? verifyDesign(design, { t: 1, lambda: 1 }) : attempt;
    return { t: 0, lambda: design.b, certificate, stoppedBy };
  }
  return { ...best!, stoppedBy: 't above 5 is not tried' };
}

function largestPoint(blocks: readonly ArrayLike<number>[]): number {
  let largest = 0;
  let incidences = 0;
  blocks.forEach((block, i) => {
    incidences += block.length;
    if (incidences > MAX_UPLOADED_INCIDENCES) {
      throw new LimitError('uploaded design', incidences, MAX_UPLOADED_INCIDENCES, 'incidences');
    }
    for (let j = 0; j < block.length; j++) {
      const p = block[j]!;
      if (!Number.isInteger(p) || p < 0 || p >= 2 ** 24)
        throw new ParamError(`blocks[${i}]`, p, 'whole numbers from 0 to 16777215');
      if (p > largest) largest = p;
    }
  });
  return largest;
}

/** λ = b·C(k,t)/C(v,t) when that is a whole number of at least 1 and blocks have one size. */
function lambdaFor({ v, b, blockStart }: BlockDesign, t: number): number | undefined {
  const lambda = (b * binomial(blockStart[1]!, t)) / binomial(v, t);
  return Number.isInteger(lambda) && lambda >= 1 ? lambda : undefined;
}

/** The certificate, or why it could not be made. */
function tryStrength(design: BlockDesign, t: number, lambda: number): DesignCertificate | string {
  try {
    return verifyDesign(design, { t, lambda });
  } catch (error) {
    if (error instanceof LimitError) return error.message;
    throw error;
  }
}
