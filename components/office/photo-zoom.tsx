'use client';

import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { PhotoImage } from './photo-image';

export interface PhotoView {
  photoId: string;
  /** What it shows, in words: its text alternative and caption. */
  caption: string;
  /** Who took it and when. */
  taken: string;
  /** Null: stored and checked. Otherwise why it does not count yet. */
  problem: string | null;
}

const steps = [1, 1.5, 2, 3, 4] as const;

/** Photos beside each other; each opens to be looked at closely. `onOpened` tells that one has been. */
export function PhotoStrip({
  photos,
  large = false,
  onOpened,
}: {
  photos: readonly PhotoView[];
  large?: boolean;
  onOpened?: (photoId: string) => void;
}) {
  const [openAt, setOpenAt] = useState<number | null>(null);
  const [zoom, setZoom] = useState(0);
  const current = openAt === null ? undefined : photos[openAt];
  const open = (index: number) => {
    setZoom(0);
    setOpenAt(index);
    const photo = photos[index];
    if (photo) onOpened?.(photo.photoId);
  };
  if (photos.length === 0) return <p className="text-pencil">No photos.</p>;
  return (
    <>
      <ul className={`grid gap-3 ${large ? 'sm:grid-cols-2' : 'grid-cols-2 sm:grid-cols-3 lg:grid-cols-5'}`}>
        {photos.map((photo, index) => (
          <li key={photo.photoId} className="grid content-start gap-1">
            {photo.problem === null ? (
              <button
                type="button"
                onClick={() => open(index)}
                aria-label={`Look at closely: ${photo.caption}`}
                className="grid aspect-4/3 place-items-center overflow-hidden border border-ink bg-paper"
              >
                <PhotoImage photoId={photo.photoId} alt={photo.caption} className="size-full object-cover" />
              </button>
            ) : (
              <p className="grid aspect-4/3 place-items-center border border-dashed border-pencil p-3 text-center text-label text-pencil">
                {photo.problem}
              </p>
            )}
            <p className="text-label">{photo.caption}</p>
            <p className="text-label text-pencil">{photo.taken}</p>
          </li>
        ))}
      </ul>
      <Dialog
        open={current !== undefined}
        wide
        title={current?.caption ?? 'Photo'}
        onClose={() => setOpenAt(null)}
        closeOutside
        footer={
          <>
            <span className="mr-auto self-center text-label text-pencil">{current?.taken}</span>
            <Button onClick={() => setZoom(Math.max(0, zoom - 1))} disabled={zoom === 0}>
              Smaller
            </Button>
            <Button
              onClick={() => setZoom(Math.min(steps.length - 1, zoom + 1))}
              disabled={zoom === steps.length - 1}
            >
              Larger
            </Button>
            {photos.length > 1 && openAt !== null && (
              <>
                <Button onClick={() => open((openAt + photos.length - 1) % photos.length)}>Previous</Button>
                <Button onClick={() => open((openAt + 1) % photos.length)}>Next</Button>
              </>
            )}
          </>
        }
      >
        {current && (
          <div
            role="region"
            aria-label="Photo, scrolls where it is enlarged"
            tabIndex={0}
            className="max-h-[65dvh] overflow-auto bg-paper"
          >
            <div style={{ width: `${(steps[zoom] ?? 1) * 100}%` }}>
              <PhotoImage photoId={current.photoId} alt={current.caption} className="w-full" />
            </div>
          </div>
        )}
      </Dialog>
    </>
  );
}
