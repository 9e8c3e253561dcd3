import { z } from 'zod';
import { recordId } from '@/lib/inspection/primitives';
import { confirmSignature, requireSignature } from '@/lib/server/confirm-signature';
import { handleRoute } from '@/lib/server/handle-route';

/** A signature counts once its author has confirmed it with the password. */
export const POST = handleRoute({
  action: 'signature.confirm',
  params: z.object({ signatureId: recordId }),
  body: z.object({ password: z.string().min(1, 'Your password confirms it.').max(400) }),
  password: (body) => body.password,
  status: 201,
  response: z.object({ id: recordId }),
  load: ({ tx, person, params }) => requireSignature(tx, person, params.signatureId),
  run: async ({ tx, person, role, loaded, now }) => ({
    id: await confirmSignature(tx, { id: person.id, role }, loaded, now),
  }),
});
