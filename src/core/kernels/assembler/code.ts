/** Code as a tree: what the emitters make and the module builder flattens.
 *
 *  WebAssembly is a stack machine, so an expression's code is its operands' code followed by its own instruction; a tree
 *  of nested arrays holds that without copying. Branches name their target by how many blocks lie between, which is
 *  known only once everything is in place: a jump therefore keeps a reference to its label until `flatten`. */

import { unsignedLeb } from './leb128.ts';

export type ValueType = 'i32' | 'i64' | 'f32' | 'f64' | 'v128';

/** Encodings of value types (Core Specification 2.0, §5.3). */
export const typeByte: Record<ValueType, number> = { i32: 0x7f, i64: 0x7e, f32: 0x7d, f64: 0x7c, v128: 0x7b };

/** Names a block or loop so that jumps can find it; compared by identity. */
export class Label {}

/** A block, loop or if with its body; `open` is its opcode and block type. */
export class Scope {
  constructor(
    readonly label: Label,
    readonly open: readonly number[],
    readonly body: Code,
  ) {}
}

/** br (0x0c) or br_if (0x0d) to a label further out. */
export class Jump {
  constructor(
    readonly opcode: number,
    readonly label: Label,
  ) {}
}

export type Code = readonly (number | Code | Scope | Jump)[];

/** Code that leaves one value of type T on the stack. */
export interface Expr<T extends ValueType = ValueType> {
  readonly type: T;
  readonly code: Code;
}

/** Code that leaves the stack as it found it. */
export interface Statement {
  readonly type: 'void';
  readonly code: Code;
}

export const statement = (...code: Code): Statement => ({ type: 'void', code });
export const expression = <T extends ValueType>(type: T, ...code: Code): Expr<T> => ({ type, code });

/** Statements in a row as one. */
export const sequence = (...parts: readonly Statement[]): Statement => statement(parts.map((part) => part.code));

const END = 0x0b;

/** The bytes of a tree, appended to `out`.
 *  @throws RangeError when a jump's label is not one of the enclosing blocks. */
export function flatten(code: Code, out: number[], enclosing: Label[] = []): void {
  for (const piece of code) {
    if (typeof piece === 'number') out.push(piece);
    else if (piece instanceof Scope) {
      for (const byte of piece.open) out.push(byte);
      enclosing.push(piece.label);
      flatten(piece.body, out, enclosing);
      enclosing.pop();
      out.push(END);
    } else if (piece instanceof Jump) {
      const place = enclosing.lastIndexOf(piece.label);
      if (place < 0) throw new RangeError('a jump leaves for a label that does not enclose it');
      out.push(piece.opcode, ...unsignedLeb(enclosing.length - 1 - place));
    } else flatten(piece, out, enclosing);
  }
}
