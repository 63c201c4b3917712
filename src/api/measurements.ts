import { z } from 'zod';

const wholeAccepted = (what: string, from: number) => `a whole number of ${what} from ${from} to 10^15`;
const whole = (what: string, from: number) =>
  z.int(wholeAccepted(what, from)).min(from, wholeAccepted(what, from)).max(1e15);
const crossover = 'a crossover probability above 0 and at most 0.5';

/** One measured channel point. Rates come as counts, since without them nothing is known of their spread. */
export const measuredPointSchema = z.strictObject({
  p: z.number(crossover).gt(0, crossover).max(0.5, crossover),
  /** Where the point was measured at a signal-to-noise ratio; p is then that of hard decisions. */
  ebn0Db: z.number('a ratio in dB from -20 to 40').min(-20).max(40).optional(),
  frames: whole('frames', 1),
  frameErrors: whole('frame errors', 0),
  bitErrors: whole('bit errors', 0).nullable(),
});
export type MeasuredPoint = z.infer<typeof measuredPointSchema>;

const length = 'a whole number of bits from 1 to 1 000 000';

export const newMeasurementSchema = z
  .strictObject({
    name: z.string().trim().min(1, 'a name of 1 to 120 characters').max(120, 'a name of 1 to 120 characters'),
    fileName: z.string().trim().min(1, 'a file name').max(200, 'at most 200 characters'),
    n: z.int(length).min(1, length).max(1_000_000, length),
    k: z.int('a whole number of bits from 0 to n').min(0, 'a whole number of bits from 0 to n'),
    points: z.array(measuredPointSchema).min(1, 'at least one point').max(1000, 'at most 1000 points'),
  })
  .superRefine(({ n, k, points }, context) => {
    const refuse = (path: (string | number)[], message: string) => context.addIssue({ code: 'custom', path, message });
    if (k > n) refuse(['k'], `a whole number of bits from 0 to n = ${n}`);
    const seen = new Set<number>();
    points.forEach(({ p, frames, frameErrors, bitErrors }, i) => {
      if (seen.has(p)) refuse(['points', i, 'p'], 'each channel point once');
      seen.add(p);
      if (frameErrors > frames) refuse(['points', i, 'frameErrors'], `at most the ${frames} frames`);
      if (bitErrors === null) return;
      if (bitErrors < frameErrors) refuse(['points', i, 'bitErrors'], 'at least one for each frame error');
      if (bitErrors > frameErrors * n) refuse(['points', i, 'bitErrors'], `at most n = ${n} for each frame error`);
    });
  });
export type NewMeasurement = z.infer<typeof newMeasurementSchema>;

export const measurementSchema = z.object({
  id: z.string(),
  projectId: z.string(),
  name: z.string(),
  fileName: z.string(),
  n: z.number(),
  k: z.number(),
  points: z.array(
    z.object({
      ...measuredPointSchema.shape,
      /** Clopper–Pearson on the frame error rate at `level`; with no error seen, lower is 0 and upper the one-sided limit. */
      interval: z.object({ lower: z.number(), upper: z.number() }),
    }),
  ),
  level: z.number(),
  createdAt: z.string(),
  createdBy: z.string(),
});
export type Measurement = z.infer<typeof measurementSchema>;
