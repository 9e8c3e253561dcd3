import { isSameBar } from '@/lib/concrete/bars';
import { judgeEffectiveDepth } from '@/lib/concrete/effective-depth';
import { judgeReading, type JudgedReading } from '@/lib/concrete/judge-reading';
import { acceptedAsSeen } from './acceptances';
import { amended } from './amendments';
import { headsOf, saw, type Placed } from './causality';
import type { CorrectionsByKey } from './corrections';
import type { EntryOf } from './entry';
import { subjectKey, type Facts } from './facts';
import { standingAt } from './instruments';
import { waitsForMeasurer } from './measurers';
import type { Element, Face, Plan, ReadingPoint, Requirement } from './plan';
import type { DepthState, InstrumentState, MarkKind, PointState, ReadingState } from './sheet-types';

type ReadingEntry = EntryOf<'reading'>;
type ReadingBody = ReadingEntry['body'];

/** What every point of a pour is judged with. */
export interface JudgingContext {
  plan: Plan;
  facts: Facts;
  instruments: Map<string, InstrumentState>;
  corrections: CorrectionsByKey;
  accepted: Map<string, EntryOf<'disposition'>>;
}

export interface PointPlace {
  element: Element;
  face: Face;
  point: ReadingPoint | null;
  key: string;
  label: string;
  xMm: number;
  yMm: number;
}

function judgeBody(
  context: JudgingContext,
  place: PointPlace,
  entry: ReadingEntry,
  body: ReadingBody,
  confirmed = !waitsForMeasurer(body),
): JudgedReading {
  const planned = place.face.requirements.find((candidate) => candidate.id === body.requirementId) ?? null;
  const requirement = planned && limitsFor(planned, body.asFoundBar);
  const instrument = body.instrumentId === null ? undefined : context.instruments.get(body.instrumentId);
  return judgeReading(
    {
      mm: body.value?.mm ?? null,
      ...(body.goNoGo ? { goNoGo: body.goNoGo } : {}),
      sectionMm: place.element.thicknessMm,
      confirmed,
    },
    requirement,
    {
      uncertaintyMm: instrument?.status?.body.uncertaintyMm ?? null,
      status: standingAt(instrument, body.measuredAt, entry.clockOffsetMs),
    },
    context.plan.decisionRule,
    context.plan.units,
  );
}

/** Is this another bar than the plan asks for? A larger bar is a departure too. */
export const isOtherBar = (requirement: Requirement, asFoundBar: string | null): boolean =>
  asFoundBar !== null && asFoundBar !== '' && !isSameBar(asFoundBar, requirement.barDesignation);

/** A bar that was not planned is judged by the stricter of the two: the plan keeps which sizes ask for more. */
export function limitsFor(
  requirement: Requirement,
  asFoundBar: string | null,
): Pick<Requirement, 'leastAcceptedMm' | 'mostAcceptedMm'> {
  if (asFoundBar === null || !isOtherBar(requirement, asFoundBar)) return requirement;
  return requirement.asFound?.find((one) => isSameBar(one.barDesignation, asFoundBar)) ?? requirement;
}

/** Effective depth from a reading to the main bar; null where the requirement has none, or nothing can be told. */
function depthOf(
  place: PointPlace,
  requirement: Requirement | null,
  { body, judged: reading }: { body: ReadingBody; judged: JudgedReading },
  units: Plan['units'],
): DepthState | null {
  const mm = body.value?.mm ?? null;
  if (!requirement?.depth || mm === null || reading.verdict === 'not-verified') return null;
  const judged = judgeEffectiveDepth(
    {
      section: { sectionMm: place.element.thicknessMm, barDiameterMm: requirement.barDiameterMm },
      plannedMm: requirement.depth.plannedMm,
      readingMm: mm,
      touched: 'main',
      tolerance: requirement.depth,
    },
    units,
  );
  return { mm: judged.depthMm, verdict: judged.verdict, reason: judged.reason };
}

/** Lower is less favourable; "not verified" counts neither way and never stands in for a verdict. */
export function favour(judged: JudgedReading): number {
  if (judged.verdict === 'not-met') return -1e9 + (judged.marginMm ?? 0);
  if (judged.verdict === 'met') return judged.marginMm ?? 0;
  return 1e9;
}

function correctionsOf(
  context: JudgingContext,
  place: PointPlace,
  readings: ReadingState[],
): EntryOf<'correction'>[] {
  const own = context.corrections.of(subjectKey({ kind: 'point', id: place.key })).map(({ entry }) => entry);
  const ofFace = context.corrections
    .of(subjectKey({ kind: 'face', id: place.face.id }))
    .map(({ entry }) => entry)
    .filter(
      (entry) =>
        !own.includes(entry) &&
        // A correction of a face puts right what its author could see failing there, and nothing else.
        readings.some((reading) => reading.judged.verdict === 'not-met' && saw(entry, reading.entry)),
    );
  return [...own, ...ofFace];
}

