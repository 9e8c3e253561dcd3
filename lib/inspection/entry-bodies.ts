import { z } from 'zod';
import { measuredValue } from './measured-value';
import {
  digest,
  instant,
  lengthAsEntered,
  millimetres,
  optionalText,
  planKey,
  positiveMillimetres,
  recordId,
  requiredText,
} from './primitives';
import { role } from './roles';

/** What an entry is about: something of the plan, or another entry. */
export const subjectRef = z.object({
  kind: z.enum(['pour', 'element', 'face', 'point', 'check', 'measurement', 'nonconformance', 'entry']),
  id: z.string().min(1).max(120),
});
export type SubjectRef = z.infer<typeof subjectRef>;

/** Where something is: named elements, or nowhere (then it falls in every scope). */
const where = z.object({
  elementId: planKey.nullable(),
  faceId: planKey.nullable(),
  text: optionalText(200),
});

const goNoGo = z.object({ blockMm: positiveMillimetres, passes: z.boolean() });

const answer = z
  .object({
    checkId: planKey,
    answer: z.enum(['met', 'not-met', 'not-applicable']),
    reason: optionalText(500).optional(),
    note: optionalText(2000).optional(),
  })
  .refine((body) => body.answer !== 'not-applicable' || Boolean(body.reason), {
    path: ['reason'],
    message: 'Say why it does not apply here.',
  });

const reading = z
  .object({
    faceId: planKey,
    /** The requirement of the steel touched; null when that steel has none on this face. */
    requirementId: planKey.nullable(),
    steel: requiredText(80),
    /** The point read, or null for a spot reading. */
    pointId: planKey.nullable(),
    spot: z.object({ xMm: millimetres, yMm: millimetres }).nullable(),
    value: lengthAsEntered.nullable(),
    goNoGo: goNoGo.nullable(),
    instrumentId: recordId.nullable(),
    phase: z.enum(['before', 'after']),
    measuredAt: instant,
    /** The bar found, when it is not the one planned. */
    asFoundBar: optionalText(20).nullable(),
    /** Read in the form by the author; otherwise typed in for a named measurer, who has to confirm it. */
    measurer: z.object({ personId: recordId, confirmed: z.boolean() }).nullable(),
  })
  .refine(
    (body) => (body.pointId === null) !== (body.spot === null),
    'A reading is at a point or at a spot, one of the two.',
  )
  .refine(
    (body) => (body.value === null) !== (body.goNoGo === null),
    'A reading is a length or a go/no-go, one of the two.',
  );

const measurement = z.object({
  itemId: planKey,
  place: optionalText(120),
  stage: z.enum(['single', 'before', 'under', 'after']),
  value: measuredValue,
  measuredAt: instant,
});

const photo = z.object({
  photoId: recordId,
  sha256: digest,
  bytes: z.number().int().positive().max(20_000_000),
  contentType: z.enum(['image/jpeg', 'image/png', 'image/webp']),
  takenAt: instant,
  about: subjectRef,
  shot: z.enum(['wide', 'close', 'before', 'after']),
  caption: optionalText(300),
});

const nonconformance = z.object({
  title: requiredText(160),
  about: z.array(subjectRef).min(1).max(100),
  where,
  extent: requiredText(500),
  description: optionalText(2000),
  proposal: optionalText(1000),
  neededBy: instant.nullable(),
});

const condition = z.object({
  id: recordId,
  text: requiredText(500),
  criterion: requiredText(300),
  stage: z.enum(['before-pour', 'during-placing', 'after-pour']),
  dueAt: instant.nullable(),
});
export type Condition = z.infer<typeof condition>;

const disposition = z.object({
  nonconformanceId: recordId,
  decision: z.enum(['rework', 'repair', 'use-as-is', 'reject']),
  reason: requiredText(2000),
  /** The readings, measurements and answers that it accepts, by entry id: nothing else, and nothing worse. */
  accepts: z.array(recordId).max(500),
  extent: requiredText(500),
  conditions: z.array(condition).max(20),
  licence: requiredText(60),
});

const signature = z.object({
  as: z.enum(['inspector', 'superintendent']),
  elementIds: z.array(planKey).max(60).nullable(),
  words: requiredText(2000),
  /** The drawn signature: strokes as x,y pairs within 0..1000 x 0..400. */
  strokes: z.array(z.array(z.number().int().min(0).max(1000)).max(2000)).max(60),
  sheetDigest: digest,
});

export const siteEventKinds = [
  'rain',
  'washed-soil',
  'ice',
  'bar-changed',
  'form-changed',
  'embed-changed',
  'traffic',
  'ticket-differs',
  'no-light',
  'other',
] as const;

const siteEvent = z.object({
  kind: z.enum(siteEventKinds),
  at: instant,
  /** Depth of rain; null when unknown, which counts as over the limit. */
  amountMm: z.number().nonnegative().max(1000).nullable(),
  text: optionalText(500),
  elementIds: z.array(planKey).max(60).nullable(),
});

/** Which parts a release (or a request for one) covers; null: the whole pour. */
export const releaseScope = z.object({
  elementIds: z.array(planKey).min(1).max(60).nullable(),
  limits: optionalText(300),
});
export type ReleaseScope = z.infer<typeof releaseScope>;

