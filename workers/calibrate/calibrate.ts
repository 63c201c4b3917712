import { calibrate } from '@/core/simulation/calibrate.ts';
import { describeKernel } from '@/core/simulation/shard.ts';
import { failureOf } from '../failure.ts';
import type { CalibrateAnswer, CalibrateApi } from './api.ts';

/** The service of one worker; a task is cut off by ending the worker. */
export function createCalibrateApi(): CalibrateApi {
  return {
    calibrate: (spec, onTrial) => answered(calibrate(spec, { onTrial: (done, all) => onTrial(done, all) })),
    describe: (spec) => answered(describeKernel(spec)),
  };
}

async function answered<T>(work: Promise<T>): Promise<CalibrateAnswer<T>> {
  try {
    return { ok: true, value: await work };
  } catch (error) {
    return { ok: false, failure: failureOf(error) };
  }
}
