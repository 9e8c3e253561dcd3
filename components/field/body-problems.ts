import { siteBodies, projectBodies } from '@/lib/inspection/entry-bodies';
import type { BodyOf } from '@/lib/inspection/entry';
import type { DeviceEntryType } from '@/lib/device/device-types';
import type { Problems } from './problems-of';

const schemas = { ...siteBodies, ...projectBodies };

/** Checks a body by the entry's own schema, so that the form says at the field what the device would refuse. */
export function bodyProblems<T extends DeviceEntryType>(type: T, body: BodyOf<T>): Problems {
  const parsed = schemas[type].safeParse(body);
  if (parsed.success) return {};
  const problems: Record<string, string> = {};
  for (const issue of parsed.error.issues) problems[issue.path.join('.')] ??= issue.message;
  return problems;
}
