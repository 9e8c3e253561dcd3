import { FOLD_VERSION } from '@/lib/inspection/sheet';
import { currentRelease, pourState } from '@/lib/inspection/pour-state';
import type { Hold, Sheet } from '@/lib/inspection/sheet-types';
import type { NonconformanceSummary, PourSummary } from '@/db/stores/summary-store';

/**
 * What lists show of a pour.
 * @param now ISO instant
 */
export function summarisePour(sheet: Sheet, holds: readonly Hold[], now: string): PourSummary {
  const points = sheet.faces.flatMap((face) => face.points);
  const governing = sheet.faces
    .flatMap((face) => [...face.points, ...face.spots])
    .flatMap((point) => point.governing);
  const holdsByRole: PourSummary['holdsByRole'] = {};
  for (const hold of holds) holdsByRole[hold.clearedBy] = (holdsByRole[hold.clearedBy] ?? 0) + 1;
  const release = currentRelease(sheet, now);
  return {
    pourId: sheet.pourId,
    state: pourState(sheet, [...holds], now),
    holdsTotal: holds.length,
    holdsByRole,
    notMet: governing.filter((reading) => reading.judged.verdict === 'not-met').length,
    readings: sheet.entries.filter((entry) => entry.type === 'reading').length,
    pointsRead: points.filter((point) => point.readings.length > 0).length,
    pointsTotal: points.length,
    releaseId: release?.entry.id ?? null,
    releaseNumber: release?.entry.body.number ?? null,
    validUntil: release?.entry.body.validUntil ?? null,
    planRevision: sheet.plan.revision,
    headSeq: sheet.headSeq,
    foldVersion: FOLD_VERSION,
  };
}

/** What lists show of a pour's nonconformances; withdrawn ones count as closed. */
export function summariseNonconformances(sheet: Sheet): NonconformanceSummary[] {
  return sheet.nonconformances.map((state) => ({
    id: state.entry.id,
    pourId: sheet.pourId,
    seq: state.entry.seq ?? 0,
    title: state.entry.body.title,
    status: state.withdrawn ? 'closed' : state.status,
    whereText: state.entry.body.where.text,
    extent: state.entry.body.extent,
    proposal: state.entry.body.proposal,
    neededBy: state.entry.body.neededBy,
    raisedBy: state.entry.authorId,
    raisedAt: state.entry.recordedAt,
    photos: state.photoIds.length,
    conditionsOpen: state.conditions.filter((condition) => condition.verified?.body.outcome !== 'met').length,
  }));
}
