import { describe, expect, test } from 'vitest';
import { flatten, Jump, Label } from '../../../../src/core/kernels/assembler/code.ts';
import {
  base,
  block,
  branchIf,
  countLoop,
  drop,
  type Expr,
  type FunctionBuilder,
  f32,
  f32x4,
  f64,
  f64x2,
  i8x16,
  i16x8,
  i32,
  i32x4,
  i64,
  i64x2,
  loop,
  ModuleBuilder,
  memoryCopy,
  memoryFill,
  type Signature,
  select,
  type V128,
  v128,
  when,
  whileLoop,
} from '../../../../src/core/kernels/assembler/index.ts';
import { signedLeb, signedLeb64, unsignedLeb } from '../../../../src/core/kernels/assembler/leb128.ts';

// biome-ignore lint/suspicious/noExplicitAny: exports of a module made at run time
type Exports = Record<string, any>;

function instantiate(m: ModuleBuilder, imports: WebAssembly.Imports = {}): Exports {
  const bytes = m.bytes();
  expect(WebAssembly.validate(bytes)).toBe(true);
  return new WebAssembly.Instance(new WebAssembly.Module(bytes), imports).exports;
}

function single(signature: Signature, write: (f: FunctionBuilder) => void): (...args: never[]) => unknown {
  const m = new ModuleBuilder();
  m.memory('memory', 1);
  m.func(signature, write, 'run');
  return instantiate(m).run;
}

describe('LEB128', () => {
  test('the examples of the DWARF standard (version 4, figures 22 and 23) encode as printed', () => {
    expect(unsignedLeb(2)).toEqual([2]);
    expect(unsignedLeb(127)).toEqual([127]);
    expect(unsignedLeb(128)).toEqual([0x80, 1]);
    expect(unsignedLeb(12857)).toEqual([0x39 + 0x80, 100]);
    expect(signedLeb(-2)).toEqual([0x7e]);
    expect(signedLeb(127)).toEqual([127 + 0x80, 0]);
    expect(signedLeb(-127)).toEqual([1 + 0x80, 0x7f]);
    expect(signedLeb(128)).toEqual([0x80, 1]);
    expect(signedLeb(-129)).toEqual([0x7f + 0x80, 0x7e]);
  });

  test('the ends of the ranges take five and ten bytes', () => {
    expect(unsignedLeb(0xffffffff)).toEqual([0xff, 0xff, 0xff, 0xff, 0x0f]);
    expect(signedLeb(-(2 ** 31))).toEqual([0x80, 0x80, 0x80, 0x80, 0x78]);
    expect(signedLeb64(-(2n ** 63n))).toHaveLength(10);
    expect(signedLeb64(-1n)).toEqual([0x7f]);
    expect(signedLeb64(64n)).toEqual([0xc0, 0]);
  });
});

describe('a module', () => {
  test('that adds two numbers has exactly the bytes of the specification', () => {
    const m = new ModuleBuilder();
    m.func(
      { params: ['i32', 'i32'], results: ['i32'] },
      (f) => f.emit(i32.add(f.param(0, 'i32'), f.param(1, 'i32'))),
      'add',
    );
    const golden = [
      [0x00, 0x61, 0x73, 0x6d, 0x01, 0x00, 0x00, 0x00],
      [0x01, 0x07, 0x01, 0x60, 0x02, 0x7f, 0x7f, 0x01, 0x7f],
      [0x03, 0x02, 0x01, 0x00],
      [0x07, 0x07, 0x01, 0x03, 0x61, 0x64, 0x64, 0x00, 0x00],
      [0x0a, 0x09, 0x01, 0x07, 0x00, 0x20, 0x00, 0x20, 0x01, 0x6a, 0x0b],
    ];
    expect([...m.bytes()]).toEqual(golden.flat());
    expect(instantiate(m).add(40, 2)).toBe(42);
  });

  test('with a SIMD loop has the bytes a hand assembly gives', () => {
    const m = new ModuleBuilder();
    m.memory('memory', 1);
    m.func({ params: [], results: [] }, (f) => {
      const i = f.local('i32');
      f.emit(
        countLoop(i, { from: 0, to: 32, step: 16 }, [v128.store(i, v128.xor(v128.load(i, 64), v128.load(i, 128)))]),
      );
    });
    const body = [
      [0x01, 0x01, 0x7f, 0x41, 0x00, 0x21, 0x00, 0x03, 0x40],
      [0x20, 0x00, 0x20, 0x00, 0xfd, 0x00, 0x04, 0x40, 0x20, 0x00, 0xfd, 0x00, 0x04, 0x80, 0x01, 0xfd, 0x51],
      [0xfd, 0x0b, 0x04, 0x00],
      [0x20, 0x00, 0x41, 0x10, 0x6a, 0x22, 0x00, 0x41, 0x20, 0x49, 0x0d, 0x00, 0x0b, 0x0b],
    ].flat();
    expect([...m.bytes()].slice(-body.length)).toEqual(body);
    expect(WebAssembly.validate(m.bytes())).toBe(true);
  });

  test('keeps imports, globals, data and several functions apart', () => {
    const m = new ModuleBuilder();
    const twice = m.importFunction('host', 'twice', { params: ['i32'], results: ['i32'] });
    m.memory('memory', 1, 2);
    m.data(100, [7, 8, 9]);
    const calls = m.global('i32');
    const total = m.global('i64', -5n);
    const bump = m.func({ params: [], results: [] }, (f) => f.emit(calls.set(i32.add(calls, 1))));
    m.func(
      { params: [], results: ['i64'] },
      (f) =>
        f.emit(
          bump.call(),
          bump.call(),
          total.set(i64.add(total, i64.extendU(i32.add(twice.value('i32', i32.load8U(base, 102)), calls)))),
          total,
        ),
      'run',
    );
    expect(instantiate(m, { host: { twice: (x: number) => 2 * x } }).run()).toBe(-5n + 18n + 2n);
  });

  test('refuses an import after its first function, and a call with a missing argument', () => {
    const m = new ModuleBuilder();
    const f = m.func({ params: ['i32'], results: [] }, () => {});
    expect(() => m.importFunction('a', 'b', { params: [], results: [] })).toThrow(RangeError);
    expect(() => f.call()).toThrow(/0 arguments where 1/);
    expect(() => f.value('i32', 1)).toThrow(/expects i32/);
  });
});

