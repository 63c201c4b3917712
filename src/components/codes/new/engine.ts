import { useEffect, useState } from 'react';
import type { DesignSpec } from '@/core/designs/block-design.ts';
import type { DesignPrediction, ParamInfo } from '@/core/designs/family.ts';
import type { Citation } from '@/core/errors.ts';
import { type Refusal, refusalOf } from '../refusal.ts';

export interface FamilyInfo {
  id: string;
  title: string;
  params: ParamInfo[];
  source: Citation;
}

/** The part of the engine that this page asks. */
export interface Engine {
  families: FamilyInfo[];
  predict(spec: DesignSpec): Predicted;
}

export type Predicted = { ok: true; prediction: DesignPrediction } | { ok: false; refusal: Refusal };

/** Loads the engine's formulas after the page is up, so that they do not delay its first draw. */
export function useEngine(): { engine: Engine | null; failed: boolean } {
  const [engine, setEngine] = useState<Engine | null>(null);
  const [failed, setFailed] = useState(false);
  useEffect(() => {
    import('@/core/index.ts')
      .then(({ listFamilies, predictDesign }) =>
        setEngine({
          families: listFamilies(),
          predict(spec) {
            try {
              return { ok: true, prediction: predictDesign(spec) };
            } catch (error) {
              return { ok: false, refusal: refusalOf(error) };
            }
          },
        }),
      )
      .catch(() => setFailed(true));
  }, []);
  return { engine, failed };
}