/** One reading with what has been said of it since; its round follows from the corrections of its place. */
function judgeRecorded(
  context: JudgingContext,
  place: PointPlace,
  entry: ReadingEntry,
): { state: ReadingState; conflict: boolean } {
  const result = amended(context.facts, entry, (before, after) => {
    const was = judgeBody(context, place, entry, before).verdict;
    return was === 'not-met' && judgeBody(context, place, entry, after).verdict !== 'not-met';
  });
  const counts = leastFavourable(context, place, entry, result.rivals);
  const shown = counts?.body ?? entry.body;
  const requirement = place.face.requirements.find((one) => one.id === shown.requirementId) ?? null;
  const state: ReadingState = {
    entry,
    current: counts?.body ?? null,
    amendments: result.amendments,
    requirement,
    depth: counts && depthOf(place, requirement, counts, context.plan.units),
    judged: counts?.judged ?? judgeBody(context, place, entry, entry.body),
    onceConfirmed:
      counts && waitsForMeasurer(counts.body) ? judgeBody(context, place, entry, counts.body, true) : null,
    round: 1,
    acceptedBy: acceptedAsSeen(context.facts, entry, context.accepted),
    pending: entry.seq === null,
  };
  return { state, conflict: result.conflict };
}

/** The least favourable of the bodies that may count, judged; null where the reading was withdrawn. */
function leastFavourable(
  context: JudgingContext,
  place: PointPlace,
  entry: ReadingEntry,
  rivals: readonly (ReadingBody | null)[],
): { body: ReadingBody; judged: JudgedReading } | null {
  let least: { body: ReadingBody; judged: JudgedReading } | null = null;
  for (const body of rivals) {
    if (body === null) continue;
    const judged = judgeBody(context, place, entry, body);
    if (least === null || favour(judged) < favour(least.judged)) least = { body, judged };
  }
  return least;
}

/**
 * Judges one place: every reading by the requirement of the steel it touched, rounds by the corrections it had seen,
 * and per requirement the least favourable reading of the latest round that was verified.
 */
export function judgePoint(context: JudgingContext, place: PointPlace): PointState {
  let amendmentConflict = false;
  const events: Placed[] = [];
  const readings: ReadingState[] = [];
  for (const entry of context.facts.readingsByPoint.get(place.key) ?? []) {
    if (entry.body.phase !== 'before') continue;
    const { state, conflict } = judgeRecorded(context, place, entry);
    amendmentConflict ||= conflict;
    readings.push(state);
    events.push(entry, ...state.amendments.map((amendment) => amendment.entry));
  }

  const corrections = correctionsOf(context, place, readings);
  for (const reading of corrections.length > 0 ? readings : []) {
    if (reading.entry.authorRole !== 'inspector') continue;
    reading.round = 1 + corrections.filter((correction) => saw(reading.entry, correction)).length;
  }
  const standing = readings.filter((reading) => reading.current !== null);
  const governing = governingOf(standing);
  const recheckDone = (correction: EntryOf<'correction'>) =>
    standing.some((reading) => reading.judged.verdict !== 'not-verified' && saw(reading.entry, correction));
  return {
    elementId: place.element.id,
    faceId: place.face.id,
    point: place.point,
    key: place.key,
    label: place.label,
    xMm: place.xMm,
    yMm: place.yMm,
    readings,
    governing,
    mark: markOf(governing, standing),
    roundAsked: 1 + corrections.length,
    recheck: corrections.every(recheckDone) ? null : 'failed',
    conflict: amendmentConflict || (events.length > 1 && headsOf(events).length > 1),
  };
}

/** The less favourable of two readings; equal ones by id, so that order of arrival decides nothing. */
function lessFavourable(one: ReadingState, other: ReadingState): ReadingState {
  const difference = favour(one.judged) - favour(other.judged);
  if (difference !== 0) return difference < 0 ? one : other;
  return one.entry.id < other.entry.id ? one : other;
}

function governingOf(standing: ReadingState[]): ReadingState[] {
  const byRequirement = new Map<string, ReadingState[]>();
  for (const reading of standing) {
    if (reading.judged.verdict === 'not-verified') continue;
    const key = reading.requirement?.id ?? '';
    const group = byRequirement.get(key);
    if (group) group.push(reading);
    else byRequirement.set(key, [reading]);
  }
  return [...byRequirement.values()].map((group) => {
    const latest = Math.max(...group.map((reading) => reading.round));
    return group.filter((reading) => reading.round === latest).reduce(lessFavourable);
  });
}

/** The mark of the drawing grammar for one reading. */
export function markOfReading(judged: JudgedReading): MarkKind {
  if (judged.verdict === 'not-verified') return 'not-verified';
  if (judged.verdict === 'not-met') return judged.side === 'high' ? 'not-met-high' : 'not-met-low';
  return judged.flags.length > 0 ? 'met-flagged' : 'met';
}

function markOf(governing: ReadingState[], standing: ReadingState[]): MarkKind {
  const worst = governing.length > 0 ? governing.reduce(lessFavourable) : null;
  if (worst) return markOfReading(worst.judged);
  return standing.length > 0 ? 'not-verified' : 'unread';
}
