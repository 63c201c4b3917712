import { type SubmitEvent, useState } from 'react';
import { endpoints } from '@/api/endpoints.ts';
import { newProjectSchema } from '@/api/projects.ts';
import { ApiFailure, call } from '@/client/api.ts';
import { Button } from '@/components/ui/Button.tsx';
import { TextAreaField, TextField } from '@/components/ui/fields.tsx';
import { Notice } from '@/components/ui/Notice.tsx';
import { paths } from '@/paths.ts';

/** Starts a project and goes to its requirements. */
export default function NewProject() {
  const [name, setName] = useState('');
  const [description, setDescription] = useState('');
  const [fields, setFields] = useState<Readonly<Record<string, string>>>({});
  const [failure, setFailure] = useState<string | null>(null);
  const [busy, setBusy] = useState(false);

  const submit = async (event: SubmitEvent<HTMLFormElement>) => {
    event.preventDefault();
    const parsed = newProjectSchema.safeParse({ name, description });
    setFailure(null);
    setFields(
      parsed.success
        ? {}
        : Object.fromEntries(parsed.error.issues.map((issue) => [issue.path.join('.'), issue.message])),
    );
    if (!parsed.success) return;
    setBusy(true);
    try {
      const { project } = await call(endpoints.createProject, { body: parsed.data });
      location.assign(paths.requirements(project.id));
    } catch (error) {
      setBusy(false);
      setFailure(error instanceof Error ? error.message : 'The project could not be started.');
      if (error instanceof ApiFailure) setFields(error.fields);
    }
  };

  return (
    <form onSubmit={submit} noValidate className="grid gap-4">
      <TextField label="name" required error={fields.name} value={name} onChange={(e) => setName(e.target.value)} />
      <TextAreaField
        label="what it is for"
        error={fields.description}
        value={description}
        onChange={(e) => setDescription(e.target.value)}
      />
      {failure && (
        <Notice kind="fail" word="Not started" live>
          {failure}
        </Notice>
      )}
      <div>
        <Button type="submit" busy={busy}>
          Start project
        </Button>
      </div>
    </form>
  );
}
