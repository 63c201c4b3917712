import type { z } from 'zod';

/** How zod begins where a schema has no words of its own; what follows is what is accepted. */
const complaint = /^(Invalid (input|option|discriminator value)|Too (small|big))[:.] [Ee]xpected /;

/** Each bad field of a parse, by its dotted path, with what is accepted there. */
export function fieldsOf(error: z.core.$ZodError): Record<string, string> {
  const fields: Record<string, string> = {};
  for (const issue of error.issues) collect(issue, [], fields);
  return fields;
}

function collect(issue: z.core.$ZodIssue, prefix: PropertyKey[], fields: Record<string, string>): void {
  const path = [...prefix, ...issue.path];
  if (issue.code === 'unrecognized_keys') {
    for (const key of issue.keys) put(fields, [...path, key], 'nothing: no such field is known');
    return;
  }
  if (issue.code === 'invalid_union' && issue.errors.length > 0) {
    // The alternative that came nearest: the one with the deepest complaint.
    const depth = (issues: z.core.$ZodIssue[]) => Math.max(...issues.map((inner) => inner.path.length));
    const nearest = issue.errors.reduce((best, next) => (depth(next) > depth(best) ? next : best));
    for (const inner of nearest) collect(inner, path, fields);
    return;
  }
  put(fields, path, issue.message.replace(complaint, ''));
}

function put(fields: Record<string, string>, path: PropertyKey[], accepted: string): void {
  const name = path.map(String).join('.') || 'body';
  fields[name] ??= accepted;
}
