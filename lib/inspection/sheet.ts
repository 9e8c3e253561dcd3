import { acceptances, dispositionsInForce } from './acceptances';
import { amended } from './amendments';
import { saw } from './causality';
import { correctedSubjects, correctionsByKey } from './corrections';
import type { EntryOf } from './entry';
import { addFact, inOrder, listOf, noFacts, type Facts, type RecordedEntry } from './facts';
import { instrumentStates } from './instruments';
import { judgeChecks } from './judge-checks';
import { judgeFaces, newPointMemo, type PointMemo } from './judge-faces';
import { judgeMeasurements } from './judge-measurements';
import { judgeNonconformances, withdrawnNonconformances } from './judge-nonconformances';
import type { JudgingContext } from './judge-point';
import { isMaterial, judgeSignatures } from './judge-signatures';
import { unansweredMixChange } from './mix-change';
import type { Plan } from './plan';
import type { Sheet } from './sheet-types';

export type { RecordedEntry } from './facts';

/** Raised whenever the same plan and entries would fold into another sheet: cached sheets of another version are thrown away. */
export const FOLD_VERSION = 3;

/** What one fold leaves for the next of the same pour: facts already collected and places already judged. */
export interface FoldMemo {
  facts: Facts;
  points: PointMemo;
  /** The last judgement of all checks and of all measurements, with the version of what they rest on. */
  checks: Judged<Sheet['checks']> | null;
  measurements: Judged<Sheet['measurements']> | null;
}
interface Judged<T> {
  version: string;
  states: T;
}
const nothingJudged = () => ({ points: newPointMemo(), checks: null, measurements: null });
export const newFoldMemo = (): FoldMemo => ({ facts: noFacts(), ...nothingJudged() });

/** Facts of the memo when the given entries only add to them at the end; otherwise collected afresh. */
function collect(recorded: readonly RecordedEntry[], memo: FoldMemo): Facts {
  const ordered = inOrder(recorded);
  const known = memo.facts.recorded;
  if (!beginsWith(ordered, known)) {
    memo.facts = noFacts();
    Object.assign(memo, nothingJudged());
  }
  for (let index = memo.facts.recorded.length; index < ordered.length; index += 1) {
    const entry = ordered[index];
    if (entry) addFact(memo.facts, entry);
  }
  return memo.facts;
}

function beginsWith(ordered: readonly RecordedEntry[], known: readonly RecordedEntry[]): boolean {
  if (known.length > ordered.length) return false;
  for (let index = 0; index < known.length; index += 1) if (known[index] !== ordered[index]) return false;
  return true;
}

/** The highest seq: the record is in its own order, with what still waits on a device last. */
function headOf(recorded: readonly RecordedEntry[]): number {
  return recorded.findLast((entry) => entry.seq !== undefined)?.seq ?? 0;
}

/**
 * The state of a pour's inspection: the plan with all entries applied.
 * @param recorded the pour's own stream and the project's, in any order; entries without `seq` still wait on the device
 * @param memo kept by the caller between folds of one pour: only what changed is judged again
 */
