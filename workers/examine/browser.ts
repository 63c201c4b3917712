import { expose } from 'comlink';
import type { ExamineApi } from './api.ts';
import { examine } from './examine.ts';

const api: ExamineApi = { ask: async (...asked) => examine(...asked) };
expose(api);
