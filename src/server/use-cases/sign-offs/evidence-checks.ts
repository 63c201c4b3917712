import type { EvidenceCheck } from '@/api/sign-offs.ts';
import type { CodeEvidence } from './code-evidence.ts';

/** Fewer frame errors than this are thin evidence: at 100 the relative standard error is 10 %. */
const enoughFrameErrors = 100;

/** What the program itself asks of the evidence before a person decides. A check that fails does not forbid a decision;
 *  it is on record with it. */
export function evidenceChecks({ lineage, requirements, measurements }: CodeEvidence): EvidenceCheck[] {
  const outcome = (passed: boolean) => (passed ? 'passed' : 'failed');
  const verdicts = requirements?.verdicts ?? [];
  const open = verdicts.filter((verdict) => verdict.outcome !== 'met').map(({ requirement }) => requirement);
  const thin = measurements.filter(({ tally }) => tally.frameErrors > 0 && tally.frameErrors < enoughFrameErrors);
  const { certificate } = lineage;
  return [
    {
      check: 'the design is proved from its blocks',
      outcome: outcome(certificate?.holds === true),
      words: certificate ? certificate.method : 'there is no certificate',
    },
    {
      check: 'every requirement is met',
      outcome: outcome(verdicts.length > 0 && open.length === 0),
      words:
        verdicts.length === 0
          ? 'none is stated'
          : open.length === 0
            ? `all ${verdicts.length}`
            : `missed or undecided: ${open.join(', ')}`,
    },
    {
      check: `every measured point has ${enoughFrameErrors} frame errors, or none`,
      outcome: outcome(measurements.length > 0 && thin.length === 0),
      words:
        measurements.length === 0 ? 'nothing is measured' : `${thin.length} of ${measurements.length} points are thin`,
    },
    floorCheck(requirements?.stated.channel, measurements, outcome),
  ];
}

/** Whether a point beyond the required channel was measured, where a floor would begin to show. */
function floorCheck(
  required: { kind: string; p?: number } | undefined,
  measurements: CodeEvidence['measurements'],
  outcome: (passed: boolean) => EvidenceCheck['outcome'],
): EvidenceCheck {
  const check = 'the floor is looked for beyond the required channel';
  if (required?.kind !== 'bsc' || required.p === undefined)
    return { check, outcome: 'failed', words: 'no crossover probability is required to look beyond' };
  const least = measurements.reduce((p, { channel }) => (channel.kind === 'bsc' ? Math.min(p, channel.p) : p), 1);
  const words = least < 1 ? `measured down to p = ${least}, required p = ${required.p}` : 'nothing is measured there';
  return { check, outcome: outcome(least < required.p), words };
}
