import { expose } from 'comlink';
import { createCalibrateApi } from './calibrate.ts';

expose(createCalibrateApi());
