import {
  type Code,
  type Expr,
  expression,
  flatten,
  type Statement,
  statement,
  typeByte,
  type ValueType,
} from './code.ts';
import { unsignedLeb } from './leb128.ts';
import { i32, i64 } from './numeric.ts';

/** A value of T, or the plain constant that stands for one. */
export type Value<T extends ValueType> =
  | Expr<T>
  | (T extends 'i32' ? number : never)
  | (T extends 'i64' ? bigint : never);

/** The expression for a value given as a constant or as an expression. */
export const asExpression = <T extends ValueType>(value: Value<T>): Expr<T> => {
  if (typeof value === 'number') return i32.of(value) as Expr<T>;
  if (typeof value === 'bigint') return i64.of(value) as Expr<T>;
  return value as Expr<T>;
};

/** A local variable or parameter. Used as an expression it reads itself. */
export class Local<T extends ValueType> implements Expr<T> {
  readonly code: Code;
  readonly #index: number[];
  constructor(
    readonly type: T,
    index: number,
  ) {
    this.#index = unsignedLeb(index);
    this.code = [0x20, ...this.#index];
  }
  set(value: Value<T>): Statement {
    return statement(asExpression(value).code, 0x21, ...this.#index);
  }
  /** Sets and yields the value. */
  tee(value: Value<T>): Expr<T> {
    return expression(this.type, asExpression(value).code, 0x22, ...this.#index);
  }
}

/** A variable of the module. */
export class Global<T extends ValueType> implements Expr<T> {
  readonly code: Code;
  readonly #index: number[];
  constructor(
    readonly type: T,
    index: number,
  ) {
    this.#index = unsignedLeb(index);
    this.code = [0x23, ...this.#index];
  }
  set(value: Value<T>): Statement {
    return statement(asExpression(value).code, 0x24, ...this.#index);
  }
}

export interface Signature {
  params: readonly ValueType[];
  results: readonly ValueType[];
}

/** What can be called: a function of the module or an imported one. */
export class FunctionRef {
  constructor(
    readonly index: number,
    readonly signature: Signature,
  ) {}

  #call(args: readonly Value<ValueType>[]): Code {
    if (args.length !== this.signature.params.length)
      throw new RangeError(`a call passes ${args.length} arguments where ${this.signature.params.length} are taken`);
    return [args.map((arg) => asExpression(arg).code), 0x10, ...unsignedLeb(this.index)];
  }
  /** A call for its effect. */
  call(...args: Value<ValueType>[]): Statement {
    return statement(this.#call(args));
  }
  /** A call for its one result; `type` says which the caller relies on. */
  value<T extends ValueType>(type: T, ...args: Value<ValueType>[]): Expr<T> {
    if (this.signature.results.length !== 1 || this.signature.results[0] !== type)
      throw new RangeError(`a call expects ${type} where the function gives ${this.signature.results.join(', ')}`);
    return expression(type, this.#call(args));
  }
}

/** The body of one function: parameters first, then locals, then code. */
export class FunctionBuilder {
  readonly #types: ValueType[];
  readonly #code: Code[] = [];
  readonly #idle: Local<ValueType>[] = [];
  constructor(readonly signature: Signature) {
    this.#types = [...signature.params];
  }

  param<T extends ValueType>(index: number, type: T): Local<T> {
    if (this.signature.params[index] !== type) throw new RangeError(`parameter ${index} is not of type ${type}`);
    return new Local(type, index);
  }

  /** A new variable, zero at entry. */
  local<T extends ValueType>(type: T): Local<T> {
    this.#types.push(type);
    return new Local(type, this.#types.length - 1);
  }

  /** A variable that `giveBack` returned, or a new one; what it holds is not defined. */
  borrow<T extends ValueType>(type: T): Local<T> {
    const place = this.#idle.findIndex((local) => local.type === type);
    return place < 0 ? this.local(type) : (this.#idle.splice(place, 1)[0] as Local<T>);
  }
  giveBack(...locals: readonly Local<ValueType>[]): void {
    this.#idle.push(...locals);
  }

  emit(...parts: readonly (Statement | Expr)[]): this {
    for (const part of parts) this.#code.push(part.code);
    return this;
  }

  /** The function's entry of the code section, without its length: locals run by run, code, end. */
  bytes(): number[] {
    const own = this.#types.slice(this.signature.params.length);
    const runs: [count: number, type: ValueType][] = [];
    for (const type of own) {
      const last = runs.at(-1);
      if (last && last[1] === type) last[0]++;
      else runs.push([1, type]);
    }
    const out = [
      ...unsignedLeb(runs.length),
      ...runs.flatMap(([count, type]) => [...unsignedLeb(count), typeByte[type]]),
    ];
    flatten(this.#code, out);
    out.push(0x0b);
    return out;
  }
}
