import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, test } from 'vitest';
import { deriveLdpc } from '@/core/codes/ldpc.ts';
import type { SparseMatrix } from '@/core/codes/sparse-matrix.ts';
import { buildDesign } from '@/core/designs/design.ts';
import { exportMatrix, importMatrix, matrixFormat } from '@/core/formats/index.ts';
import { rank } from '@/core/gf2/rank.ts';
import { clients, output } from './clients.ts';

/** Matrices of different shapes: square and cyclic, wide, and tall. */
const matrices: [string, SparseMatrix][] = (
  [
    ['plane of order 16', 'projective-plane', { q: 16 }, 'blocks'],
    ['triples on 63 points, wide', 'steiner-triple', { v: 63, method: 'bose' }, 'points'],
    ['triples on 31 points, tall', 'steiner-triple', { v: 31, method: 'skolem' }, 'blocks'],
  ] as const
).map(([name, family, params, checks]) => [name, deriveLdpc(buildDesign({ family, params }), { checks }).H]);

const folder = mkdtempSync(join(tmpdir(), 'blockwright-clients-'));
afterAll(() => rmSync(folder, { recursive: true, force: true }));

function written(H: SparseMatrix, format: string): string {
  const path = join(folder, `H.${matrixFormat(format).extension}`);
  writeFileSync(path, exportMatrix(H, format));
  return path;
}

/** What every client must find: rows, columns, ones, and a sum that depends on where the ones are. */
function facts(H: SparseMatrix): string {
  let weighted = 0;
  for (let i = 0; i < H.rows; i++) {
    for (let e = H.rowStart[i]!; e < H.rowStart[i + 1]!; e++) weighted += (i + 1) * (2 * H.colIndex[e]! + 1);
  }
  return `${H.rows} ${H.cols} ${H.colIndex.length} ${weighted}`;
}

const python = `
import sys, numpy, scipy.sparse, scipy.io
how, path = sys.argv[1], sys.argv[2]
if how == 'mtx': M = scipy.io.mmread(path)
elif how == 'npz': M = scipy.sparse.load_npz(path)
elif how == 'npy': M = scipy.sparse.coo_matrix(numpy.load(path))
elif how == 'mat': M = scipy.io.loadmat(path)['H']
elif how == 'csv':
    size = dict(part.split('=') for part in open(path).readline()[1:].split())
    rows, cols = numpy.loadtxt(path, delimiter=',', skiprows=2, dtype=int, unpack=True)
    M = scipy.sparse.coo_matrix((numpy.ones(len(rows)), (rows, cols)), shape=(int(size['rows']), int(size['columns'])))
M = scipy.sparse.coo_matrix(M)
assert (M.data == 1).all()
print(M.shape[0], M.shape[1], M.nnz, int(((M.row.astype(int) + 1) * (2 * M.col.astype(int) + 1)).sum()))
`;

describe.each(matrices)('%s', (_name, H) => {
  if (clients.scipy.present()) {
    test.each(['mtx', 'npz', 'npy', 'mat', 'csv'])('SciPy and NumPy load the same matrix from %s', (format) => {
      expect(output('/usr/bin/python3', ['-c', python, format, written(H, format)])).toBe(facts(H));
    });
  }

  if (clients.octave.present()) {
    test('Octave loads the same matrix from .mat', () => {
      const script = `load('${written(H, 'mat')}'); [i,j] = find(H); printf('%d %d %d %d\\n', rows(H), columns(H), nnz(H), sum(i .* (2*j - 1)));`;
      expect(output('/usr/bin/octave-cli', ['--norc', '--eval', script])).toBe(facts(H));
    });
  }

  if (clients.gap.present()) {
    test('GAP finds the same rank over GF(2) in the JSON rows', () => {
      const { onesByRow, columns } = JSON.parse(new TextDecoder().decode(exportMatrix(H, 'json'))) as {
        onesByRow: number[][];
        columns: number;
      };
      const rows = onesByRow.map((row) => `[${row.map((c) => c + 1).join(',')}]`).join(',');
      const script = `rows:=[${rows}];; M:=List(rows, function(r) local v,c; v:=ListWithIdenticalEntries(${columns}, 0*Z(2)); for c in r do v[c]:=Z(2)^0; od; return v; end);; Print(RankMat(M), "\\n"); QUIT;\n`;
      const file = join(folder, 'rank.g');
      writeFileSync(file, script);
      expect(output('/usr/bin/gap', ['-q', '-A', file]).split('\n').at(-1)).toBe(String(rank(H)));
    });
  }

  if (clients.cc.present()) {
    test('a C compiler takes the header, and its checksum agrees', () => {
      const header = written(H, 'c');
      const source = join(folder, 'check.c');
      const program = join(folder, 'check');
      writeFileSync(source, checker(header));
      output('cc', ['-std=c99', '-Wall', '-Wextra', '-Werror', '-o', program, source]);
      expect(output(program, [])).toBe(`${facts(H)} agrees`);
    });
  }
});

