'use client';

import { useId } from 'react';
import { buttonClasses } from '@/components/ui/button-classes';
import { classNames } from '@/components/ui/class-names';

/** Two keys that bring a photo: the camera, one at a time, and files, as many as are chosen. */
export function PhotoSource({
  camera,
  files,
  busy,
  onTake,
}: {
  /** What the key of the camera says. */
  camera: string;
  /** What the key of the files says. */
  files: string;
  busy: boolean;
  onTake: (files: readonly File[]) => Promise<void>;
}) {
  const id = useId();
  const key = (from: 'camera' | 'files', label: string) => (
    <label
      htmlFor={`${id}-${from}`}
      className={classNames(
        buttonClasses(from === 'camera' ? 'primary' : 'secondary', true, 'relative min-h-15 px-2'),
        busy && 'pointer-events-none opacity-60',
        'has-focus-visible:outline-3 has-focus-visible:outline-offset-2 has-focus-visible:outline-chalk',
      )}
    >
      {label}
      <input
        id={`${id}-${from}`}
        type="file"
        accept="image/*"
        {...(from === 'camera' ? { capture: 'environment' as const } : { multiple: true })}
        disabled={busy}
        className="absolute inset-0 size-full cursor-pointer opacity-0"
        onChange={(event) => {
          const { target } = event;
          // Emptied afterwards, so that the same file can be chosen once more.
          void onTake([...(target.files ?? [])]).finally(() => {
            target.value = '';
          });
        }}
      />
    </label>
  );
  return (
    <div className="grid grid-cols-[2fr_1fr] gap-2">
      {key('camera', camera)}
      {key('files', files)}
    </div>
  );
}
