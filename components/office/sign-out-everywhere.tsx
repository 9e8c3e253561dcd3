'use client';

import { signOut } from 'next-auth/react';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { ConfirmDialog } from '@/components/ui/confirm-dialog';
import { postJson, type Posted } from './post-json';
import { ProblemNotice } from './problem-notice';

/** Ends every session of this person at once, this one too. */
export function SignOutEverywhere() {
  const [asking, setAsking] = useState(false);
  const [busy, setBusy] = useState(false);
  const [failure, setFailure] = useState<Extract<Posted, { ok: false }> | null>(null);
  const end = async () => {
    setBusy(true);
    setFailure(null);
    const answer = await postJson('/api/account/sign-out-everywhere');
    if (!answer.ok) {
      setFailure(answer);
      setBusy(false);
      setAsking(false);
      return;
    }
    await signOut({ callbackUrl: '/sign-in' });
  };
  return (
    <div className="grid gap-3">
      {failure && <ProblemNotice failure={failure} title="The sessions are still open" />}
      <div>
        <Button variant="hold" onClick={() => setAsking(true)}>
          Sign out everywhere
        </Button>
      </div>
      <ConfirmDialog
        open={asking}
        title="Sign out everywhere"
        confirmLabel="Sign out everywhere"
        cancelLabel="Stay signed in"
        tone="hold"
        busy={busy}
        onConfirm={() => void end()}
        onClose={() => setAsking(false)}
      >
        <p>
          Every device that is signed in as you has to sign in again, this one too. Work that is not sent yet
          stays on its device and is sent after you sign in there.
        </p>
      </ConfirmDialog>
    </div>
  );
}
