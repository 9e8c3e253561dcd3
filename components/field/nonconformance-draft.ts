import { withUnit } from '@/lib/concrete/length';
import type { SubjectRef } from '@/lib/inspection/entry-bodies';
import { limitsFor } from '@/lib/inspection/judge-point';
import type { Sheet } from '@/lib/inspection/sheet-types';
import { bodyShown, readingText } from '@/lib/inspection/reading-text';
import { pointOf, subjectWords } from './subject-words';

/** What a nonconformance form begins with: filled in from where it was raised. */
export interface NonconformanceDraft {
  about: SubjectRef[];
  title: string;
  extent: string;
}

/** Fills in title, extent and subjects from a point, check or measurement that is not met. */
export function nonconformanceDraft(sheet: Sheet, about: SubjectRef): NonconformanceDraft {
  const words = subjectWords(sheet, about);
  const plain: NonconformanceDraft = { about: [about], title: '', extent: '' };
  switch (about.kind) {
    case 'point': {
      const point = pointOf(sheet, about.id);
      const failed = point?.governing.find((reading) => reading.judged.verdict === 'not-met');
      if (!point || !failed) return { ...plain, title: `Cover at ${words}`.slice(0, 160) };
      const limit = failed.requirement && limitsFor(failed.requirement, bodyShown(failed).asFoundBar);
      const high = failed.judged.side === 'high' && limit?.mostAcceptedMm != null;
      const accepted = limit
        ? `, accepted ${high ? 'to' : 'from'} ${withUnit(high && limit.mostAcceptedMm !== null ? limit.mostAcceptedMm : limit.leastAcceptedMm, sheet.plan.units)}`
        : '';
      return {
        ...plain,
        title: `Cover ${readingText(bodyShown(failed))}${accepted}, ${words}`.slice(0, 160),
        extent: `${point.label}, as far as read`,
      };
    }
    case 'check':
      return { ...plain, title: `Not met: ${words}`.slice(0, 160) };
    case 'measurement': {
      const state = sheet.measurements.find((one) => one.item.id === about.id);
      const failed = state?.governing.filter((place) => place.verdict === 'not-met') ?? [];
      return {
        ...plain,
        title: `${words}: ${failed[0]?.reason ?? 'out of limits'}`.slice(0, 160),
        extent: failed
          .map((place) => place.current?.place ?? '')
          .filter(Boolean)
          .join(', ')
          .slice(0, 500),
      };
    }
    default:
      return plain;
  }
}

/** Points of the same face that fail too and that no nonconformance names yet: often one thing, and one decision. */
export function failingBeside(sheet: Sheet, about: SubjectRef): { key: string; label: string }[] {
  if (about.kind !== 'point') return [];
  const face = sheet.faces.find((one) =>
    [...one.points, ...one.spots].some((point) => point.key === about.id),
  );
  const named = new Set(
    sheet.nonconformances
      .filter((state) => !state.withdrawn)
      .flatMap((state) => state.entry.body.about.map((one) => one.id)),
  );
  return [...(face?.points ?? []), ...(face?.spots ?? [])]
    .filter((point) => point.key !== about.id && point.mark.startsWith('not-met') && !named.has(point.key))
    .map((point) => ({ key: point.key, label: point.label }));
}
