import { z } from 'zod';
import { findBarFor, type Bar } from '@/lib/concrete/bars';
import { parseLength, withUnit } from '@/lib/concrete/length';
import {
  isShown,
  isTyped,
  mayBeEmpty,
  unitsOf,
  type Draft,
  type Field,
  type FieldSet,
  type TypedField,
  type ValuesOf,
} from './field-spec';
import { parseNumber, parseQuantity, type ParsedNumber } from './quantities';

const LONGEST = 40;

type Read = ParsedNumber | { ok: true; value: Bar };

const asked: Record<TypedField['kind'], string> = {
  length: 'Enter a length.',
  number: 'Enter a number.',
  quantity: 'Enter a number.',
  bar: 'Enter a bar size, as in #5 or 16 mm.',
};

function readText(field: TypedField, text: string, draft: Draft): Read {
  const units = unitsOf(draft);
  switch (field.kind) {
    case 'length': {
      const read = parseLength(text, units);
      if (!read.ok) return read;
      const { mm } = read.length;
      if (mm === null) return { ok: false, problem: 'Write the unit too.' };
      if (mm > field.mostMm)
        return { ok: false, problem: `It has to be at most ${withUnit(field.mostMm, units)}.` };
      return { ok: true, value: mm };
    }
    case 'number':
      return parseNumber(text, field);
    case 'quantity':
      return parseQuantity(text, field.quantity, units);
    case 'bar': {
      const found = findBarFor(text, draft.basis ?? '');
      return found
        ? { ok: true, value: found }
        : { ok: false, problem: `"${text}" is no bar size known here: #5, 16 mm, 15M, N16 or IS 16.` };
    }
  }
}

/** The schema of one field under the choices made: of its text to its value, in mm and first units. */
export function fieldSchema(field: Field, draft: Draft) {
  if (!isTyped(field)) {
    const known = field.kind === 'check' ? ['yes', 'no'] : Object.keys(field.choices);
    return z
      .string()
      .refine((text) => known.includes(text), { error: 'It is not one of the choices.' })
      .transform((text) => (field.kind === 'check' ? text === 'yes' : text));
  }
  return z
    .string()
    .max(LONGEST, { error: `It is too long: at most ${LONGEST} characters.`, abort: true })
    .transform((text, context) => {
      const kept = text.trim();
      if (kept === '' && mayBeEmpty(field, draft)) return undefined;
      const read: Read =
        kept === '' ? { ok: false, problem: asked[field.kind] } : readText(field, kept, draft);
      if (read.ok) return read.value;
      context.addIssue({ code: 'custom', message: read.problem });
      return z.NEVER;
    });
}

export type ReadDraft<Fields extends FieldSet> =
  { ok: true; values: ValuesOf<Fields> } | { ok: false; problems: Record<string, string> };

/**
 * The values of a draft: lengths in mm, quantities in their first unit. Fields that the choices made do not ask for are
 * not looked at, and undefined where they are typed ones. Problems are told by field, one sentence each.
 */
export function readDraft<Fields extends FieldSet>(fields: Fields, draft: Draft): ReadDraft<Fields> {
  const named = Object.entries(fields);
  const asks = named.filter(([, field]) => isShown(field, draft) || !isTyped(field));
  const schema = z.object(Object.fromEntries(asks.map(([name, field]) => [name, fieldSchema(field, draft)])));
  const read = schema.safeParse(draft);
  if (read.success) {
    const nothing = Object.fromEntries(named.map(([name]) => [name, undefined]));
    // The schema was made from these very fields, which TypeScript cannot follow through the entries.
    return { ok: true, values: { ...nothing, ...read.data } as ValuesOf<Fields> };
  }
  const problems: Record<string, string> = {};
  for (const issue of read.error.issues) problems[String(issue.path[0])] ??= issue.message;
  return { ok: false, problems };
}
