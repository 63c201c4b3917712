import { useMemo, useSyncExternalStore } from 'react';
import useSWR from 'swr';
import type { Code } from '@/api/codes.ts';
import { endpoints } from '@/api/endpoints.ts';
import type { Point } from '@/api/runs.ts';
import type { Graded } from '@/core/evidence.ts';
import { knownStrata } from '@/core/simulation/known-strata.ts';
import type { Stratum } from '@/core/simulation/stratified-rate.ts';
import { call } from '../api.ts';
import type { CombinedCurve } from '../curves/curve.ts';
import { combinedCurve } from './combined-curve.ts';
import {
  type EnumerationProgress,
  enumerationKey,
  keptEnumerations,
  onEnumerationChange,
  wholeStrata,
} from './enumeration-store.ts';
import { proveRadius } from './strata-pool.ts';
import { type StratumGroup, stratumGroups } from './stratum-groups.ts';

/** All that is known of one code's weights under one decoder. */
export interface StrataEvidence {
  group: StratumGroup;
  /** null while it is being fetched. */
  code: Code | null;
  /** The radius a theorem guarantees; null where none is known, undefined while it is being worked out. */
  radius: Graded<number> | null | undefined;
  /** Why the radius could not be worked out. */
  radiusFailure: string | null;
  enumerations: readonly EnumerationProgress[];
  strata: Stratum[];
  curve: CombinedCurve;
}

const none: readonly EnumerationProgress[] = [];

/** The weight strata among points, with what is proved and enumerated beside them. */
export function useStrataEvidence(points: readonly Point[]): StrataEvidence[] {
  const groups = useMemo(() => stratumGroups(points), [points]);
  const names = groups.map(({ key, codeId }) => `${key} ${codeId}`).join('\n');
  const { data: proofs } = useSWR(groups.length > 0 ? ['strata-proofs', names] : null, () => proofsOf(groups), {
    revalidateOnFocus: false,
    revalidateIfStale: false,
  });
  const kept = useKept(
    groups.map(({ key, decoder }) => {
      const code = proofs?.get(key)?.code;
      return code ? enumerationKey(code.fingerprint, decoder) : '';
    }),
  );
  return useMemo(
    () =>
      groups.map((group, i) => {
        const proof = proofs?.get(group.key);
        const enumerations = kept[i] ?? none;
        const strata = knownStrata(group, proof?.radius?.value ?? null, wholeStrata(enumerations));
        return {
          group,
          code: proof?.code ?? null,
          radius: proof?.radius,
          radiusFailure: proof?.failure ?? null,
          enumerations,
          strata,
          curve: combinedCurve(group, strata),
        };
      }),
    [groups, proofs, kept],
  );
}

interface Proof {
  code: Code | null;
  radius: Graded<number> | null | undefined;
  failure: string | null;
}

async function proofsOf(groups: readonly StratumGroup[]): Promise<Map<string, Proof>> {
  return new Map(
    await Promise.all(
      groups.map(async ({ key, codeId, decoder }): Promise<[string, Proof]> => {
        let code: Code | null = null;
        try {
          code = (await call(endpoints.getCode, { params: { id: codeId } })).code;
          return [key, { code, radius: await proveRadius(code, decoder), failure: null }];
        } catch (error) {
          return [key, { code, radius: undefined, failure: (error as Error).message }];
        }
      }),
    ),
  );
}

/** Enumerations under some keys; the same list until one of them changes. */
function useKept(keys: readonly string[]): readonly (readonly EnumerationProgress[])[] {
  const text = keys.join('\n');
  const snapshot = useMemo(() => {
    let last: readonly (readonly EnumerationProgress[])[] = [];
    return () => {
      const next = text.split('\n').map((key) => (key === '' ? none : keptEnumerations(key)));
      if (next.length !== last.length || next.some((entries, i) => entries !== last[i])) last = next;
      return last;
    };
  }, [text]);
  return useSyncExternalStore(onEnumerationChange, snapshot, () => empty);
}

const empty: readonly (readonly EnumerationProgress[])[] = [];
