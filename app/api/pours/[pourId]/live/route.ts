import { z } from 'zod';
import { holds } from '@/lib/inspection/holds';
import { pourState } from '@/lib/inspection/pour-state';
import { recordId } from '@/lib/inspection/primitives';
import { handleRoute } from '@/lib/server/handle-route';
import { loadSheet } from '@/lib/server/load-sheet';
import { requirePour } from '@/lib/server/require-pour';

/** Where a pour stands now, for pages that watch it. */
export const GET = handleRoute({
  action: 'pour.read',
  params: z.object({ pourId: recordId }),
  response: z.object({ headSeq: z.number().int(), state: z.string(), holds: z.number().int() }),
  load: ({ tx, person, params }) => requirePour(tx, person, params.pourId),
  run: async ({ tx, params, now }) => {
    const sheet = await loadSheet(tx, params.pourId);
    const standing = holds(sheet, now);
    return { headSeq: sheet.headSeq, state: pourState(sheet, standing, now), holds: standing.length };
  },
});
