import type { Property } from '@/api/codes.ts';
import { duration } from '@/components/ui/numbers.ts';
import { TitleBlock, type TitleRow } from '@/components/ui/TitleBlock.tsx';

interface Props {
  properties: readonly Property[];
  /** Lines before the properties: design, code. */
  before?: readonly TitleRow[];
  /** Lines after them: fingerprint, who kept it. */
  after?: readonly TitleRow[];
  title?: string;
  showTitle?: boolean;
}

/** Every property of a code with its grade, method and source. */
export function PropertiesBlock({ properties, before = [], after = [], title = 'Code', showTitle = false }: Props) {
  return <TitleBlock title={title} showTitle={showTitle} rows={[...before, ...properties.map(rowOf), ...after]} />;
}

function rowOf({ label, text, grade, method, source, elapsedMs }: Property): TitleRow {
  const time = elapsedMs !== undefined && elapsedMs >= 1 ? duration(elapsedMs) : undefined;
  return { label, value: text, grade, note: [method, source, time].filter(Boolean).join('; ') };
}

/** A fingerprint in groups of eight, to be read aloud or compared by eye; copied whole. */
export function Fingerprint({ hex }: { hex: string }) {
  return (
    <code className="block font-mono font-normal text-tiny leading-snug">
      {hex.match(/.{1,8}/g)?.map((group) => (
        <span key={group} className="mr-2 inline-block">
          {group}
        </span>
      ))}
    </code>
  );
}