export function foldSheet(
  plan: Plan,
  recorded: readonly RecordedEntry[],
  memo: FoldMemo = newFoldMemo(),
): Sheet {
  const facts = collect(recorded, memo);

  const withdrawn = withdrawnNonconformances(facts);
  const inForce = dispositionsInForce(facts, (id) => withdrawn.has(id));
  const instruments = instrumentStates(facts);
  const corrections = correctedSubjects(facts);
  const context: JudgingContext = {
    plan,
    facts,
    instruments,
    corrections: correctionsByKey(corrections),
    accepted: acceptances(inForce),
  };

  const faces = judgeFaces(context, memo.points);
  memo.checks = judgedBy(memo.checks, versionOf(context, 'answer'), () => judgeChecks(context));
  memo.measurements = judgedBy(memo.measurements, versionOf(context, 'measurement'), () =>
    judgeMeasurements(context),
  );
  const [checks, measurements] = [memo.checks.states, memo.measurements.states];
  const nonconformances = judgeNonconformances(facts, corrections, withdrawn, inForce);
  return {
    pourId: plan.pourId,
    plan,
    headSeq: headOf(facts.recorded),
    entries: [...facts.entries],
    unknown: [...facts.unknown],
    faces,
    checks,
    measurements,
    nonconformances,
    conditions: nonconformances.filter((state) => !state.withdrawn).flatMap((state) => state.conditions),
    signatures: judgeSignatures(facts, plan),
    photos: photoStates(facts),
    instruments: [...instruments.values()],
    queries: listOf(facts, 'query')
      .filter((entry) => amended(facts, entry).current !== null)
      .map((entry) => ({
        entry,
        answer: listOf(facts, 'query-answered').find((one) => one.body.queryId === entry.id) ?? null,
      })),
    manualHolds: listOf(facts, 'hold').map((entry) => ({
      entry,
      lifted: listOf(facts, 'hold-lifted').find((one) => one.body.holdId === entry.id) ?? null,
    })),
    verbalInstructions: listOf(facts, 'verbal-instruction').map((entry) => ({
      entry,
      confirmed: listOf(facts, 'hold-lifted').find((one) => one.body.holdId === entry.id) ?? null,
    })),
    corrections: corrections.map(({ entry }) => entry),
    lastWalk: standingLastWalk(facts, plan),
    siteEvents: listOf(facts, 'site-event'),
    conflicts: conflictsOf(faces, checks, measurements),
    supersededDrawings: supersededDrawings(facts, plan),
    mixChange: unansweredMixChange(facts, plan),
    releases: listOf(facts, 'release').map((entry) => ({
      entry,
      voided: listOf(facts, 'release-void').find((one) => one.body.releaseId === entry.id) ?? null,
    })),
    refusals: listOf(facts, 'release-refused'),
    inspectionAsked: listOf(facts, 'inspection-asked').at(-1) ?? null,
    placing: {
      started: listOf(facts, 'placement').find((entry) => entry.body.event === 'started') ?? null,
      finished: listOf(facts, 'placement').findLast((entry) => entry.body.event === 'finished') ?? null,
      withoutRelease: listOf(facts, 'placing-without-release').length > 0,
    },
  };
}

/** What the judgement of all checks, or of all measurements, rests on. */
function versionOf({ plan, facts }: JudgingContext, type: 'answer' | 'measurement'): string {
  const rests = [type, 'correction', 'disposition', 'nonconformance', 'photo'] as const;
  return [plan.revision, ...rests.map((of) => facts.versions.get(of) ?? 0)].join('.');
}

function judgedBy<T>(known: Judged<T> | null, version: string, judge: () => T): Judged<T> {
  return known?.version === version ? known : { version, states: judge() };
}

function photoStates(facts: Facts): Sheet['photos'] {
  const stored = new Map(listOf(facts, 'photo-stored').map((entry) => [entry.body.photoId, entry]));
  const refused = new Map(listOf(facts, 'photo-refused').map((entry) => [entry.body.photoId, entry]));
  return listOf(facts, 'photo').map((entry) => ({
    entry,
    stored: stored.get(entry.body.photoId) ?? null,
    refused: refused.get(entry.body.photoId) ?? null,
  }));
}

/** The last walk that still stands: nothing was reworked, moved or voided that its walker had not seen. */
function standingLastWalk(facts: Facts, plan: Plan): EntryOf<'last-walk'> | null {
  const walk = listOf(facts, 'last-walk').findLast((entry) => amended(facts, entry).current !== null);
  if (!walk || walk.body.outcome !== 'met') return null;
  const unsettling = [
    ...listOf(facts, 'correction'),
    ...listOf(facts, 'site-event').filter((event) => isMaterial(event, plan)),
    ...listOf(facts, 'release-void'),
  ];
  return unsettling.every((entry) => saw(walk, entry)) ? walk : null;
}

function conflictsOf(
  faces: Sheet['faces'],
  checks: Sheet['checks'],
  measurements: Sheet['measurements'],
): Sheet['conflicts'] {
  return [
    ...faces
      .flatMap((face) => [...face.points, ...face.spots])
      .filter((point) => point.conflict)
      .map((point) => ({
        about: { kind: 'point' as const, id: point.key },
        label: point.label,
        entries: point.readings.map((one) => one.entry),
      })),
    ...checks
      .filter((check) => check.conflict)
      .map((check) => ({
        about: { kind: 'check' as const, id: check.item.id },
        label: check.item.question,
        entries: check.answers,
      })),
    ...measurements
      .filter((state) => state.conflict)
      .map((state) => ({
        about: { kind: 'measurement' as const, id: state.item.id },
        label: state.item.title,
        entries: state.places.map((one) => one.entry),
      })),
  ];
}

function supersededDrawings(facts: Facts, plan: Plan): Sheet['supersededDrawings'] {
  const latest = new Map(listOf(facts, 'drawing-received').map((entry) => [entry.body.number, entry]));
  return plan.elements.flatMap((element) => {
    const received = latest.get(element.drawing.number);
    if (!received || received.body.revision === element.drawing.revision) return [];
    return [
      { elementId: element.id, number: element.drawing.number, planned: element.drawing.revision, received },
    ];
  });
}
