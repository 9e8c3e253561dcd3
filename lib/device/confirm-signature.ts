import type { DeviceEnvironment } from './device-environment';
import type { PersonWork } from './person-work';
import { askServer } from './sync/ask-server';
import type { SyncLane } from './sync/sync-lane';

/** A signature counts, or why it does not yet, in a sentence. */
export type Confirmed = { ok: true } | { ok: false; sentence: string };

/** Confirms a signature with the password, online: what is signed is sent first, in the signer's own session. */
export async function confirmSignature(
  env: DeviceEnvironment,
  work: PersonWork,
  lane: SyncLane,
  { signatureId, password }: { signatureId: string; password: string },
): Promise<Confirmed> {
  if (work.outbox.has(signatureId) || !(await lane.ownSession(work))) await lane.run();
  if (work.outbox.has(signatureId) || lane.state.signedInAs !== null) {
    const why = lane.state.message ?? 'There is no connection to the server.';
    return { ok: false, sentence: `The signature has not been sent yet. ${why}` };
  }
  const answer = await askServer(
    env,
    { method: 'POST', path: `/api/signatures/${signatureId}/confirm`, json: { password } },
    'done',
  );
  if (answer.kind === 'trouble') return { ok: false, sentence: answer.sentence };
  await lane.run();
  return { ok: true };
}
