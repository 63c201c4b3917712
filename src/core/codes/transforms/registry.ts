import { ParamError } from '../../errors.ts';
import { dropDependentRows } from './drop-dependent-rows.ts';
import { extendByParity } from './extend-by-parity.ts';
import { keepClasses } from './keep-classes.ts';
import { lift } from './lift.ts';
import { mask } from './mask.ts';
import { puncture } from './puncture.ts';
import { shorten } from './shorten.ts';
import { splitColumns, splitRows } from './split-lines.ts';
import { superpose } from './superpose.ts';
import { requireCode, type TransformKind, type TransformState } from './transform-kind.ts';
import { transposeMatrix } from './transpose-matrix.ts';

/** Every kind of transform, by what it is called in a spec. */
export const transformKinds: ReadonlyMap<string, TransformKind> = new Map(
  [
    keepClasses,
    dropDependentRows,
    splitColumns,
    splitRows,
    mask,
    lift,
    superpose,
    shorten,
    puncture,
    extendByParity,
    transposeMatrix,
  ].map((kind) => [kind.kind, kind as TransformKind]),
);

/** The matrix after the transforms, one after the other.
 *  @throws ParamError naming the transform and what it would accept, also when one leaves no code or an unchecked bit. */
export function applyTransforms(state: TransformState, transforms: readonly { kind: string }[]): TransformState {
  return transforms.reduce((current, transform, i) => {
    const kind = transformKinds.get(transform.kind);
    if (!kind) {
      throw new ParamError(`transforms[${i}].kind`, transform.kind, [...transformKinds.keys()].join(', '));
    }
    const params = kind.schema.safeParse(transform);
    if (!params.success) {
      const { path, message } = params.error.issues[0]!;
      throw new ParamError(`transforms[${i}].${path.join('.')}`, path.reduce<unknown>(at, transform), message);
    }
    const next = kind.apply(current, params.data);
    requireCode(next.H, transform.kind);
    return next;
  }, state);
}

const at = (value: unknown, key: PropertyKey) => (value as Record<PropertyKey, unknown> | undefined)?.[key];
