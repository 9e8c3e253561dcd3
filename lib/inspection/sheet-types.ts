import type { JudgedReading, Verdict } from '@/lib/concrete/judge-reading';
import type { Condition, SubjectRef } from './entry-bodies';
import type { Entry, EntryOf, UnknownEntry } from './entry';
import type { CheckItem, MeasurementItem, Plan, ReadingPoint, Requirement } from './plan';
import type { Role } from './roles';

/** One amendment of an entry, newest last; the value it replaced stays in `before`. */
export interface AppliedAmendment {
  entry: EntryOf<'amendment'>;
  /** False where it is not allowed to count: not the measurer's, or it lacks the photo that a change to "met" needs. */
  counts: boolean;
  problem: string | null;
}

export interface DepthState {
  mm: number | null;
  verdict: Verdict;
  reason: string;
}

/** A reading with everything that has been said of it since. */
export interface ReadingState {
  entry: EntryOf<'reading'>;
  /** The body after amendments; null once withdrawn. */
  current: EntryOf<'reading'>['body'] | null;
  amendments: AppliedAmendment[];
  requirement: Requirement | null;
  judged: JudgedReading;
  /** What it will be judged once the person named as its measurer confirms it; null where it does not wait for that. */
  onceConfirmed: JudgedReading | null;
  /** Effective depth, judged apart from cover, where the steel touched is the main bar; null otherwise. */
  depth: DepthState | null;
  /** 1 is the first round; each correction of its point that it had seen opens the next. */
  round: number;
  /** A signed disposition that names this reading. */
  acceptedBy: EntryOf<'disposition'> | null;
  pending: boolean;
}

/** The marks of the drawing grammar: shape and word first, colour second. */
export type MarkKind = 'met' | 'met-flagged' | 'not-met-low' | 'not-met-high' | 'not-verified' | 'unread';

export interface PointState {
  elementId: string;
  faceId: string;
  /** The plan's point, or null where spot readings were taken. */
  point: ReadingPoint | null;
  key: string;
  label: string;
  xMm: number;
  yMm: number;
  readings: ReadingState[];
  /** The least favourable unamended reading of the latest round read; per requirement where several steels are read. */
  governing: ReadingState[];
  mark: MarkKind;
  /** The round that is asked for now. */
  roundAsked: number;
  /** Why it has to be read again, when it has. */
  recheck: 'failed' | 'neighbour' | null;
  conflict: boolean;
}

export interface FaceState {
  elementId: string;
  faceId: string;
  points: PointState[];
  spots: PointState[];
  drawnRead: number;
  drawnTotal: number;
  chosenRead: number;
  chosenTotal: number;
}

export interface CheckState {
  item: CheckItem;
  answers: EntryOf<'answer'>[];
  governing: EntryOf<'answer'> | null;
  conflict: boolean;
  photoIds: string[];
  correctedSince: EntryOf<'correction'> | null;
  acceptedBy: EntryOf<'disposition'> | null;
}

export interface MeasurementState {
  item: MeasurementItem;
  places: {
    entry: EntryOf<'measurement'>;
    current: EntryOf<'measurement'>['body'] | null;
    amendments: AppliedAmendment[];
    verdict: Verdict;
    reason: string;
    /** Distance to the nearer limit, negative beyond it; null where nothing was compared as a number. */
    margin: number | null;
    /** More than rework to the drawings can mend: the engineer decides. */
    engineer: boolean;
    round: number;
    acceptedBy: EntryOf<'disposition'> | null;
  }[];
  /** Those that count now: the latest round of each place, least favourable first. */
  governing: MeasurementState['places'];
  /** Those that count neither way, at places where nothing that counts was measured. */
  unverified: MeasurementState['places'];
  /** The round that is asked for now. */
  roundAsked: number;
  correctedSince: EntryOf<'correction'> | null;
  conflict: boolean;
}

export type NonconformanceStatus =
  'open' | 'decision-asked' | 'corrected' | 'accepted' | 'rejected' | 'closed';

export interface NonconformanceState {
  entry: EntryOf<'nonconformance'>;
  withdrawn: boolean;
  dispositions: EntryOf<'disposition'>[];
  disposition: EntryOf<'disposition'> | null;
  corrections: EntryOf<'correction'>[];
  rechecks: EntryOf<'recheck'>[];
  photoIds: string[];
  conditions: ConditionState[];
  status: NonconformanceStatus;
}

