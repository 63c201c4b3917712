import { typeByte, type ValueType } from './code.ts';
import { FunctionBuilder, FunctionRef, Global, type Signature } from './function-builder.ts';
import { signedLeb, signedLeb64, unsignedLeb } from './leb128.ts';

/** Sections in the order the format wants them (Core Specification 2.0, §5.5.2). */
const section = { types: 1, imports: 2, functions: 3, memory: 5, globals: 6, exports: 7, code: 10, data: 11 } as const;

const text = (name: string): number[] => {
  const bytes = new TextEncoder().encode(name);
  return [...unsignedLeb(bytes.length), ...bytes];
};
const vector = (entries: readonly (readonly number[])[]): number[] => [
  ...unsignedLeb(entries.length),
  ...entries.flat(),
];

/** Gathers a module's parts and writes its bytes. Imported functions must be declared before the module's own, because
 *  they come first in the numbering. */
export class ModuleBuilder {
  readonly #signatures: Signature[] = [];
  readonly #imports: number[][] = [];
  readonly #functions: { builder: FunctionBuilder; type: number }[] = [];
  readonly #globals: number[][] = [];
  readonly #exports: number[][] = [];
  readonly #data: number[][] = [];
  #importedFunctions = 0;
  #memory: number[] | undefined;

  /** A memory of at least `pages` × 64 KiB, exported under the name. */
  memory(name: string, pages: number, most?: number): void {
    this.#memory = most === undefined ? [0, ...unsignedLeb(pages)] : [1, ...unsignedLeb(pages), ...unsignedLeb(most)];
    this.#exports.push([...text(name), 2, 0]);
  }

  importFunction(module: string, name: string, signature: Signature): FunctionRef {
    if (this.#functions.length > 0) throw new RangeError('imports are declared before the first function');
    this.#imports.push([...text(module), ...text(name), 0, ...unsignedLeb(this.#typeIndex(signature))]);
    return new FunctionRef(this.#importedFunctions++, signature);
  }

  /** A mutable i32 or i64 variable that starts at 0 or the value given. */
  global<T extends 'i32' | 'i64'>(type: T, start = 0n): Global<T> {
    const constant =
      type === 'i32' ? [0x41, ...signedLeb(Number(BigInt.asIntN(32, start)))] : [0x42, ...signedLeb64(start)];
    this.#globals.push([typeByte[type], 1, ...constant, 0x0b]);
    return new Global(type, this.#globals.length - 1);
  }

  /** A function whose body `write` emits at once; exported when a name is given. */
  func(signature: Signature, write: (f: FunctionBuilder) => void, exportAs?: string): FunctionRef {
    const builder = new FunctionBuilder(signature);
    const index = this.#importedFunctions + this.#functions.length;
    this.#functions.push({ builder, type: this.#typeIndex(signature) });
    if (exportAs !== undefined) this.#exports.push([...text(exportAs), 0, ...unsignedLeb(index)]);
    write(builder);
    return new FunctionRef(index, signature);
  }

  /** Bytes that the memory holds at `offset` from the start. */
  data(offset: number, bytes: ArrayLike<number>): void {
    this.#data.push([0, 0x41, ...signedLeb(offset), 0x0b, ...unsignedLeb(bytes.length), ...Array.from(bytes)]);
  }

  #typeIndex(signature: Signature): number {
    const same = (a: readonly ValueType[], b: readonly ValueType[]) => a.join() === b.join();
    const known = this.#signatures.findIndex(
      (s) => same(s.params, signature.params) && same(s.results, signature.results),
    );
    if (known >= 0) return known;
    this.#signatures.push(signature);
    return this.#signatures.length - 1;
  }

  bytes(): Uint8Array<ArrayBuffer> {
    const types = this.#signatures.map(({ params, results }) => [
      0x60,
      ...vector(params.map((t) => [typeByte[t]])),
      ...vector(results.map((t) => [typeByte[t]])),
    ]);
    const bodies = this.#functions.map(({ builder }) => {
      const body = builder.bytes();
      return [...unsignedLeb(body.length), ...body];
    });
    const sections: [number, number[][]][] = [
      [section.types, types],
      [section.imports, this.#imports],
      [section.functions, this.#functions.map(({ type }) => unsignedLeb(type))],
      [section.memory, this.#memory ? [this.#memory] : []],
      [section.globals, this.#globals],
      [section.exports, this.#exports],
      [section.code, bodies],
      [section.data, this.#data],
    ];
    const out = [0x00, 0x61, 0x73, 0x6d, 1, 0, 0, 0];
    for (const [id, entries] of sections) {
      if (entries.length === 0) continue;
      const content = vector(entries);
      out.push(id, ...unsignedLeb(content.length));
      for (const byte of content) out.push(byte);
    }
    return Uint8Array.from(out);
  }
}
