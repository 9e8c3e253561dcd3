'use client';

import { EmptyState } from '@/components/ui/empty-state';
import { mayRecord } from '@/lib/inspection/entry-access';
import type { SubjectRef } from '@/lib/inspection/entry-bodies';
import { fieldPaths } from './field-routes';
import type { OpenSheet } from './open-sheet';
import { PhotoForm } from './photo-form';
import { PhotoTile } from './photo-tile';
import { Screen } from './screen';
import { subjectWords } from './subject-words';

/** Photos of a pour, or of one thing in it: take one, see what was taken, and how far each has been sent. */
export function PhotosScreen({ open, about }: { open: OpenSheet; about: SubjectRef | null }) {
  const { sheet, pour } = open;
  const same = (one: SubjectRef) => !about || (one.kind === about.kind && one.id === about.id);
  const photos = sheet.photos.filter((photo) => same(photo.entry.body.about)).toReversed();
  return (
    <Screen
      title={about ? 'Photos here' : `${pour.number} photos`}
      aside={about ? subjectWords(sheet, about) : undefined}
      back={{ href: fieldPaths.pour(sheet.pourId), words: pour.number }}
      form
    >
      <div className="grid gap-6 md:grid-cols-2 md:items-start">
        {mayRecord('photo', open.project.role) && <PhotoForm open={open} about={about} />}
        {photos.length === 0 ? (
          <EmptyState title="No photo yet">
            {about ? 'Nothing has been photographed here.' : 'Photos of this pour stand here, newest first.'}
          </EmptyState>
        ) : (
          <ul className="grid grid-cols-2 gap-3">
            {photos.map((photo) => (
              <PhotoTile key={photo.entry.id} open={open} photo={photo} />
            ))}
          </ul>
        )}
      </div>
    </Screen>
  );
}
