import { z } from 'zod';
import { entryEnvelope, receipt } from './entry';
import { crewList } from './fix-list-item';
import { digest, instant, recordId } from './primitives';
import { plan } from './plan';
import { MOST_ENTRIES_IN_A_BATCH, PROTOCOL } from './protocol';
import { role } from './roles';

/** A batch of one project and one author. Entries are parsed one by one, so that one bad entry leaves the rest kept. */
export const pushRequest = z.object({
  protocol: z.literal(PROTOCOL),
  projectId: recordId,
  deviceId: recordId,
  sentAt: instant,
  entries: z.array(z.unknown()).min(1).max(MOST_ENTRIES_IN_A_BATCH),
});
export type PushRequest = z.infer<typeof pushRequest>;

export const refusalCodes = [
  'invalid',
  'id-reused',
  'not-allowed',
  'not-found',
  'wrong-author',
  'server-only',
  'too-new',
  'depends-on-refused',
] as const;

export const pushOutcome = z.discriminatedUnion('outcome', [
  z.object({ id: z.string(), outcome: z.literal('kept'), receipt }),
  z.object({ id: z.string(), outcome: z.literal('known'), receipt }),
  z.object({
    id: z.string(),
    outcome: z.literal('refused'),
    code: z.enum(refusalCodes),
    sentence: z.string(),
    field: z.string().optional(),
  }),
]);
export type PushOutcome = z.infer<typeof pushOutcome>;

export const pushResponse = z.object({
  serverTime: instant,
  outcomes: z.array(pushOutcome),
});
export type PushResponse = z.infer<typeof pushResponse>;

/** An entry as it travels to a device: what was received, with its receipt. */
export const storedEntry = entryEnvelope.extend(receipt.shape);
export type StoredEntry = z.infer<typeof storedEntry>;

const cursor = z.object({
  /** Highest seq of this stream that the device holds. */
  after: z.number().int().nonnegative(),
  /** Hash of the entry at `after`; lets a restored server be told. Null for an empty device. */
  headHash: z.string().nullable(),
});

export const pullRequest = z.object({
  protocol: z.literal(PROTOCOL),
  projectId: recordId,
  /** The project's own stream. */
  project: cursor,
  pours: z
    .array(
      cursor.extend({
        pourId: recordId,
        planRevision: z.number().int().nonnegative(),
        /** Digest of the crew's list that the device holds; devices of an earlier version name none. */
        crewList: digest.nullable().optional(),
      }),
    )
    .max(60),
});
export type PullRequest = z.infer<typeof pullRequest>;

const streamPage = z.object({
  entries: z.array(storedEntry),
  /** Highest seq in this page, or the cursor's own. */
  head: z.number().int().nonnegative(),
  headHash: z.string().nullable(),
  more: z.boolean(),
  /** False: the server does not hold the device's head (it was restored); the device offers again what it had sent. */
  headKnown: z.boolean(),
});

export const pullResponse = z.object({
  serverTime: instant,
  project: streamPage,
  pours: z.array(
    streamPage.extend({
      pourId: recordId,
      found: z.boolean(),
      plan: plan.nullable(),
      /** For crew only, who get it in place of the plan and of others' entries; null where the device holds it. */
      crewList: crewList.nullable().optional(),
    }),
  ),
});
export type PullResponse = z.infer<typeof pullResponse>;

/** What a device may keep: projects of the person, their pours, people's names, instruments. */
export const deviceIndex = z.object({
  serverTime: instant,
  person: z.object({ id: recordId, name: z.string(), email: z.string() }),
  /** When this session was begun with a password: a device that knew of another one opens this person's work. */
  signedInAt: instant.optional(),
  projects: z.array(
    z.object({
      id: recordId,
      name: z.string(),
      timeZone: z.string(),
      role,
      people: z.array(z.object({ id: recordId, name: z.string(), role })),
      pours: z.array(
        z.object({
          id: recordId,
          number: z.string(),
          title: z.string(),
          location: z.string(),
          plannedAt: instant.nullable(),
          planRevision: z.number().int().nonnegative(),
          assigned: z.boolean(),
          state: z.string(),
          holds: z.number().int().nonnegative(),
        }),
      ),
    }),
  ),
});
export type DeviceIndex = z.infer<typeof deviceIndex>;
