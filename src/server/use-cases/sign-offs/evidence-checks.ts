import type { EvidenceCheck } from '@/api/sign-offs.ts';
import type { CodeEvidence } from './code-evidence.ts';

/** Fewer frame errors than this are thin evidence: at 100 the relative standard error is 10 %. */
const enoughFrameErrors = 100;

/** What the program itself asks of the evidence before a person decides. A check that fails does not forbid a decision;
 *  it is on record with it. */
export function evidenceChecks({ lineage, requirements, measurements, strata }: CodeEvidence): EvidenceCheck[] {
  const outcome = (passed: boolean) => (passed ? 'passed' : 'failed');
  const verdicts = requirements?.verdicts ?? [];
  const open = verdicts.filter((verdict) => verdict.outcome !== 'met').map(({ requirement }) => requirement);
  // Limits from weight strata say themselves how thin the counts are.
  const direct = measurements.filter(({ channel }) => channel.kind !== 'stratum');
  const thin = direct.filter(({ tally }) => tally.frameErrors > 0 && tally.frameErrors < enoughFrameErrors);
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
        measurements.length === 0
          ? 'nothing is measured'
          : direct.length === 0
            ? 'weight strata alone, whose limits are rigorous'
            : `${thin.length} of ${direct.length} points are thin`,
    },
    floorCheck(requirements?.stated.channel, measurements, strata, outcome),
  ];
}

/** Whether something is known beyond the required channel, where a floor would begin to show: a point measured there, or
 *  weight strata, whose limit a tenth of the way on is no higher. */
function floorCheck(
  required: { kind: string; p?: number } | undefined,
  measurements: CodeEvidence['measurements'],
  strata: CodeEvidence['strata'],
  outcome: (passed: boolean) => EvidenceCheck['outcome'],
): EvidenceCheck {
  const check = 'the floor is looked for beyond the required channel';
  if (required?.kind !== 'bsc' || required.p === undefined)
    return { check, outcome: 'failed', words: 'no crossover probability is required to look beyond' };
  const bounded = strata.find(({ limits: [at, beyond] }) => at && beyond && beyond.fer.upper < at.fer.upper);
  if (bounded) {
    const { p, fer } = bounded.limits[1]!;
    const words = `weight strata bound the FER by ${fer.upper.toPrecision(2)} at p = ${p}`;
    return { check, outcome: 'passed', words };
  }
  const least = measurements.reduce((p, { channel }) => (channel.kind === 'bsc' ? Math.min(p, channel.p) : p), 1);
  const words = least < 1 ? `measured down to p = ${least}, required p = ${required.p}` : 'nothing is measured there';
  return { check, outcome: outcome(least < required.p), words };
}