export interface ConditionState {
  condition: Condition;
  disposition: EntryOf<'disposition'>;
  verified: EntryOf<'condition-verified'> | null;
}

export interface SignatureState {
  entry: EntryOf<'signature'>;
  confirmed: EntryOf<'signature-confirmed'> | null;
  /** The material entry recorded after it that set it aside. */
  setAsideBy: Entry | null;
  stands: boolean;
}

export interface PhotoState {
  entry: EntryOf<'photo'>;
  stored: EntryOf<'photo-stored'> | null;
  refused: EntryOf<'photo-refused'> | null;
}

export interface InstrumentState {
  instrumentId: string;
  name: string;
  status: EntryOf<'instrument-status'> | null;
  blockChecks: EntryOf<'block-check'>[];
  /** Measuring-time windows in which its readings are suspect; `to` null is open. */
  suspect: { from: string | null; to: string | null; failed: EntryOf<'block-check'> }[];
}

export interface ReleaseState {
  entry: EntryOf<'release'>;
  voided: EntryOf<'release-void'> | null;
}

/** The state of a pour's inspection: the plan with all entries applied. */
export interface Sheet {
  pourId: string;
  plan: Plan;
  /** Highest seq folded, of the pour's stream and the project's. */
  headSeq: number;
  entries: Entry[];
  unknown: UnknownEntry[];
  faces: FaceState[];
  checks: CheckState[];
  measurements: MeasurementState[];
  nonconformances: NonconformanceState[];
  conditions: ConditionState[];
  signatures: SignatureState[];
  photos: PhotoState[];
  instruments: InstrumentState[];
  queries: { entry: EntryOf<'query'>; answer: EntryOf<'query-answered'> | null }[];
  manualHolds: { entry: EntryOf<'hold'>; lifted: EntryOf<'hold-lifted'> | null }[];
  /** `confirmed`: the engineer has lifted its hold, once it was in writing. */
  verbalInstructions: {
    entry: EntryOf<'verbal-instruction'>;
    confirmed: EntryOf<'hold-lifted'> | null;
  }[];
  corrections: EntryOf<'correction'>[];
  lastWalk: EntryOf<'last-walk'> | null;
  siteEvents: EntryOf<'site-event'>[];
  conflicts: { about: SubjectRef; label: string; entries: Entry[] }[];
  supersededDrawings: {
    elementId: string;
    number: string;
    planned: string;
    received: EntryOf<'drawing-received'>;
  }[];
  /** A change of mix that no revision of the plan has answered. */
  mixChange: EntryOf<'mix-changed'> | null;
  releases: ReleaseState[];
  refusals: EntryOf<'release-refused'>[];
  inspectionAsked: EntryOf<'inspection-asked'> | null;
  placing: {
    started: EntryOf<'placement'> | null;
    finished: EntryOf<'placement'> | null;
    withoutRelease: boolean;
  };
}

export const holdKinds = [
  'plan-incomplete',
  'plan-revised',
  'superseded-drawing',
  'mix-changed',
  'attendance',
  'check-open',
  'check-not-met',
  'cover-not-met',
  'effective-depth',
  'bar-departs',
  'readings-missing',
  'not-verified',
  'measurement-missing',
  'measurement-out',
  'nonconformance-open',
  'disposition-awaited',
  'condition-not-verified',
  'verbal-instruction',
  'recheck-awaited',
  'query-open',
  'photo-missing',
  'conflict',
  'manual',
  'last-walk-missing',
  'signature-missing',
  'update-needed',
] as const;
export type HoldKind = (typeof holdKinds)[number];

/** One thing that stands between the sheet and the concrete. */
export interface Hold {
  /** Stable while it is the same hold: kind, subject and round. */
  id: string;
  kind: HoldKind;
  title: string;
  detail: string;
  /** Null: it has no place, and falls in every scope. */
  elementId: string | null;
  faceId: string | null;
  /** In words, as people on site say it: "Quay deck, soffit, A5 and B3". */
  where: string;
  since: string | null;
  clearedBy: Role;
  /** What clears it. */
  need: string;
  subjects: SubjectRef[];
}

/** Where a pour stands, in one word; derived, never stored without its `validUntil`. */
export type PourState =
  'no-plan' | 'not-read' | 'held' | 'ready' | 'released' | 'placing' | 'placed' | 'placed-without-release';
