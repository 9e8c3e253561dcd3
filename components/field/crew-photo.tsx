'use client';

import { useId, useState } from 'react';
import { Notice } from '@/components/ui/notice';
import { Spinner } from '@/components/ui/spinner';
import type { OpenPour } from '@/lib/device/device-types';
import type { SubjectRef } from '@/lib/inspection/entry-bodies';
import { PhotoSource } from './photo-source';
import { problemsOf } from './problems-of';
import { fixListWords, type FixLanguage } from './fix-list-words';
import { useDevice } from './use-device';

/** A photo of what was put right, by crew: from the camera or from files, kept at once and sent later. */
export function CrewPhoto({
  open,
  about,
  language,
}: {
  open: OpenPour;
  about: SubjectRef;
  language: FixLanguage;
}) {
  const device = useDevice();
  const id = useId();
  const [busy, setBusy] = useState(false);
  const [kept, setKept] = useState(0);
  const [problem, setProblem] = useState<string | null>(null);
  const words = fixListWords[language];

  const take = async (files: readonly File[]) => {
    setBusy(true);
    setProblem(null);
    try {
      for (const file of files) {
        const at = { projectId: open.project.id, pourId: open.pour.id };
        await device.addPhoto(at, file, { about, shot: 'after', caption: '' });
        setKept((count) => count + 1);
      }
    } catch (error) {
      setProblem(Object.values(problemsOf(error))[0] ?? 'That was not kept. Try again.');
    } finally {
      setBusy(false);
    }
  };
  return (
    <section aria-labelledby={`${id}-heading`} className="grid gap-3 border border-ink bg-sheet p-3">
      <h2 id={`${id}-heading`} className="font-label font-semibold">
        {words.photoOfIt}
      </h2>
      <PhotoSource camera={words.photoTake} files={words.photoFromFiles} busy={busy} onTake={take} />
      {busy && <Spinner label={words.photoBusy} />}
      {kept > 0 && !busy && (
        <Notice tone="met" title={words.photoKept}>
          {kept > 1 && <p>{kept}</p>}
        </Notice>
      )}
      {problem && (
        <Notice tone="hold">
          <p>{problem}</p>
        </Notice>
      )}
    </section>
  );
}
