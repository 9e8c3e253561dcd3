'use client';

import { useQuery } from '@tanstack/react-query';
import { Button } from '@/components/ui/button';
import { Spinner } from '@/components/ui/spinner';
import { askJson, textOf } from './post-json';

/** Addresses of photos are short-lived; they are asked for again well before they end. */
const FRESH_MS = 3 * 60_000;

/** A stored photo, by its short-lived address; says so where it cannot be shown. */
export function PhotoImage({
  photoId,
  alt,
  className,
}: {
  photoId: string;
  alt: string;
  className?: string;
}) {
  const { data, isPending, refetch } = useQuery({
    queryKey: ['photo', photoId],
    staleTime: FRESH_MS,
    queryFn: async () => {
      const answer = await askJson('GET', `/api/photos/${photoId}/address`);
      return answer.ok
        ? { url: textOf(answer.data, 'url'), sentence: null }
        : { url: null, sentence: answer.sentence };
    },
  });
  if (isPending) return <Spinner label="Photo" className="p-4" />;
  if (!data?.url) {
    return (
      <span className="grid gap-1 p-3 text-label text-pencil">
        {data?.sentence ?? 'The photo cannot be shown now.'}
        <Button variant="quiet" onClick={() => void refetch()}>
          Try again
        </Button>
      </span>
    );
  }
  // The bytes come from the object store by a signed address: the image optimiser must neither fetch nor keep them.
  return (
    <picture className="contents">
      <img src={data.url} alt={alt} className={className} onError={() => void refetch()} />
    </picture>
  );
}
