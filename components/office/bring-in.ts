import type { z } from 'zod';
import { uploadPhoto } from '@/lib/device/photos/upload-photo';
import { batchesOf, type UnsentFile } from '@/lib/device/unsent-file';
import { PROTOCOL } from '@/lib/inspection/protocol';
import { pushResponse } from '@/lib/inspection/wire';
import { postJson } from './post-json';

type Photo = UnsentFile['photos'][number];
export type BroughtIn = {
  kept: number;
  known: number;
  refused: { what: string; sentence: string }[];
  photosSent: number;
  /** Why it stopped before the end; null when it came to the end. Bringing the same file in again goes on from there. */
  stopped: string | null;
};

const environment = {
  fetch: (address: string, init: RequestInit) => fetch(address, init),
  now: () => Date.now(),
  after: (milliseconds: number, run: () => void) => {
    const timer = setTimeout(run, milliseconds);
    return () => clearTimeout(timer);
  },
};

/**
 * Sends what a saved file holds, entries before photographs, as the device would have. The server knows what it holds
 * already, so that bringing a file in twice, or a device that sends after all, doubles nothing.
 */
export async function bringIn(file: UnsentFile, told: (so: BroughtIn) => void): Promise<BroughtIn> {
  let so: BroughtIn = { kept: 0, known: 0, refused: [], photosSent: 0, stopped: null };
  const now = (more: Partial<BroughtIn>) => {
    so = { ...so, ...more };
    told(so);
  };
  const there = new Set<string>();
  for (const { projectId, entries } of batchesOf(file.entries)) {
    const sentAt = new Date().toISOString();
    const { deviceId } = file;
    const answer = await postJson('/api/sync/push', {
      protocol: PROTOCOL,
      projectId,
      deviceId,
      sentAt,
      entries,
    });
    if (!answer.ok) {
      now({ stopped: answer.sentence });
      return so;
    }
    const outcomes = pushResponse.safeParse(answer.data);
    if (!outcomes.success) {
      now({ stopped: 'The answer did not come from this program. Check the network and bring it in again.' });
      return so;
    }
    count(outcomes.data);
  }
  for (const photo of file.photos) {
    // One whose entry stands in the file as refused has nothing to belong to; one sent before the file was saved has.
    if (file.entries.some((entry) => entry.id === photo.entryId) && !there.has(photo.entryId)) continue;
    const sent = await sendPhoto(photo);
    if (sent === null) now({ photosSent: so.photosSent + 1 });
    else if (sent.final) now({ refused: [...so.refused, { what: 'photograph', sentence: sent.sentence }] });
    else {
      now({ stopped: sent.sentence });
      return so;
    }
  }
  return so;

  function count({ outcomes }: z.infer<typeof pushResponse>) {
    const types = new Map(file.entries.map((entry) => [entry.id, entry.type]));
    for (const outcome of outcomes) if (outcome.outcome !== 'refused') there.add(outcome.id);
    now({
      kept: so.kept + outcomes.filter(({ outcome }) => outcome === 'kept').length,
      known: so.known + outcomes.filter(({ outcome }) => outcome === 'known').length,
      refused: [
        ...so.refused,
        ...outcomes.flatMap((one) =>
          one.outcome === 'refused' ? [{ what: types.get(one.id) ?? 'entry', sentence: one.sentence }] : [],
        ),
      ],
    });
  }
}

async function sendPhoto(photo: Photo): Promise<{ final: boolean; sentence: string } | null> {
  const bytes = Uint8Array.from(atob(photo.base64), (char) => char.charCodeAt(0)).buffer;
  const sent = await uploadPhoto(environment, { photoId: photo.photoId, bytes });
  if (sent.kind === 'sent') return null;
  if (sent.kind === 'trouble' && sent.status === 409) return null;
  return { final: sent.kind === 'refused', sentence: sent.sentence };
}