const checker = (header: string) => `
#include <stdio.h>
#include "${header}"
static uint32_t hash = 0x811c9dc5u;
static void word(uint32_t w) { for (int s = 0; s < 32; s += 8) hash = (hash ^ ((w >> s) & 255u)) * 0x01000193u; }
int main(void) {
  unsigned long long sum = 0;
  word(H_ROWS); word(H_COLS);
  for (uint32_t i = 0; i <= H_ROWS; i++) word(H_ROW_START[i]);
  for (uint32_t e = 0; e < H_ONES; e++) word(H_COL_INDEX[e]);
  for (uint32_t i = 0; i < H_ROWS; i++)
    for (uint32_t e = H_ROW_START[i]; e < H_ROW_START[i + 1]; e++) sum += (i + 1ull) * (2ull * H_COL_INDEX[e] + 1);
  printf("%u %u %u %llu %s\\n", H_ROWS, H_COLS, H_ONES, sum, hash == H_CHECKSUM ? "agrees" : "differs");
  return 0;
}
`;

if (clients.scipy.present()) {
  test.each([
    ['npz, compressed rows', 'npz', 'scipy.sparse.save_npz(path, M.tocsr())'],
    ['npz, compressed columns', 'npz', 'scipy.sparse.save_npz(path, M.tocsc())'],
    ['npz, coordinates', 'npz', 'scipy.sparse.save_npz(path, M)'],
    ['npy, booleans in Fortran order', 'npy', 'numpy.save(path, numpy.asfortranarray(M.toarray().astype(bool)))'],
    ['npy, doubles', 'npy', 'numpy.save(path, M.toarray().astype(float))'],
    ['mat, compressed', 'mat', "scipy.io.savemat(path, {'H': M.tocsc().astype(float)}, do_compression=True)"],
    ['mtx, pattern', 'mtx', "scipy.io.mmwrite(path, M, field='pattern')"],
    ['mtx, integers', 'mtx', "scipy.io.mmwrite(path, M.astype(int), field='integer', symmetry='general')"],
  ])('what SciPy writes is read back: %s', (_name, format, save) => {
    const path = join(folder, `from-scipy.${format}`);
    const script = `import numpy, scipy.sparse, scipy.io\npath = '${path}'\nM = scipy.sparse.coo_matrix(numpy.array([[1,1,0,0,1],[0,1,1,0,0],[0,0,0,1,0]], dtype='int8'))\n${save}`;
    output('/usr/bin/python3', ['-c', script]);
    const H = importMatrix(readFileSync(path), format);
    expect([H.rows, H.cols, [...H.rowStart], [...H.colIndex]]).toEqual([3, 5, [0, 3, 5, 6], [0, 1, 4, 1, 2, 3]]);
  });
}

test('at least one of the clients is on this machine', () => {
  expect(Object.values(clients).some((client) => client.present())).toBe(true);
});