describe('control', () => {
  test('a loop with a condition computes factorials', () => {
    const factorial = single({ params: ['i32'], results: ['i64'] }, (f) => {
      const n = f.param(0, 'i32');
      const product = f.local('i64');
      f.emit(
        product.set(1n),
        whileLoop(n, [product.set(i64.mul(product, i64.extendU(n))), n.set(i32.sub(n, 1))]),
        product,
      );
    }) as (n: number) => bigint;
    expect(factorial(20)).toBe(2432902008176640000n);
    expect(factorial(0)).toBe(1n);
  });

  test('a jump finds its label through nested blocks', () => {
    const run = single({ params: ['i32'], results: ['i32'] }, (f) => {
      const limit = f.param(0, 'i32');
      const i = f.local('i32');
      f.emit(
        block((exit) => [
          loop((again) => [
            when(i32.geU(i, 1000), [branchIf(exit, 1)]),
            i.set(i32.add(i, 1)),
            when(i32.eq(i, limit), [when(i32.eqz(0), [branchIf(exit, 1)])], [branchIf(again, 1)]),
          ]),
        ]),
        i,
      );
    }) as (n: number) => number;
    expect(run(17)).toBe(17);
    expect(run(5000)).toBe(1000);
  });

  test('a jump out of nowhere is refused when flattening', () => {
    expect(() => flatten([new Jump(0x0c, new Label())], [])).toThrow(RangeError);
  });

  test('an empty counting loop emits nothing, select picks by the condition', () => {
    const run = single({ params: ['i32'], results: ['i32'] }, (f) => {
      const i = f.local('i32');
      f.emit(countLoop(i, { from: 5, to: 5, step: 1 }, [i.set(99)]));
      f.emit(drop(i32.of(3)), select(f.param(0, 'i32'), i32.add(i, 1), i32.of(2)));
    }) as (n: number) => number;
    expect([run(1), run(0)]).toEqual([1, 2]);
  });

  test('borrowed locals are used again', () => {
    const m = new ModuleBuilder();
    m.func({ params: [], results: [] }, (f) => {
      const a = f.borrow('v128');
      f.giveBack(a);
      expect(f.borrow('v128')).toBe(a);
      expect(f.borrow('v128')).not.toBe(a);
    });
    expect(WebAssembly.validate(m.bytes())).toBe(true);
  });
});

