import { expose } from 'comlink';
import { createAnalyseApi } from './analyse.ts';

expose(createAnalyseApi());
