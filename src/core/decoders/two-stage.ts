import { type Decoder, fromSteps, type Received } from './decoder.ts';

/** Decoders in a row: each later one starts again from the received word of the frames that those before it left
 *  unconverged. Iterations are those of all the stages that worked on the frame; where none converges the last one's
 *  word stands. */
export function twoStage(stages: readonly Decoder[]): Decoder {
  let stage = 0;
  let spent = 0;
  let frame: Received;
  return fromSteps({
    begin(received) {
      frame = received;
      stage = 0;
      spent = 0;
      stages[0]!.begin(frame);
    },
    step() {
      const decoded = stages[stage]!.step();
      if (!decoded) return null;
      spent += decoded.iterations;
      if (decoded.converged || stage === stages.length - 1) return { ...decoded, iterations: spent };
      stage += 1;
      stages[stage]!.begin(frame);
      return null;
    },
  });
}
