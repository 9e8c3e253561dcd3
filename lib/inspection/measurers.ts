import type { BodyOf, EntryOf } from './entry';
import { mayRecord } from './entry-access';
import { siteBodies } from './entry-bodies';
import type { Role } from './roles';

type ReadingBody = BodyOf<'reading'>;
type ReadingEntry = EntryOf<'reading'>;

/** An entry of whatever type, as far as it tells whose it is. */
export type Authored = Pick<ReadingEntry, 'authorId'> & { type: string; body: object };
const isReading = (entry: Authored): entry is ReadingEntry => entry.type === 'reading';

/** Who held the gauge: the person named as the measurer, or else who recorded the reading. */
export const measurerOf = (entry: Pick<ReadingEntry, 'authorId' | 'body'>): string =>
  entry.body.measurer?.personId ?? entry.authorId;

/** Does this reading wait for a person other than its author to say that it is theirs? */
export const waitsForMeasurer = (body: ReadingBody): boolean =>
  body.measurer !== null && !body.measurer.confirmed;

/** Who else of a project can be named as having read: those whose role may record a reading. */
export const otherMeasurers = <P extends { id: string; role: Role }>(
  people: readonly P[],
  authorId: string,
): P[] => people.filter((person) => person.id !== authorId && mayRecord('reading', person.role));

/** May this person amend the entry: who recorded it, or the measurer whom a reading names and who may read? */
export const mayAmend = (root: Authored, personId: string, role: Role): boolean =>
  root.authorId === personId ||
  (isReading(root) && measurerOf(root) === personId && mayRecord('reading', role));

/**
 * Why a reading cannot stand as it says who measured it: nobody confirms for another person.
 * @param speakerId who records the reading, or its amendment
 * @returns a sentence, or null where it can
 */
export function measurerProblem(body: ReadingBody, speakerId: string): string | null {
  const { measurer } = body;
  if (measurer === null || !measurer.confirmed || measurer.personId === speakerId) return null;
  return 'Only the person who read can confirm the reading.';
}

/** The body as this person may amend it: the measurer's word confirms it, anybody else's asks for that again. */
export const saidBy = (body: ReadingBody, speakerId: string): ReadingBody =>
  body.measurer === null
    ? body
    : { ...body, measurer: { ...body.measurer, confirmed: body.measurer.personId === speakerId } };

/** Why an amended body of a reading says of who measured what its author may not say; null where it does not. */
export function measurerChange(root: Authored, after: unknown, speakerId: string): string | null {
  if (!isReading(root)) return null;
  const parsed = siteBodies.reading.safeParse(after);
  if (!parsed.success) return null;
  if (measurerOf({ ...root, body: parsed.data }) !== measurerOf(root))
    return 'Who read is not amended. Withdraw the reading and record it again.';
  return measurerProblem(parsed.data, speakerId);
}
