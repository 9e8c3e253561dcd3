'use client';

import { useId, useState } from 'react';
import { Notice } from '@/components/ui/notice';
import { Select } from '@/components/ui/select';
import { Spinner } from '@/components/ui/spinner';
import { TextInput } from '@/components/ui/text-input';
import type { BodyOf } from '@/lib/inspection/entry';
import type { SubjectRef } from '@/lib/inspection/entry-bodies';
import { problemsOf } from './problems-of';
import type { OpenSheet } from './open-sheet';
import { PhotoOverlay } from './photo-overlay';
import { PhotoSource } from './photo-source';
import { subjectChoices, subjectValue, subjectWords } from './subject-words';
import { useDevice } from './use-device';

type Shot = BodyOf<'photo'>['shot'];
export const shotWords: Record<Shot, string> = {
  wide: 'wide: where it is',
  close: 'close: what it is',
  before: 'before it is put right',
  after: 'after it was put right',
};
const shots: Shot[] = ['wide', 'close', 'before', 'after'];

/** Takes a photo from the camera or from files, tagged with where you are; wide first, then close. */
export function PhotoForm({
  open,
  about,
  shots: offered = shots,
  onKept,
}: {
  open: OpenSheet;
  about: SubjectRef | null;
  shots?: readonly Shot[];
  /** The photo that was kept on the device. */
  onKept?: (photoId: string) => void;
}) {
  const device = useDevice();
  const id = useId();
  const first = about ?? { kind: 'pour' as const, id: open.sheet.pourId };
  const [chosen, setChosen] = useState(subjectValue(first));
  const taken = open.sheet.photos.filter((photo) => subjectValue(photo.entry.body.about) === chosen);
  const hasWide = taken.some((photo) => photo.entry.body.shot === 'wide');
  const suggested = offered.includes('wide') ? (hasWide ? 'close' : 'wide') : (offered[0] ?? 'wide');
  const [shotChosen, setShot] = useState<Shot | null>(null);
  const shot = shotChosen ?? suggested;
  const [caption, setCaption] = useState('');
  const [busy, setBusy] = useState(false);
  const [said, setSaid] = useState<{ kept: boolean; words: string } | null>(null);

  const choices = subjectChoices(open.sheet);
  const subject: SubjectRef = choices.find((one) => subjectValue(one.subject) === chosen)?.subject ?? first;
  const before = taken.find((photo) => photo.entry.body.shot === 'before') ?? taken[0];

  const take = async (files: readonly File[]) => {
    setBusy(true);
    setSaid(null);
    try {
      for (const file of files) {
        const entry = await device.addPhoto({ projectId: open.project.id, pourId: open.sheet.pourId }, file, {
          about: subject,
          shot,
          caption: caption.trim(),
        });
        if (entry.type === 'photo') onKept?.(entry.body.photoId);
      }
      setShot(null);
      setCaption('');
      setSaid({
        kept: true,
        words: shot === 'wide' && !hasWide ? 'Kept. Now one from close up.' : 'Kept on this device.',
      });
    } catch (error) {
      setSaid({ kept: false, words: Object.values(problemsOf(error))[0] ?? 'That was not kept. Try again.' });
    } finally {
      setBusy(false);
    }
  };

  return (
    <section aria-label="Take a photo" className="grid gap-3 border border-ink bg-sheet p-3">
      {about ? (
        <p className="font-label font-semibold">Of {subjectWords(open.sheet, about)}</p>
      ) : (
        <Select
          label="What it shows"
          value={chosen}
          onChange={(event) => setChosen(event.target.value)}
          options={choices.map((choice) => ({ value: subjectValue(choice.subject), label: choice.words }))}
        />
      )}
      <fieldset>
        <legend className="font-label text-label font-semibold">Kind of shot</legend>
        <div className="mt-1 grid grid-cols-2 border border-ink">
          {offered.map((one) => (
            <label
              key={one}
              className="relative flex min-h-target items-center justify-center border-r border-b border-rule px-2 text-center font-label leading-tight font-medium has-checked:bg-ink has-checked:text-sheet has-focus-visible:outline-3 has-focus-visible:outline-chalk"
            >
              <input
                type="radio"
                name={`${id}-shot`}
                checked={shot === one}
                onChange={() => setShot(one)}
                className="absolute inset-0 size-full cursor-pointer opacity-0"
              />
              {shotWords[one]}
            </label>
          ))}
        </div>
      </fieldset>
      <TextInput
        label="Caption"
        optional
        maxLength={300}
        value={caption}
        onChange={(event) => setCaption(event.target.value)}
      />
      {shot === 'after' && before && (
        <PhotoOverlay photoId={before.entry.body.photoId} onTake={(file) => void take([file])} />
      )}
      <PhotoSource camera="Take the photo" files="From files" busy={busy} onTake={take} />
      {busy && <Spinner label="Making it smaller and keeping it" />}
      {said && (
        <Notice tone={said.kept ? 'met' : 'hold'} title={said.kept ? said.words : 'This photo was not kept'}>
          {!said.kept && <p>{said.words} Readings and answers are not affected.</p>}
        </Notice>
      )}
    </section>
  );
}