describe('every instruction', () => {
  const a32 = i32.load(base, 0);
  const a64 = i64.load(base, 8);
  const a128 = v128.load(base, 16);
  const b128 = v128.load(base, 32);
  // biome-ignore lint/suspicious/noExplicitAny: emitters of every shape
  const build = (emit: any, operands: readonly unknown[]): Expr | null => {
    if (typeof emit !== 'function') return emit as Expr;
    try {
      const made = emit(...operands);
      return made?.code ? made : null;
    } catch {
      return null;
    }
  };
  const validates = (piece: { type: string; code: unknown }): boolean => {
    const m = new ModuleBuilder();
    m.memory('memory', 1);
    const results = piece.type === 'void' ? [] : [piece.type as 'i32'];
    m.func({ params: [], results }, (f) => f.emit(piece as Expr));
    try {
      return WebAssembly.validate(m.bytes());
    } catch {
      return false; // operands of another shape
    }
  };
  const operandLists = [
    [a32, 3],
    [a64, 3n],
    [a32, a32],
    [base, a32],
    [base, a64],
    [base, f32.of(1)],
    [base, f64.of(1)],
    [f64.of(1)],
    [a128, b128, a128],
    [a128, 1],
    [a128, b128, Array.from({ length: 16 }, (_, i) => i)],
    [base],
    [f32.of(2), f32.of(3)],
    [base, a128, 4],
    [a64],
    [2.5],
    [new Uint8Array(16)],
  ];
  for (const [group, emitters] of Object.entries({
    i32,
    i64,
    f32,
    v128,
    i8x16,
    i16x8,
    i32x4,
    i64x2,
    f32x4,
    f64,
    f64x2,
  })) {
    test(`of ${group} validates with operands of its own types`, () => {
      for (const [name, emit] of Object.entries(emitters)) {
        const some = operandLists.some((operands) => {
          const piece = build(emit, operands);
          return piece !== null && validates(piece);
        });
        expect(some, `${group}.${name}`).toBe(true);
      }
    });
  }

  const onBytes = (write: (a: V128, b: V128) => V128, a: number[], b: number[]): number[] => {
    const m = new ModuleBuilder();
    m.memory('memory', 1);
    m.func({ params: [], results: [] }, (f) => f.emit(v128.store(base, write(a128, b128), 48)), 'run');
    const { run, memory } = instantiate(m);
    const bytes = new Uint8Array(memory.buffer);
    bytes.set(a, 16);
    bytes.set(b, 32);
    run();
    return [...bytes.subarray(48, 64)];
  };
  const a = Array.from({ length: 16 }, (_, i) => (i * 37 + 11) & 255);
  const b = Array.from({ length: 16 }, (_, i) => (i * 91 + 200) & 255);
  const signed = (x: number) => (x << 24) >> 24;

  test('of the bitwise kind does what its name says', () => {
    expect(onBytes(v128.xor, a, b)).toEqual(a.map((x, i) => x ^ b[i]!));
    expect(onBytes(v128.and, a, b)).toEqual(a.map((x, i) => x & b[i]!));
    expect(onBytes(v128.or, a, b)).toEqual(a.map((x, i) => x | b[i]!));
    expect(onBytes(v128.andnot, a, b)).toEqual(a.map((x, i) => x & ~b[i]! & 255));
    expect(onBytes((x) => v128.not(x), a, b)).toEqual(a.map((x) => ~x & 255));
    expect(onBytes((x, y) => v128.bitselect(x, y, i8x16.splat(0x0f)), a, b)).toEqual(
      a.map((x, i) => (x & 0x0f) | (b[i]! & 0xf0)),
    );
    expect(
      onBytes((x, y) => v128.shuffle(x, y, [16, 1, 18, 3, 20, 5, 22, 7, 24, 9, 26, 11, 28, 13, 30, 15]), a, b),
    ).toEqual(a.map((x, i) => (i % 2 === 0 ? b[i]! : x)));
  });

  test('on signed and unsigned bytes does what its name says', () => {
    expect(onBytes(i8x16.add, a, b)).toEqual(a.map((x, i) => (x + b[i]!) & 255));
    expect(onBytes(i8x16.sub, a, b)).toEqual(a.map((x, i) => (x - b[i]!) & 255));
    expect(onBytes((x) => i8x16.abs(x), a, b)).toEqual(a.map((x) => Math.abs(signed(x))));
    expect(onBytes(i8x16.minU, a, b)).toEqual(a.map((x, i) => Math.min(x, b[i]!)));
    expect(onBytes(i8x16.maxU, a, b)).toEqual(a.map((x, i) => Math.max(x, b[i]!)));
    expect(onBytes(i8x16.ltS, a, b)).toEqual(a.map((x, i) => (signed(x) < signed(b[i]!) ? 255 : 0)));
    expect(onBytes(i8x16.eq, a, a)).toEqual(new Array(16).fill(255));
    expect(onBytes((x) => i16x8.shrU(x, 3), a, b)).toEqual([
      ...new Uint8Array(Uint16Array.from(new Uint16Array(Uint8Array.from(a).buffer), (x) => x >>> 3).buffer),
    ]);
  });

  test('on four floats divides and takes the lesser', () => {
    const floats = (xs: number[]) => [...new Uint8Array(new Float32Array(xs).buffer)];
    const out = (bytes: number[]) => [...new Float32Array(Uint8Array.from(bytes).buffer)];
    expect(out(onBytes(f32x4.div, floats([1, 2, 3, -8]), floats([4, 4, 2, 2])))).toEqual([0.25, 0.5, 1.5, -4]);
    expect(out(onBytes(f32x4.pmin, floats([1, 2, 3, -8]), floats([4, 1, 2, 2])))).toEqual([1, 1, 2, -8]);
    expect(out(onBytes((x) => f32x4.splat(f32x4.extract(x, 2)), floats([1, 2, 3, 4]), floats([])))).toEqual([
      3, 3, 3, 3,
    ]);
  });

  test('that moves memory copies and fills', () => {
    const m = new ModuleBuilder();
    m.memory('memory', 1);
    m.func(
      { params: [], results: [] },
      (f) => f.emit(memoryFill(i32.of(10), i32.of(7), i32.of(3)), memoryCopy(i32.of(20), i32.of(11), i32.of(4))),
      'run',
    );
    const { run, memory } = instantiate(m);
    run();
    expect([...new Uint8Array(memory.buffer, 9, 16)]).toEqual([0, 7, 7, 7, 0, 0, 0, 0, 0, 0, 0, 7, 7, 0, 0, 0]);
  });
});
