/** Structured control: blocks, loops, conditions, jumps. Each builder hands its body the label to jump to. */

import { type Code, type Expr, Jump, Label, Scope, type Statement, statement, type ValueType } from './code.ts';
import { type Int32, i32 } from './numeric.ts';

const EMPTY = 0x40;
const ELSE = 0x05;

const bodyOf = (parts: readonly Statement[]): Code => parts.map((part) => part.code);

/** A jump to the label leaves the block. */
export function block(body: (exit: Label) => readonly Statement[]): Statement {
  const label = new Label();
  return statement(new Scope(label, [0x02, EMPTY], bodyOf(body(label))));
}

/** A jump to the label starts the loop again; falling off the end leaves it. */
export function loop(body: (again: Label) => readonly Statement[]): Statement {
  const label = new Label();
  return statement(new Scope(label, [0x03, EMPTY], bodyOf(body(label))));
}

export const branch = (label: Label): Statement => statement(new Jump(0x0c, label));

export const branchIf = (label: Label, condition: Int32): Statement =>
  statement(i32.of(condition).code, new Jump(0x0d, label));

/** Runs the first list when the condition is not zero, else the second. */
export function when(condition: Int32, then: readonly Statement[], otherwise: readonly Statement[] = []): Statement {
  const body: Code = otherwise.length === 0 ? [bodyOf(then)] : [bodyOf(then), ELSE, bodyOf(otherwise)];
  return statement(i32.of(condition).code, new Scope(new Label(), [0x04, EMPTY], body));
}

/** Runs the body while the condition holds, testing first. */
export function whileLoop(condition: Int32, body: readonly Statement[]): Statement {
  return block((exit) => [loop((again) => [branchIf(exit, i32.eqz(condition)), ...body, branch(again)])]);
}

/** Runs the body once or more, for `counter` = `from`, `from + step`, … below `to`, both known when emitting.
 *  An empty range emits nothing. */
export function countLoop(
  counter: Expr<'i32'> & { set(value: Int32): Statement; tee(value: Int32): Expr<'i32'> },
  range: { from: number; to: number; step: number },
  body: readonly Statement[],
): Statement {
  if (range.from >= range.to) return statement();
  return statement(
    counter.set(range.from).code,
    loop((again) => [...body, branchIf(again, i32.ltU(counter.tee(i32.add(counter, range.step)), range.to))]).code,
  );
}

/** One of two values; both are computed. */
export const select = <T extends ValueType>(condition: Int32, yes: Expr<T>, no: Expr<T>): Expr<T> => ({
  type: yes.type,
  code:
    yes.type === 'v128'
      ? [yes.code, no.code, i32.of(condition).code, 0x1c, 1, 0x7b]
      : [yes.code, no.code, i32.of(condition).code, 0x1b],
});

export const drop = (value: Expr): Statement => statement(value.code, 0x1a);