/** Bodies that people on site may record; a device may queue each of them. */
export const siteBodies = {
  answer,
  reading,
  measurement,
  photo,
  note: z.object({ about: subjectRef, text: requiredText() }),
  query: z.object({ entryId: recordId, text: requiredText(1000) }),
  'query-answered': z.object({ queryId: recordId, text: requiredText(1000) }),
  nonconformance,
  correction: z.object({ about: z.array(subjectRef).min(1).max(100), text: requiredText(1000), where }),
  recheck: z.object({ about: subjectRef, outcome: z.enum(['met', 'not-met']), text: optionalText(1000) }),
  'last-walk': z.object({
    outcome: z.enum(['met', 'not-met']),
    places: requiredText(1000),
    elementIds: z.array(planKey).max(60).nullable(),
  }),
  'site-event': siteEvent,
  'verbal-instruction': z.object({
    from: requiredText(120),
    text: requiredText(1000),
    signedBy: optionalText(120).nullable(),
  }),
  'condition-verified': z.object({
    conditionId: recordId,
    outcome: z.enum(['met', 'not-met']),
    text: optionalText(1000),
  }),
  amendment: z.object({
    rootId: recordId,
    /** The last amendment of the root that the author had seen, or null. */
    sawAmendmentId: recordId.nullable(),
    reason: requiredText(500),
    /** The corrected body, of the root's own type; null withdraws the entry. */
    replacement: z.record(z.string(), z.json()).nullable(),
    photoId: recordId.nullable(),
  }),
  hold: z.object({
    title: requiredText(160),
    where,
    clearedBy: role,
    need: requiredText(300),
    onBehalfOf: optionalText(120),
  }),
  'hold-lifted': z.object({ holdId: recordId, reason: requiredText(500) }),
  'inspection-asked': z.object({ readyAt: instant, place: requiredText(200), text: optionalText(500) }),
  placement: z.object({
    event: z.enum(['started', 'finished']),
    at: instant,
    elementIds: z.array(planKey).max(60).nullable(),
  }),
  signature,
} as const;

/** Bodies recorded online, in the office. */
export const officeBodies = {
  disposition,
  'release-asked': z.object({ scope: releaseScope, text: optionalText(500) }),
} as const;

/** Bodies of the project's own stream: every pour's fold merges them. */
export const projectBodies = {
  'block-check': z.object({
    instrumentId: recordId,
    at: instant,
    when: z.enum(['start', 'middle', 'end']),
    blockMm: positiveMillimetres,
    readMm: millimetres,
    toleranceMm: z.number().positive().max(20),
  }),
  'instrument-status': z.object({
    instrumentId: recordId,
    name: requiredText(60),
    kind: z.enum(['tape', 'depth-gauge', 'cover-meter', 'calliper', 'block']),
    serial: optionalText(60),
    calibrationDue: instant.nullable(),
    uncertaintyMm: z.number().nonnegative().max(50).nullable(),
    inService: z.boolean(),
  }),
  'drawing-received': z.object({ number: requiredText(40), revision: requiredText(20), at: instant }),
  'mix-changed': z.object({
    pourId: recordId.nullable(),
    name: requiredText(80),
    /** The mix that it takes the place of; empty where it is meant for every pour. */
    replaces: optionalText(80).default(''),
    text: optionalText(300),
  }),
  'rules-changed': z.object({ text: requiredText(500) }),
} as const;

/** Bodies that only the server writes; a push that carries one is refused. */
export const serverBodies = {
  'plan-issued': z.object({ revision: z.number().int().positive(), digest, reason: requiredText(300) }),
  'photo-stored': z.object({
    photoId: recordId,
    key: z.string().max(200),
    sha256: digest,
    bytes: z.number().int().positive(),
    contentType: z.string().max(60),
    widthPx: z.number().int().positive(),
    heightPx: z.number().int().positive(),
  }),
  'photo-refused': z.object({ photoId: recordId, problem: requiredText(300) }),
  'signature-confirmed': z.object({ signatureId: recordId }),
  release: z.object({
    number: z.number().int().positive(),
    scope: releaseScope,
    sheetDigest: digest,
    planRevision: z.number().int().positive(),
    drawings: z.array(z.string()),
    mix: z.string().nullable(),
    signatureIds: z.array(recordId).min(2),
    dispositionIds: z.array(recordId),
    readings: z.number().int().nonnegative(),
    /** Lines that the release carries: conditions due during placing. */
    conditions: z.array(z.string()),
    validUntil: instant,
    headSeq: z.number().int().nonnegative(),
    headHash: digest.nullable(),
  }),
  'release-refused': z.object({ scope: releaseScope, holds: z.array(z.string()), reason: optionalText(500) }),
  'release-void': z.object({
    releaseId: recordId,
    cause: z.string().max(60),
    reason: requiredText(500),
    at: instant,
    causedBy: recordId.nullable(),
  }),
  'placing-without-release': z.object({ at: instant, placementId: recordId }),
  'member-changed': z.object({ personId: recordId, role: role.nullable() }),
} as const;

export const bodies = { ...siteBodies, ...officeBodies, ...projectBodies, ...serverBodies } as const;
