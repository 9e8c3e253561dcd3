import type { PhotoState, Sheet } from '@/lib/inspection/sheet-types';
import { personName, subjectWords, type WordContext } from './entry-words';
import { fullTime } from './project-time';
import type { PhotoView } from './photo-zoom';

const shots = { wide: 'from a distance', close: 'from close up', before: 'before', after: 'after' } as const;

const view = (photo: PhotoState, context: WordContext): PhotoView => {
  const { body, authorId } = photo.entry;
  const about = subjectWords(context, body.about);
  return {
    photoId: body.photoId,
    caption: `${body.caption || about}, ${shots[body.shot]}`,
    taken: `${personName(authorId, context.people)}, ${fullTime(body.takenAt, context.timeZone)}`,
    problem: photo.stored
      ? null
      : photo.refused
        ? `Refused: ${photo.refused.body.problem}`
        : 'Not stored yet. It counts once its bytes have arrived and been checked.',
  };
};

/** Photos of a sheet as they are shown; `ids` keeps those of one matter. */
export function photoViews(sheet: Sheet, context: WordContext, ids?: readonly string[]): PhotoView[] {
  return sheet.photos
    .filter((photo) => ids === undefined || ids.includes(photo.entry.body.photoId))
    .map((photo) => view(photo, context));
}
