import { z } from 'zod';

/**
 * The small schemas that everything else is made of. Text never holds U+0000: PostgreSQL's jsonb refuses it, and one
 * such string would take a whole batch down with it.
 */
const noNull = (text: string) => !text.includes('\u0000');

/** Text a person typed: trimmed, 1 to `most` characters. */
export const requiredText = (most = 2000) =>
  z
    .string()
    .trim()
    .min(1, 'Write something here.')
    .max(most, `At most ${most} characters.`)
    .refine(noNull, 'This text holds a character that cannot be kept.');

/** Text a person may leave out. */
export const optionalText = (most = 2000) =>
  z
    .string()
    .trim()
    .max(most, `At most ${most} characters.`)
    .refine(noNull, 'This text holds a character that cannot be kept.');

/** Identifier of a record (UUID, version 7 where it is made by this program). */
export const recordId = z.uuid();

/** Identifier of something inside a plan: stable over revisions. */
export const planKey = z
  .string()
  .min(1)
  .max(80)
  .regex(/^[A-Za-z0-9][A-Za-z0-9._:-]*$/, 'Letters, digits, dot, colon, dash only.');

/** An instant, ISO 8601 in UTC with milliseconds, as `Date.prototype.toISOString` writes it. */
export const instant = z.iso.datetime({ precision: 3 });

/** Millimetres, finite, within what a building can hold. */
export const millimetres = z.number().finite().min(-1_000_000).max(1_000_000);
export const positiveMillimetres = z.number().finite().positive('More than zero.').max(1_000_000);

/** A length as it was entered, and exactly converted; `mm` is null while its unit is unknown. */
export const lengthAsEntered = z
  .object({
    text: requiredText(40),
    unit: z.enum(['mm', 'cm', 'm', 'in', 'ft']).nullable(),
    mm: millimetres.nullable(),
  })
  .refine(
    (length) => (length.unit === null) === (length.mm === null),
    'A length without a unit has no millimetres.',
  );
export type LengthAsEntered = z.infer<typeof lengthAsEntered>;

export const lengthUnit = z.enum(['mm', 'in']);
export const digest = z.string().regex(/^[0-9a-f]{64}$/);
