import { describe, expect, test } from 'vitest';
import { transformForms, transformFrom, transformText } from '@/components/codes/transform/transform-forms.ts';
import { transformKinds } from '@/core/codes/transforms/registry.ts';

describe('the forms of transforms', () => {
  test('are one for each kind that the engine has, in any order', () => {
    expect(transformForms.map(({ kind }) => kind).sort()).toEqual([...transformKinds.keys()].sort());
  });

  test.each(transformForms.map((form) => [form.kind, form] as const))(
    '%s states by its example what the engine reads',
    (kind, form) => {
      const typed = Object.fromEntries(form.fields.map(({ name, example }) => [name, example]));
      const parsed = transformKinds.get(kind)!.schema.safeParse(transformFrom(form, typed));
      expect(parsed.error?.issues).toBeUndefined();
    },
  );

  test('leave what cannot be read for the engine to refuse', () => {
    const shorten = transformForms.find(({ kind }) => kind === 'shorten')!;
    const { schema } = transformKinds.get('shorten')!;
    for (const bits of ['', '-1', 'many', '2.5'])
      expect(schema.safeParse(transformFrom(shorten, { bits })).success).toBe(false);
  });

  test('say a kept step in words', () => {
    expect(transformText({ kind: 'shorten', bits: 8 } as { kind: string })).toBe('Shorten, bits 8');
  });
});
