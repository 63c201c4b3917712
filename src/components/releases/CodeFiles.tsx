import type { ReactNode } from 'react';
import { endpoints } from '@/api/endpoints.ts';
import type { CodeForms } from '@/api/releases.ts';
import { addressOf } from '@/client/api.ts';

interface Props {
  codeId: string;
  forms: CodeForms;
}

/** Every file that a code can be given as. */
export function CodeFiles({ codeId, forms }: Props) {
  const params = { id: codeId };
  return (
    <dl className="grid gap-3">
      {forms.words.length > 0 && (
        <Group title="Words">
          {forms.words.map(({ id: form, title }) => (
            <FileLink key={form} href={addressOf(endpoints.getWords, { params, query: { form } })} title={title} />
          ))}
        </Group>
      )}
      <Group title={forms.words.length > 0 ? 'Words as rows of a matrix' : 'Parity-check matrix'}>
        {forms.formats.map(({ id: format, title }) => (
          <FileLink key={format} href={addressOf(endpoints.getMatrix, { params, query: { format } })} title={title} />
        ))}
      </Group>
      {forms.generators.length > 0 && (
        <Group title="Generator">
          {forms.generators.map(({ id: form, title }) => (
            <FileLink key={form} href={addressOf(endpoints.getGenerator, { params, query: { form } })} title={title} />
          ))}
        </Group>
      )}
      {forms.blocks.length > 0 && (
        <Group title="Design">
          {forms.blocks.map(({ id: form, title }) => (
            <FileLink key={form} href={addressOf(endpoints.getBlocks, { params, query: { form } })} title={title} />
          ))}
        </Group>
      )}
      <Group title="About them">
        <FileLink href={addressOf(endpoints.getManifest, { params })} title="manifest" />
      </Group>
    </dl>
  );
}

function Group({ title, children }: { title: string; children: ReactNode }) {
  return (
    <div>
      <dt className="text-quiet text-tiny">{title}</dt>
      <dd className="flex flex-wrap gap-x-5 gap-y-1">{children}</dd>
    </div>
  );
}

const FileLink = ({ href, title }: { href: string; title: string }) => (
  <a className="link inline-block min-h-6" href={href} download>
    {title}
  </a>
);
