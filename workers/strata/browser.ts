import { expose } from 'comlink';
import { createStrataApi } from './strata.ts';

expose(createStrataApi());
