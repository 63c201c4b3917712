import type { Curve } from './curve.ts';
import { curveShortName } from './curve-source.ts';
import { decoderDetail } from './decoder-text.ts';

/** End labels, as short as tells the curves apart: "(273,191) Gallager B", and only where two would read the same,
 *  the decoder's parameters, then the design, then the run. */
export function curveLabels(
  curves: readonly Curve[],
  runName: (runId: string) => string | undefined = () => undefined,
): string[] {
  const detailers: ((curve: Curve) => string | null | undefined)[] = [
    (curve) => curve.decoder && decoderDetail(curve.decoder),
    (curve) => designOf(curve),
    (curve) => runName(curve.runId),
    (curve) => curve.runId.slice(0, 8),
  ];
  let labels = curves.map((curve) => `(${curve.n},${curve.k}) ${curveShortName(curve)}${curve.at ? ', strata' : ''}`);
  for (const detail of detailers) {
    const groups = indicesByLabel(labels);
    const next = [...labels];
    for (const group of groups.values()) {
      const details = group.map((i) => detail(curves[i]!) ?? '');
      if (group.length < 2 || new Set(details).size < 2) continue;
      group.forEach((i, at) => {
        next[i] = details[at] === '' ? labels[i]! : `${labels[i]}, ${details[at]}`;
      });
    }
    labels = next;
  }
  return labels;
}

function indicesByLabel(labels: readonly string[]): Map<string, number[]> {
  const groups = new Map<string, number[]>();
  labels.forEach((label, i) => {
    groups.set(label, [...(groups.get(label) ?? []), i]);
  });
  return groups;
}

/** The design in words: the code's label without its "(n,k)". */
const designOf = (curve: Curve): string => curve.codeLabel.replace(/^\(\s*\d+\s*,\s*\d+\s*\)\s*/, '');
