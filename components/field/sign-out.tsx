'use client';

import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { ConfirmDialog } from '@/components/ui/confirm-dialog';
import { notSentCount } from './sync-words';
import { useDevice, useSnapshot } from './use-device';

/** Leaves the device to the next person. What is not sent is said, and stays here for its author. */
export function SignOut() {
  const device = useDevice();
  const { sync, person } = useSnapshot();
  const [asking, setAsking] = useState(false);
  const [busy, setBusy] = useState(false);
  const [problem, setProblem] = useState<string | null>(null);
  const waiting = notSentCount(sync);
  // In another person's session there is none of one's own to end: handing over is enough.
  if (!person || sync.signedInAs !== null) return null;

  const leave = async () => {
    setBusy(true);
    setProblem(null);
    try {
      // The session is the server's to end; without it the next person would be taken for this one.
      const { signOut } = await import('next-auth/react');
      await signOut({ redirect: false });
      await device.handOver();
      window.location.reload();
    } catch {
      setProblem(
        'There is no answer from the server, so the session could not be ended. Try again with a network, or hand over: that hides your work without one.',
      );
      setBusy(false);
    }
  };
  return (
    <>
      <Button variant="quiet" onClick={() => setAsking(true)}>
        Sign out
      </Button>
      <ConfirmDialog
        open={asking}
        title={`Sign out ${person.name}`}
        confirmLabel="Sign out"
        busy={busy}
        onConfirm={() => void leave()}
        onClose={() => setAsking(false)}
      >
        {waiting > 0 ? (
          <p>
            {waiting} not sent yet. It stays on this device, hidden from others and not encrypted, and is sent
            when you sign in here again. Nobody else can send it for you. With a PIN you can go on working
            here without a network.
          </p>
        ) : (
          <p>Everything is sent. Your pours stay on this device, hidden from others and not encrypted.</p>
        )}
        {problem && <p className="mt-2 font-semibold text-hold">{problem}</p>}
      </ConfirmDialog>
    </>
  );
}
