import { withUnit } from '@/lib/concrete/length';
import type { SubjectRef } from '@/lib/inspection/entry-bodies';
import type { Hold, Sheet } from '@/lib/inspection/sheet-types';
import { measuredText } from '@/lib/inspection/measured-words';
import { pointOf } from './subject-words';
import { bodyShown, readingText } from './verdict-words';

/** One thing that the crew must put right, as facts: the words for it are made in the reader's language. */
export interface FixItem {
  id: string;
  about: SubjectRef;
  where: string;
  what:
    | { kind: 'cover'; values: { label: string; value: string }[]; accepted: string; high: boolean }
    | { kind: 'depth'; values: { label: string; value: string }[]; planned: string }
    | { kind: 'measurement'; title: string; values: string[]; least: string | null; most: string | null }
    | { kind: 'check'; question: string; note: string }
    | {
        kind: 'nonconformance';
        title: string;
        decision: 'rework' | 'repair' | 'reject' | null;
        reason: string;
      };
}

/** What has to be put right before the inspector looks again, in the order of the holds. */
export function fixList(sheet: Sheet, holds: readonly Hold[]): FixItem[] {
  return holds.flatMap((hold): FixItem[] => {
    const first = hold.subjects[0];
    if (!first) return [];
    const item = (what: FixItem['what'] | null, about: SubjectRef = first): FixItem[] =>
      what ? [{ id: hold.id, about, where: hold.where, what }] : [];
    switch (hold.kind) {
      case 'cover-not-met':
        return item(
          coverFix(sheet, hold),
          hold.faceId && hold.subjects.length > 1 ? { kind: 'face', id: hold.faceId } : first,
        );
      case 'effective-depth':
        return item(
          depthFix(sheet, hold),
          hold.faceId && hold.subjects.length > 1 ? { kind: 'face', id: hold.faceId } : first,
        );
      case 'measurement-out':
        return item(measurementFix(sheet, first.id));
      case 'check-not-met': {
        const check = sheet.checks.find((one) => one.item.id === first.id);
        return item(
          check
            ? { kind: 'check', question: check.item.question, note: check.governing?.body.note ?? '' }
            : null,
        );
      }
      case 'nonconformance-open': {
        const state = sheet.nonconformances.find((one) => one.entry.id === first.id);
        const decision = state?.disposition?.body.decision;
        return item(
          state
            ? {
                kind: 'nonconformance',
                title: state.entry.body.title,
                decision: decision === undefined || decision === 'use-as-is' ? null : decision,
                reason: state.disposition?.body.reason ?? state.entry.body.extent,
              }
            : null,
        );
      }
      default:
        return [];
    }
  });
}

function coverFix(sheet: Sheet, hold: Hold): FixItem['what'] | null {
  const failing = hold.subjects.flatMap((subject) => {
    const point = pointOf(sheet, subject.id);
    const reading = point?.governing.find((one) => one.judged.verdict === 'not-met');
    return point && reading ? [{ point, reading }] : [];
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

function depthFix(sheet: Sheet, hold: Hold): FixItem['what'] | null {
  const low = hold.subjects.flatMap((subject) => {
    const point = pointOf(sheet, subject.id);
    const reading = point?.readings.find((one) => one.current && one.depth?.verdict === 'not-met');
    return point && reading?.depth ? [{ point, reading, depth: reading.depth }] : [];
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

function measurementFix(sheet: Sheet, itemId: string): FixItem['what'] | null {
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
