// `npm run bench [part of a name]`: runs every *.bench.ts beside this file and prints what was measured. Figures are of
// this machine; ratios to a twin in the same run are what counts. tests/bench/RESULTS.md keeps the ones worth keeping.
import { readdirSync } from 'node:fs';
import { cpus } from 'node:os';
import { fileURLToPath, pathToFileURL } from 'node:url';
import type { Row } from './row.ts';

const folder = fileURLToPath(new URL('.', import.meta.url));
const wanted = process.argv[2] ?? '';
const files = readdirSync(folder).filter((name) => name.endsWith('.bench.ts') && name.includes(wanted));

function verdict(row: Row): string {
  const reaches = (bound: number) => ((row.better ?? 'lower') === 'lower' ? row.value <= bound : row.value >= bound);
  if (row.must === undefined) return '';
  if (!reaches(row.must)) return `falls short of ${row.must}`;
  return row.aim === undefined || reaches(row.aim) ? 'reached' : `reached, aim ${row.aim}`;
}

const number = (value: number) => (value >= 100 ? value.toFixed(0) : value.toPrecision(3));

console.log(`${cpus()[0]?.model ?? 'unknown processor'}, ${cpus().length} cores, Node.js ${process.version}`);
for (const file of files.sort()) {
  console.log(`\n## ${file.replace('.bench.ts', '')}\n\n| metric | figure | must | verdict |\n|---|---|---|---|`);
  const { bench } = (await import(pathToFileURL(`${folder}${file}`).href)) as { bench(): Promise<Row[]> };
  for (const row of await bench()) {
    const note = row.note ? ` (${row.note})` : '';
    console.log(`| ${row.metric}${note} | ${number(row.value)} ${row.unit} | ${row.must ?? ''} | ${verdict(row)} |`);
  }
}
