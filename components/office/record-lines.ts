import type { Entry, EntryOf } from '@/lib/inspection/entry';
import type { Sheet } from '@/lib/inspection/sheet-types';
import { roleWords, type Role } from '@/lib/inspection/roles';
import { entryWords, personName, type EntryWording, type WordContext } from './entry-words';

/** What was said of an entry later: who changed it, when and why, and whether that counts. */
export interface AmendmentLine {
  id: string;
  by: string;
  at: string;
  reason: string;
  withdraws: boolean;
  now: string | null;
  problem: string | null;
}

/** One entry of the record, ready to be drawn. */
export interface RecordLine {
  id: string;
  type: Entry['type'];
  seq: number | null;
  hash: string | null;
  wording: EntryWording;
  by: string;
  authorId: string;
  role: Role;
  recordedAt: string;
  receivedAt: string | null;
  /** The device's clock was more than five minutes from the server's. */
  clockDoubtful: boolean;
  ofProject: boolean;
  amendments: AmendmentLine[];
  /** The body as it stands now, whose words its author may correct from the office; null where it has none. */
  correctable: { key: string; body: Json } | null;
}

type Json = NonNullable<EntryOf<'amendment'>['body']['replacement']>;

const FIVE_MINUTES = 300_000;

/** People's names from a list, for the words. */
export const peopleById = (people: readonly { id: string; name: string }[]): ReadonlyMap<string, string> =>
  new Map(people.map((person) => [person.id, person.name]));

/** What the words need, from a sheet. */
export function wordContextOf(
  sheet: Sheet,
  people: ReadonlyMap<string, string>,
  timeZone: string,
): WordContext {
  return {
    plan: sheet.plan,
    entries: new Map(sheet.entries.map((entry) => [entry.id, entry])),
    people,
    timeZone,
  };
}

const problemsOf = (sheet: Sheet): ReadonlyMap<string, string> => {
  const applied = [
    ...sheet.faces.flatMap((face) =>
      [...face.points, ...face.spots].flatMap((point) =>
        point.readings.flatMap((reading) => reading.amendments),
      ),
    ),
    ...sheet.measurements.flatMap((item) => item.places.flatMap((place) => place.amendments)),
  ];
  return new Map(
    applied.flatMap((one) =>
      one.counts ? [] : [[one.entry.id, one.problem ?? 'It does not count.'] as const],
    ),
  );
};

/** Where the words of an entry stand in its body, for the kinds whose words are all there is to correct. */
const wordsKey: Partial<Record<Entry['type'], string>> = {
  note: 'text',
  query: 'text',
  nonconformance: 'extent',
};

function correctable(entry: Entry, amendments: readonly EntryOf<'amendment'>[]): RecordLine['correctable'] {
  const key = wordsKey[entry.type];
  if (!key) return null;
  const latest = amendments.at(-1);
  if (latest) return latest.body.replacement && { key, body: latest.body.replacement };
  return { key, body: JSON.parse(JSON.stringify(entry.body)) as Json };
}

/** Every entry, oldest first, with what was said of it since; those not received yet come last. */
export function recordLines(sheet: Sheet, context: WordContext): RecordLine[] {
  const problems = problemsOf(sheet);
  const amendments = new Map<string, EntryOf<'amendment'>[]>();
  for (const entry of sheet.entries) {
    if (entry.type !== 'amendment') continue;
    amendments.set(entry.body.rootId, [...(amendments.get(entry.body.rootId) ?? []), entry]);
  }
  return [...sheet.entries]
    .sort((a, b) => (a.seq ?? Number.MAX_SAFE_INTEGER) - (b.seq ?? Number.MAX_SAFE_INTEGER))
    .map((entry) => ({
      id: entry.id,
      type: entry.type,
      seq: entry.seq,
      hash: entry.hash,
      wording: entryWords(entry, context),
      by: personName(entry.authorId, context.people),
      authorId: entry.authorId,
      role: entry.authorRole,
      recordedAt: entry.recordedAt,
      receivedAt: entry.receivedAt,
      clockDoubtful: Math.abs(entry.clockOffsetMs ?? 0) > FIVE_MINUTES,
      ofProject: entry.pourId === null,
      amendments: (amendments.get(entry.id) ?? []).map((amendment) => ({
        id: amendment.id,
        by: personName(amendment.authorId, context.people),
        at: amendment.recordedAt,
        reason: amendment.body.reason,
        withdraws: amendment.body.replacement === null,
        now:
          entryWords(amendment, context)
            .lines.find((line) => line.startsWith('Now: '))
            ?.slice(5) ?? null,
        problem: problems.get(amendment.id) ?? null,
      })),
      correctable: correctable(entry, amendments.get(entry.id) ?? []),
    }));
}

/** "N. Okafor, inspector". */
export const byWords = (line: Pick<RecordLine, 'by' | 'role'>): string =>
  `${line.by}, ${roleWords[line.role].toLowerCase()}`;
