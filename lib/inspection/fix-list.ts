import { withUnit } from '@/lib/concrete/length';
import { correctedTogether, failingOnFace } from './corrected-together';
import type { SubjectRef } from './entry-bodies';
import { subjectKey } from './facts';
import type { FixItem } from './fix-list-item';
import { measuredText } from './measured-words';
import { bodyShown, readingText } from './reading-text';
import type { Hold, PointState, Sheet } from './sheet-types';

type What = FixItem['what'];

/** What has to be put right before the inspector looks again, in the order of the holds. */
export function fixList(sheet: Sheet, holds: readonly Hold[]): FixItem[] {
  return holds.flatMap((hold) => {
    const what = whatOf(sheet, hold);
    const first = hold.subjects[0];
    return what && first ? [itemOf(sheet, hold, what, first)] : [];
  });
}

function whatOf(sheet: Sheet, hold: Hold): What | null {
  const first = hold.subjects[0]?.id ?? '';
  switch (hold.kind) {
    case 'cover-not-met':
      return coverFix(sheet, hold);
    case 'effective-depth':
      return depthFix(sheet, hold);
    case 'measurement-out':
      return measurementFix(sheet, first);
    case 'bar-departs':
      return hold.subjects[0]?.kind === 'measurement' ? measurementFix(sheet, first) : null;
    case 'check-not-met':
      return checkFix(sheet, first);
    case 'nonconformance-open':
      return nonconformanceFix(sheet, first);
    default:
      return null;
  }
}

function itemOf(sheet: Sheet, hold: Hold, what: What, first: SubjectRef): FixItem {
  const ofPoints = what.kind === 'cover' || what.kind === 'depth';
  const several = ofPoints && hold.faceId !== null && hold.subjects.length > 1;
  const about: SubjectRef = several ? { kind: 'face', id: hold.faceId ?? '' } : first;
  const named = new Set(hold.subjects.map((subject) => subject.id));
  const together = ofPoints ? hold.subjects : correctedTogether(sheet, about);
  return {
    id: hold.id,
    about,
    where: hold.where,
    what,
    together,
    choices: several ? failingOnFace(sheet, about.id).filter((one) => named.has(one.key)) : [],
    place: { elementId: hold.elementId, faceId: hold.faceId, text: hold.where.slice(0, 200) },
    face: faceOf(sheet, together),
    photoIds: photosOf(sheet, [about, ...together]),
  };
}

/** The face with the points of it that are spoken of; null where no point is. */
function faceOf(sheet: Sheet, subjects: readonly SubjectRef[]): FixItem['face'] {
  const keys = new Set(subjects.flatMap(({ kind, id }) => (kind === 'point' ? [id] : [])));
  const points = allPoints(sheet).filter((point) => keys.has(point.key));
  const element = sheet.plan.elements.find((one) => one.id === points[0]?.elementId);
  const face = element?.faces.find((one) => one.id === points[0]?.faceId);
  if (!element || !face) return null;
  const { widthMm, heightMm, openings, recesses } = face;
  return {
    name: `${element.mark}, ${face.name}`,
    widthMm,
    heightMm,
    openings,
    recesses,
    points: points
      .filter((point) => point.faceId === face.id)
      .map(({ key, label, xMm, yMm, mark, point }) => ({ key, label, xMm, yMm, mark, spot: point === null })),
  };
}

function photosOf(sheet: Sheet, subjects: readonly SubjectRef[]): string[] {
  const keys = new Set(subjects.map(subjectKey));
  return sheet.photos
    .filter((photo) => photo.stored !== null && keys.has(subjectKey(photo.entry.body.about)))
    .map((photo) => photo.entry.body.photoId);
}

const allPoints = (sheet: Sheet): PointState[] =>
  sheet.faces.flatMap((face) => [...face.points, ...face.spots]);

function pointsOf(sheet: Sheet, hold: Hold): PointState[] {
  const points = new Map(allPoints(sheet).map((point) => [point.key, point]));
  return hold.subjects.flatMap((subject) => points.get(subject.id) ?? []);
}

function coverFix(sheet: Sheet, hold: Hold): What | null {
  const failing = pointsOf(sheet, hold).flatMap((point) => {
    const reading = point.governing.find((one) => one.judged.verdict === 'not-met');
    return reading ? [{ point, reading }] : [];
  });
  const requirement = failing[0]?.reading.requirement;
  if (!requirement) return null;
  const high = failing[0]?.reading.judged.side === 'high';
  const limit =
    high && requirement.mostAcceptedMm !== null ? requirement.mostAcceptedMm : requirement.leastAcceptedMm;
  return {
    kind: 'cover',
    high,
    accepted: withUnit(limit, sheet.plan.units),
    values: failing.map(({ point, reading }) => ({
      label: point.label,
      value: readingText(bodyShown(reading)),
    })),
  };
}

function depthFix(sheet: Sheet, hold: Hold): What | null {
  const low = pointsOf(sheet, hold).flatMap((point) => {
    const reading = point.readings.find((one) => one.current && one.depth?.verdict === 'not-met');
    return reading?.depth ? [{ point, reading, depth: reading.depth }] : [];
  });
  const planned = low[0]?.reading.requirement?.depth?.plannedMm;
  if (planned === undefined) return null;
  return {
    kind: 'depth',
    planned: withUnit(planned, sheet.plan.units),
    values: low.map(({ point, depth }) => ({
      label: point.label,
      value: depth.mm === null ? '' : withUnit(depth.mm, sheet.plan.units, planned),
    })),
  };
}

function measurementFix(sheet: Sheet, itemId: string): What | null {
  const state = sheet.measurements.find((one) => one.item.id === itemId);
  if (!state) return null;
  const { item } = state;
  const shown = (value: number | null): string | null => {
    if (value === null) return null;
    switch (item.quantity) {
      case 'length':
      case 'starter':
      case 'height':
        return withUnit(value, sheet.plan.units);
      case 'share':
      case 'part':
        return `${value} %`;
      default:
        return String(value);
    }
  };
  return {
    kind: 'measurement',
    title: item.title,
    least: item.expected ?? shown(item.least),
    most: shown(item.most),
    values: state.governing
      .filter((place) => place.verdict === 'not-met' && place.acceptedBy === null)
      .map((place) => {
        const body = place.current ?? place.entry.body;
        return [measuredText(body.value), body.place].filter(Boolean).join(', ');
      }),
  };
}

function checkFix(sheet: Sheet, checkId: string): What | null {
  const check = sheet.checks.find((one) => one.item.id === checkId);
  if (!check) return null;
  return { kind: 'check', question: check.item.question, note: check.governing?.body.note ?? '' };
}

function nonconformanceFix(sheet: Sheet, id: string): What | null {
  const state = sheet.nonconformances.find((one) => one.entry.id === id);
  if (!state) return null;
  const { title, extent } = state.entry.body;
  const decision = state.disposition?.body.decision;
  return {
    kind: 'nonconformance',
    title,
    extent: state.disposition?.body.extent ?? extent,
    decision: decision === undefined || decision === 'use-as-is' ? null : decision,
    reason: state.disposition?.body.reason ?? '',
  };
}
