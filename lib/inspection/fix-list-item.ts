import { z } from 'zod';
import { siteBodies, subjectRef } from './entry-bodies';
import { opening, recess } from './plan';
import { digest, lengthUnit, millimetres, planKey, positiveMillimetres, recordId } from './primitives';

const found = z.object({ label: z.string(), value: z.string() });

/** What is wrong, as facts: the words for it are made in the reader's language. */
const whatToFix = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('cover'), values: z.array(found), accepted: z.string(), high: z.boolean() }),
  z.object({ kind: z.literal('depth'), values: z.array(found), planned: z.string() }),
  z.object({
    kind: z.literal('measurement'),
    title: z.string(),
    values: z.array(z.string()),
    least: z.string().nullable(),
    most: z.string().nullable(),
  }),
  z.object({ kind: z.literal('check'), question: z.string(), note: z.string() }),
  z.object({
    kind: z.literal('nonconformance'),
    title: z.string(),
    decision: z.enum(['rework', 'repair', 'reject']).nullable(),
    /** Why it was decided so; empty before a decision. */
    reason: z.string(),
    extent: z.string(),
  }),
]);

/** Where on a face it is: the face to scale, and the points that fail on it. */
const whereOnFace = z.object({
  name: z.string(),
  widthMm: positiveMillimetres,
  heightMm: positiveMillimetres,
  openings: z.array(opening),
  recesses: z.array(recess),
  points: z.array(
    z.object({
      key: planKey,
      label: z.string(),
      xMm: millimetres,
      yMm: millimetres,
      mark: z.enum(['met', 'met-flagged', 'not-met-low', 'not-met-high', 'not-verified', 'unread']),
      spot: z.boolean(),
    }),
  ),
});

/** One thing that the crew must put right: a hold that a correction can clear. */
export const fixItem = z.object({
  id: z.string(),
  about: subjectRef,
  /** In words, as people on site say it. */
  where: z.string(),
  what: whatToFix,
  /** What a report of it names: all of it, or of several points those that were put right. */
  together: z.array(subjectRef).min(1).max(100),
  /** The points to choose from, where there are several; `asked`: the engineer is asked to decide on it. */
  choices: z.array(z.object({ key: planKey, label: z.string(), asked: z.boolean() })),
  place: siteBodies.correction.shape.where,
  face: whereOnFace.nullable(),
  /** Stored photos of it, latest last. */
  photoIds: z.array(recordId),
});
export type FixItem = z.infer<typeof fixItem>;

/** What crew get of a pour in place of its record: what they must put right, and what waits for the inspector. */
export const crewList = z.object({
  /** Tells a list that a device holds already. */
  digest,
  planRevision: z.number().int().positive(),
  units: lengthUnit,
  drawings: z.array(z.string()),
  items: z.array(fixItem),
  /** Reported as put right, and to be looked at again by the inspector. */
  awaited: z.array(z.object({ id: z.string(), where: z.string() })),
});
export type CrewList = z.infer<typeof crewList>;
