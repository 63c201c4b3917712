import type { BuiltCode } from '@workers/build/api.ts';
import { buildCode } from '@workers/build/build-code.ts';
import type { SheetRequest } from '@/core/codes/sheet.ts';
import type { DemoCode } from './scenario.ts';

/** Builds a code of the scenario with the engine, here and now. */
export async function buildDemoCode({ design, derivation }: DemoCode): Promise<BuiltCode> {
  const answer = await buildCode({ design, derivation } as SheetRequest, () => {});
  if (!answer.ok) throw new Error(`The demo's ${design.family} was refused: ${answer.failure.message}`);
  return answer.built;
}
