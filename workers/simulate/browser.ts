import { expose } from 'comlink';
import { createSimulateApi } from './simulate.ts';

expose(createSimulateApi());
