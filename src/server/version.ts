import { readFileSync } from 'node:fs';
import { join } from 'node:path';

/** The version of package.json; the working folder is the project's root (src/server/main.mjs sees to it). */
export const programVersion: string = JSON.parse(readFileSync(join(process.cwd(), 'package.json'), 'utf8')).version;
