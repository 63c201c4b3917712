// A process that reads one file as an upload and says what it held and how much memory it took at its highest.
import { closeSync, fstatSync, openSync, readFileSync, readSync } from 'node:fs';
import { readUpload } from '../../../src/core/formats/read-upload.ts';

/** The highest this process itself has reached, in MB of 2^20 bytes: the figure of getrusage begins with its parent's. */
function mostMb(): number {
  return Number(/VmHWM:\s*(\d+) kB/.exec(readFileSync('/proc/self/status', 'utf8'))![1]) / 1024;
}

const file = openSync(process.argv[2]!, 'r');
const before = mostMb();
const from = performance.now();
const upload = readUpload({
  size: fstatSync(file).size,
  read: (position, into) => readSync(file, into, 0, into.length, position),
});
const elapsedMs = performance.now() - from;
closeSync(file);
const ones = 'matrix' in upload ? upload.matrix.colIndex.length : upload.design.blockPoints.length;
console.log(JSON.stringify({ ones, elapsedMs, before, mostMb: mostMb() }));
