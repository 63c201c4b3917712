import { readdirSync, readFileSync } from 'node:fs';
import { dirname, join, relative, resolve } from 'node:path';
import { fileURLToPath } from 'node:url';
import { expect, test } from 'vitest';

const root = fileURLToPath(new URL('../..', import.meta.url));

/** What each part of the house may import from the others. Anything not listed is forbidden. */
const allowed: Record<string, readonly string[]> = {
  'src/core': [],
  'src/api': ['src/core'],
  workers: ['src/core'],
  'src/client': ['src/core', 'src/api', 'workers'],
  'src/components': ['src/core', 'src/api', 'src/client', 'workers', 'src/paths.ts', 'src/styles'],
  'src/server': ['src/core', 'src/api', 'workers', 'src/paths.ts', 'db/migrations'],
  'src/layouts': ['src/core', 'src/api', 'src/client', 'src/components', 'src/server', 'src/paths.ts', 'src/styles'],
  'src/pages': ['src/core', 'src/api', 'src/client', 'src/components', 'src/layouts', 'src/server', 'src/paths.ts'],
  // Where the server and the demo's seeds, which are made with it, are put together.
  'src/middleware.ts': ['src/server', 'src/paths.ts', 'src/api', 'db'],
  'src/env.d.ts': ['src/api', 'src/server'],
  'src/paths.ts': [],
  'src/styles': [],
  db: ['src/core', 'src/api', 'src/server', 'workers'],
};

/** Packages the engine may use: schemas and the unpacking that file formats need. */
const enginePackages = [/^zod$/, /^fflate$/];

const files = ['src', 'workers', 'db'].flatMap((folder) =>
  readdirSync(join(root, folder), { recursive: true, encoding: 'utf8' })
    .filter((name) => /\.(ts|tsx|astro|mjs)$/.test(name))
    .map((name) => join(folder, name)),
);

const partOf = (file: string) =>
  Object.keys(allowed)
    .filter((part) => file === part || file.startsWith(`${part}/`))
    .sort((a, b) => b.length - a.length)[0];

function importsOf(file: string): string[] {
  const text = readFileSync(join(root, file), 'utf8');
  const found = text.matchAll(/(?:from\s+|import\s*\(\s*|import\s+|new URL\(\s*)['"]([^'"\n]+)['"]/g);
  return [...found].map((match) => match[1]!);
}

/** The file an import names, from the project's root; null for a package. */
function targetOf(file: string, name: string): string | null {
  if (name.startsWith('@/')) return join('src', name.slice(2));
  if (name.startsWith('@workers/')) return join('workers', name.slice(9));
  if (name.startsWith('.')) return relative(root, resolve(root, dirname(file), name));
  return null;
}

test('there are files to look at, in every part', () => {
  expect(files.length).toBeGreaterThan(50);
  expect(files.filter((file) => partOf(file) === undefined)).toEqual([]);
});

test('arrows point inward', () => {
  const wrong = files.flatMap((file) =>
    importsOf(file).flatMap((name) => {
      const target = targetOf(file, name);
      const from = partOf(file)!;
      const to = target && partOf(target);
      return to && to !== from && !allowed[from]!.includes(to) ? [`${file} imports ${name}`] : [];
    }),
  );
  expect(wrong).toEqual([]);
});

test('the engine imports nothing from outside but schemas and small mathematics', () => {
  const wrong = files
    .filter((file) => partOf(file) === 'src/core')
    .flatMap((file) => importsOf(file).map((name) => ({ file, name })))
    .filter(({ file, name }) => targetOf(file, name) === null && !enginePackages.some((known) => known.test(name)));
  expect(wrong).toEqual([]);
});

test('the engine reads no clock, no global random source, no document and no process', () => {
  const forbidden =
    /\bMath\.random\b|\bDate\.now\b|\bnew Date\(\s*\)|\bperformance\.now\b|\bdocument\.|\bwindow\.|\bprocess\./;
  const code = (file: string) => readFileSync(join(root, file), 'utf8').replace(/\/\*[\s\S]*?\*\/|\/\/.*$/gm, '');
  expect(files.filter((file) => partOf(file) === 'src/core' && forbidden.test(code(file)))).toEqual([]);
});

test('only repositories and the database folder touch Knex', () => {
  const outside = files.filter(
    (file) =>
      partOf(file) === 'src/server' &&
      !/^src\/server\/(db|repositories)\//.test(file) &&
      importsOf(file).some((name) => name === 'knex'),
  );
  expect(outside).toEqual([]);
});

test('no file is a drawer', () => {
  const drawer = /(^|\/)(utils?|helpers?|misc|common|shared|lib)(\.|\/)/i;
  expect(files.filter((file) => drawer.test(file))).toEqual([]);
});
