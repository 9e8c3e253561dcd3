import { exampleOf, isShown, isTyped, type Draft, type FieldSet } from './field-spec';
import { fieldSchema } from './read-draft';

/** An input of a link that could not be taken, and why. */
export interface LeftOut {
  label: string;
  text: string;
  problem: string;
}

/** What a page opens with. */
export interface OpenedLink {
  draft: Draft;
  leftOut: LeftOut[];
  /** Choices that the link does not make and that stand as in the example, by label. */
  assumed: string[];
}

/** The inputs as a query string: every field that is asked for and not empty. */
export function queryOf(fields: FieldSet, draft: Draft): string {
  const query = new URLSearchParams();
  for (const [name, field] of Object.entries(fields)) {
    const text = (draft[name] ?? '').trim();
    if (text !== '' && isShown(field, draft)) query.set(name, text);
  }
  return query.toString();
}

const shortened = (text: string) => (text.length > 40 ? `${text.slice(0, 40)}…` : text);

/**
 * Opens a calculation from the query of its address. Without any of its inputs it opens with the example. With some, a
 * typed field that the link does not fill, or fills with what cannot be read, is left empty and never taken from the
 * example: a result has to come from what the sender typed. What was left out is told, with the reason.
 */
export function openLink(
  fields: FieldSet,
  params: Readonly<Record<string, string | string[] | undefined>>,
): OpenedLink {
  const given = new Map<string, string>();
  for (const [name, value] of Object.entries(params)) {
    const text = (Array.isArray(value) ? value[0] : value)?.trim();
    if (text) given.set(name, text);
  }
  const draft = exampleOf(fields, given.get('units') === 'in' ? 'in' : 'mm');
  const leftOut: LeftOut[] = [];
  const assumed: string[] = [];
  const named = Object.entries(fields);
  const fromLink = named.some(([name]) => given.has(name));
  // Choices first: they decide how the rest is read.
  const inOrder = [
    ...named.filter(([, field]) => !isTyped(field)),
    ...named.filter(([, field]) => isTyped(field)),
  ];
  for (const [name, field] of inOrder) {
    const text = given.get(name);
    given.delete(name);
    if (text === undefined) {
      if (!fromLink || !isShown(field, draft)) continue;
      if (isTyped(field)) draft[name] = '';
      else assumed.push(field.label);
      continue;
    }
    const read = fieldSchema(field, draft).safeParse(text);
    if (read.success) {
      draft[name] = text;
      continue;
    }
    if (isTyped(field)) draft[name] = '';
    else assumed.push(field.label);
    const problem = read.error.issues[0]?.message ?? 'It cannot be read.';
    leftOut.push({ label: field.label, text: shortened(text), problem });
  }
  for (const [name, text] of given)
    leftOut.push({
      label: shortened(name),
      text: shortened(text),
      problem: 'It is no input of this calculation.',
    });
  return { draft, leftOut, assumed };
}
