import { siteBodies, projectBodies } from '@/lib/inspection/entry-bodies';
import type { BodyOf } from '@/lib/inspection/entry';
import { DeviceError, type DeviceEntryType } from '@/lib/device/device-types';

/** Problems of a form by field path ("where.text"); the empty path is about the form as a whole. */
export type Problems = Readonly<Record<string, string>>;

const schemas = { ...siteBodies, ...projectBodies };

/** Checks a body by the entry's own schema, so that the form says at the field what the device would refuse. */
export function bodyProblems<T extends DeviceEntryType>(type: T, body: BodyOf<T>): Problems {
  const parsed = schemas[type].safeParse(body);
  if (parsed.success) return {};
  const problems: Record<string, string> = {};
  for (const issue of parsed.error.issues) problems[issue.path.join('.')] ??= issue.message;
  return problems;
}

/** What to tell a person when an entry could not be kept: by field where the device names fields. */
export function problemsOf(error: unknown): Problems {
  if (error instanceof DeviceError) {
    if (error.fields.length > 0)
      return Object.fromEntries(error.fields.map((field) => [field.path, field.message]));
    return { '': error.message };
  }
  return { '': 'This could not be kept on the device. What you entered is still here. Try again.' };
}
