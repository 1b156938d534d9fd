import type { z } from 'zod';

/** A form as an object: a name that comes once gives its text, one that comes again gives a list. */
export function objectOfForm(form: FormData): Record<string, unknown> {
  const object: Record<string, unknown> = {};
  for (const name of new Set(form.keys())) {
    // Next's own fields of an action call.
    if (name.startsWith('$ACTION_')) continue;
    const values = form.getAll(name);
    object[name] = values.length === 1 ? values[0] : values;
  }
  return object;
}

/** First message of each field, "definition.terms.2.level" style; "" is the form as a whole. */
export function fieldMessages(error: z.ZodError): Record<string, string> {
  const fields: Record<string, string> = {};
  for (const issue of error.issues) fields[issue.path.join('.')] ??= issue.message;
  return fields;
}
