import type { Code } from '@/api/codes.ts';
import { programVersion } from '../../version.ts';

/** Where a matrix comes from and what is known of it, as its JSON file says. */
export function provenanceOf(code: Code): Record<string, unknown> {
  const { name, designTitle, design, derivation, n, k, fingerprint, certificate, properties } = code;
  return {
    program: { name: 'Blockwright', version: programVersion },
    code: { name, n, k },
    ...{ designTitle, design, derivation, fingerprint },
    certificate,
    properties: properties.map(({ elapsedMs: _time, ...known }) => known),
  };
}
