import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { type BlockDesign, blockOf, designFromBlocks } from '@/core/designs/block-design.ts';
import { buildDesign } from '@/core/designs/design.ts';
import { FormatError, LimitError } from '@/core/errors.ts';
import { readBlockListText, writeBlockListText } from '@/core/formats/block-list.ts';
import { readBlockListJson, writeBlockListJson } from '@/core/formats/block-list-json.ts';

const formats = [
  ['text', writeBlockListText, readBlockListText],
  ['JSON', writeBlockListJson, readBlockListJson],
] as const;

const anyDesign = fc
  .integer({ min: 1, max: 12 })
  .chain((v) =>
    fc
      .tuple(fc.array(fc.uniqueArray(fc.nat(v - 1)), { minLength: 1, maxLength: 10 }), fc.boolean())
      .map(([blocks, resolved]) =>
        designFromBlocks(v, blocks, resolved ? { classes: Uint32Array.from(blocks, (_, i) => i % 3) } : {}),
      ),
  );

const utf8 = (text: string) => new TextEncoder().encode(text);
const lists = (design: BlockDesign) => Array.from({ length: design.b }, (_, i) => [...blockOf(design, i)]);

describe.each(formats)('a block list as %s', (_name, write, read) => {
  test('comes back as it was, classes too', () => {
    fc.assert(
      fc.property(anyDesign, (design) => {
        const list = read(write(design));
        expect([list.v, list.classes]).toEqual([design.v, design.classes]);
        expect(lists(list)).toEqual(lists(design));
      }),
      { numRuns: 300 },
    );
  });

  test('of a Kirkman system of 15 points holds 35 blocks in 7 classes', () => {
    const list = read(write(buildDesign({ family: 'kirkman-triple', params: { v: 15 } })));
    expect([list.v, list.b, new Set(list.classes).size]).toEqual([15, 35, 7]);
  });

  test('cut or altered is a typed error or another list, never anything else', () => {
    const whole = write(buildDesign({ family: 'kirkman-triple', params: { v: 9 } }));
    const mutation = fc.record({ cut: fc.nat(whole.length), at: fc.nat(whole.length - 1), byte: fc.nat(255) });
    fc.assert(
      fc.property(mutation, ({ cut, at, byte }) => {
        const bytes = whole.slice(0, cut);
        if (at < bytes.length) bytes[at] = byte;
        try {
          read(bytes);
        } catch (error) {
          expect(error instanceof FormatError || error instanceof LimitError, String(error)).toBe(true);
        }
      }),
      { numRuns: 500 },
    );
  });
});

describe('a block list of someone else', () => {
  test('may leave out the size line, and part points by commas', () => {
    const list = readBlockListText(utf8('\uFEFF0,1,3\r\n1, 2, 4\r\n\r\n2 3 5'));
    expect([list.v, lists(list)]).toEqual([
      6,
      [
        [0, 1, 3],
        [1, 2, 4],
        [2, 3, 5],
      ],
    ]);
  });

  test('that counts from 1 says so, or is refused since nothing tells', () => {
    expect(lists(readBlockListText(utf8('# points=3 counted-from=1\n1 2\n2 3\n')))).toEqual([
      [0, 1],
      [1, 2],
    ]);
    expect(() => readBlockListText(utf8('1 2\n2 3\n'))).toThrow(/no point is 0/);
  });

  test.each([
    ['0 1 x', /line 1, column 5.*a point.*"x"/],
    ['# points=3\n0 3', /line 2.*a point from 0 to 2.*3/],
    ['0 1 1', /line 1.*distinct points.*1 twice/],
    ['0: 0 1\n1 2', /one class before the points of every block/],
    ['', /line 1.*a block/],
    ['# points=3 blocks=3\n0 1\n', /3 blocks.*1/],
  ])('%j is refused with its place', (text, message) => {
    expect(() => readBlockListText(utf8(text))).toThrow(message);
  });

  test('as JSON names the key that is wrong', () => {
    expect(() => readBlockListJson(utf8('{"points": 3, "blocks": [[0, 3]]}'))).toThrow(/"blocks".*below 3.*3/);
    expect(() => readBlockListJson(utf8('{"blocks": [[0, 1]], "classes": [0, 1]}'))).toThrow(/"classes".*1 class/);
    expect(() => readBlockListJson(utf8('[0'))).toThrow(FormatError);
  });
});
