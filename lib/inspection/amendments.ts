import { headsOf } from './causality';
import type { EntryOf } from './entry';
import { siteBodies } from './entry-bodies';
import type { Facts } from './facts';
import { mayAmend, measurerChange } from './measurers';
import type { AppliedAmendment } from './sheet-types';

/** Types whose recorder may correct or withdraw them. Everything else is answered by a further entry. */
export const amendableTypes = [
  'answer',
  'reading',
  'measurement',
  'note',
  'query',
  'nonconformance',
  'last-walk',
  'signature',
] as const;
export type AmendableType = (typeof amendableTypes)[number];
export const isAmendable = (type: string): type is AmendableType =>
  (amendableTypes as readonly string[]).includes(type);

export interface Amended<T extends AmendableType> {
  /** The body that counts now; null once withdrawn. */
  current: EntryOf<T>['body'] | null;
  amendments: AppliedAmendment[];
  /** Bodies of amendments recorded without having seen each other: the caller takes the least favourable. */
  rivals: (EntryOf<T>['body'] | null)[];
  conflict: boolean;
}

/**
 * Applies the amendments of one entry. An amendment never hides: each stays listed, with whether it counts.
 * @param needsPhoto tells whether going from the body before to the body after needs a photograph that shows it
 */
export function amended<T extends AmendableType>(
  facts: Facts,
  root: EntryOf<T>,
  needsPhoto: (before: EntryOf<T>['body'], after: EntryOf<T>['body']) => boolean = () => false,
): Amended<T> {
  const list = facts.amendmentsByRoot.get(root.id);
  if (!list) return { current: root.body, amendments: [], rivals: [root.body], conflict: false };

  const applied: AppliedAmendment[] = [];
  const bodies = new Map<string, EntryOf<T>['body'] | null>();
  let current: EntryOf<T>['body'] | null = root.body;
  for (const entry of list) {
    const outcome: Outcome<T> = bodyAfter(facts, root, entry, current, needsPhoto);
    applied.push({ entry, counts: outcome.problem === null, problem: outcome.problem });
    if (outcome.problem !== null) continue;
    current = outcome.body;
    bodies.set(entry.id, outcome.body);
  }
  const counting = applied.filter((amendment) => amendment.counts).map((amendment) => amendment.entry);
  const heads = headsOf(counting);
  const rivals = heads.length > 1 ? heads.map((head) => bodies.get(head.id) ?? null) : [current];
  return { current, amendments: applied, rivals, conflict: heads.length > 1 };
}

interface Outcome<T extends AmendableType> {
  body: EntryOf<T>['body'] | null;
  problem: string | null;
}

function bodyAfter<T extends AmendableType>(
  facts: Facts,
  root: EntryOf<T>,
  amendment: EntryOf<'amendment'>,
  before: EntryOf<T>['body'] | null,
  needsPhoto: (before: EntryOf<T>['body'], after: EntryOf<T>['body']) => boolean,
): Outcome<T> {
  if (!mayAmend(root, amendment.authorId, amendment.authorRole))
    return { body: before, problem: 'Only the person who recorded it can amend it.' };
  if (amendment.body.replacement === null) return { body: null, problem: null };
  const parsed = siteBodies[root.type].safeParse(amendment.body.replacement);
  if (!parsed.success) return { body: before, problem: 'The amended values cannot be read.' };
  const after = parsed.data as EntryOf<T>['body'];
  const unsaid = measurerChange(root, parsed.data, amendment.authorId);
  if (unsaid) return { body: before, problem: unsaid };
  const shown = amendment.body.photoId !== null && facts.photoIds.has(amendment.body.photoId);
  if (before !== null && needsPhoto(before, after) && !shown) {
    return {
      body: before,
      problem: 'From not met to met needs the photograph that shows it, or a new reading.',
    };
  }
  return { body: after, problem: null };
}
