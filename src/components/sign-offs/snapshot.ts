import type { Property } from '@/api/codes.ts';
import type { SignOffComment } from '@/api/sign-offs.ts';
import { channelText } from '@/client/curves/channel-text.ts';
import { decoderText } from '@/client/curves/decoder-text.ts';
import type { Channel } from '@/core/channels/channel.ts';
import type { DecoderSpec } from '@/core/decoders/decoder-spec.ts';
import type { Enclosure, Graded } from '@/core/evidence.ts';
import { parameterText } from '../charts/rate-text.ts';

/** A rate as it stood: no value where no error was seen. */
export interface KnownRate extends Enclosure {
  value: number | null;
}

/** One measurement in the snapshot of a sign-off. */
export interface MeasuredRow {
  point: string;
  run: { id: string; name: string; seed: string } | null;
  grade: 'sampled' | 'computed';
  channel: Channel;
  decoder: DecoderSpec;
  tally: { frames: number; frameErrors: number };
  level: number;
  fer: KnownRate;
}

/** Limits that weight strata gave, at the required p and beyond. */
export interface StrataRow {
  run: { id: string; name: string };
  decoder: DecoderSpec;
  level: number;
  radius: Graded<number> | null;
  strata: { weight: number; grade?: string }[];
  limits: { p: number; fer: Enclosure }[];
}

/** The parts of a snapshot that pages show. Snapshots of earlier releases of this program have no strata of their own and
 *  no data measured elsewhere. */
export interface Snapshot {
  program: { name: string; version: string };
  project: { name: string };
  code: { name: string; n: number; k: number; rows: number; ones: number };
  fingerprint: string;
  lineage: {
    designTitle: string;
    certificate: { holds: boolean; method: string } | null;
    keptBy: string;
    keptAt: string;
  };
  properties: Property[];
  requirements: { statedAt: string; stated: { channel?: Channel; decoder?: DecoderSpec } } | null;
  measurements: MeasuredRow[];
  strata?: StrataRow[];
  measuredData?: { id: string; name: string; fileName: string; points: MeasuredPoint[]; level: number }[];
}

export interface MeasuredPoint {
  p: number;
  frames: number;
  frameErrors: number;
  interval: Enclosure;
}

export const snapshotOf = (text: string): Snapshot => JSON.parse(text) as Snapshot;

/** A channel that stands alone, without an axis that would say what its number is. */
export const channelWords = (channel: Channel): string =>
  `${channel.kind === 'bsc' ? 'p = ' : ''}${channelText(channel, parameterText)}`;

export const pointText = ({ channel, decoder }: Pick<MeasuredRow, 'channel' | 'decoder'>): string =>
  `${channelWords(channel)}, ${decoderText(decoder)}`;

/** Something that a comment can be about, as a choice of a form. */
export interface CommentTarget {
  about: SignOffComment['about'];
  value: string;
  label: string;
}

/** All that a comment on this snapshot can be about. */
export const commentTargets = ({ properties, measurements }: Snapshot): CommentTarget[] => [
  { about: { kind: 'whole' }, value: 'whole', label: 'the whole' },
  ...properties.map(({ key, label, text }) => ({
    about: { kind: 'property' as const, key },
    value: `property ${key}`,
    label: `${label}: ${text}`,
  })),
  ...measurements.map((measured) => ({
    about: { kind: 'point' as const, point: measured.point },
    value: `point ${measured.point}`,
    label: [pointText(measured), measured.run?.name].filter(Boolean).join(', '),
  })),
];

/** What a comment is about, in words. */
export function aboutText(about: SignOffComment['about'], targets: readonly CommentTarget[]): string {
  const same = (target: CommentTarget) => JSON.stringify(target.about) === JSON.stringify(about);
  return targets.find(same)?.label ?? about.kind;
}
