'use client';

import { useQuery } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { useEffect, useRef } from 'react';
import { z } from 'zod';
import { askJson } from './post-json';

const liveAnswer = z.object({ headSeq: z.number() });
const EVERY_MS = 8000;

/** Asks whether others have recorded something; when they have, the page is drawn again in place. */
export function LivePour({ pourId, headSeq }: { pourId: string; headSeq: number }) {
  const router = useRouter();
  const drawnFor = useRef(headSeq);
  const { data } = useQuery({
    queryKey: ['live', pourId],
    refetchInterval: EVERY_MS,
    queryFn: async () => {
      const answer = await askJson('GET', `/api/pours/${pourId}/live`);
      if (!answer.ok) return { reached: false as const, signedOut: answer.code === 'sign-in-needed' };
      const parsed = liveAnswer.safeParse(answer.data);
      return parsed.success
        ? { reached: true as const, headSeq: parsed.data.headSeq }
        : { reached: false as const, signedOut: false };
    },
  });

  useEffect(() => {
    drawnFor.current = Math.max(drawnFor.current, headSeq);
  }, [headSeq]);

  const seen = data?.reached ? data.headSeq : null;
  useEffect(() => {
    if (seen === null || seen <= drawnFor.current) return;
    drawnFor.current = seen;
    router.refresh();
  }, [seen, router]);

  return (
    <p role="status" className="font-label text-label font-medium text-pencil">
      {data && !data.reached
        ? data.signedOut
          ? 'You are signed out; this page stands still.'
          : 'No connection; this page stands still.'
        : `Up to entry ${Math.max(headSeq, seen ?? 0)}; follows what others record.`}
    </p>
  );
}
