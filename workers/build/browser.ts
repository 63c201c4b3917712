import { expose } from 'comlink';
import type { BuildApi } from './api.ts';
import { buildCode } from './build-code.ts';

const api: BuildApi = { build: buildCode };
expose(api);
