import type { EntryOf } from './entry';
import type { SubjectRef } from './entry-bodies';
import { listOf, pointKeyOf, subjectKey, type Facts } from './facts';

/** What one correction says it has put right, as subject keys, with nonconformances and entries followed to their places. */
export interface CorrectedSubjects {
  entry: EntryOf<'correction'>;
  keys: Set<string>;
}

/** Every correction with the subjects it reaches, in the order of the record. */
export function correctedSubjects(facts: Facts): CorrectedSubjects[] {
  return listOf(facts, 'correction').map((entry) => {
    const keys = new Set<string>();
    for (const about of entry.body.about) reach(facts, about, keys);
    return { entry, keys };
  });
}

/** The same by what they reach, so that each thing finds its own without asking every correction of the pour. */
export function correctionsByKey(corrections: readonly CorrectedSubjects[]): CorrectionsByKey {
  const byKey = new Map<string, CorrectedSubjects[]>();
  for (const correction of corrections) {
    for (const key of correction.keys) {
      const known = byKey.get(key);
      if (known) known.push(correction);
      else byKey.set(key, [correction]);
    }
  }
  return { all: corrections, of: (key) => byKey.get(key) ?? none };
}

const none: readonly CorrectedSubjects[] = [];

/** Every correction of a pour, and those that reach one subject, in the order of the record. */
export interface CorrectionsByKey {
  all: readonly CorrectedSubjects[];
  of(key: string): readonly CorrectedSubjects[];
}

function reach(facts: Facts, about: SubjectRef, keys: Set<string>): void {
  const key = subjectKey(about);
  if (keys.has(key)) return;
  keys.add(key);
  if (about.kind !== 'nonconformance' && about.kind !== 'entry') return;
  const entry = facts.byId.get(about.id);
  if (!entry) return;
  if (entry.type === 'nonconformance') for (const inner of entry.body.about) reach(facts, inner, keys);
  if (entry.type === 'reading') keys.add(subjectKey({ kind: 'point', id: pointKeyOf(entry) }));
  if (entry.type === 'answer') keys.add(subjectKey({ kind: 'check', id: entry.body.checkId }));
  if (entry.type === 'measurement') keys.add(subjectKey({ kind: 'measurement', id: entry.body.itemId }));
}
