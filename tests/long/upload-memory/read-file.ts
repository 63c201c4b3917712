// A process that reads one file as an upload and says what it held and how much memory it took at its highest.
import { closeSync, fstatSync, openSync, readSync } from 'node:fs';
import { readUpload } from '../../../src/core/formats/read-upload.ts';

const file = openSync(process.argv[2]!, 'r');
const before = process.resourceUsage().maxRSS / 1024;
const from = performance.now();
const upload = readUpload({
  size: fstatSync(file).size,
  read: (position, into) => readSync(file, into, 0, into.length, position),
});
const elapsedMs = performance.now() - from;
closeSync(file);
const ones = 'matrix' in upload ? upload.matrix.colIndex.length : upload.design.blockPoints.length;
console.log(JSON.stringify({ ones, elapsedMs, before, mostMb: process.resourceUsage().maxRSS / 1024 }));
