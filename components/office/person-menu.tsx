'use client';

import Link from 'next/link';
import { signOut } from 'next-auth/react';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { ConfirmDialog } from '@/components/ui/confirm-dialog';
import { Notice } from '@/components/ui/notice';
import { ThemeSwitch } from '@/components/ui/theme-switch';

/** Who is signed in, day or night, the account, and the way out, which warns where work still waits on this device. */
export function PersonMenu({
  person,
}: {
  person: { id: string; name: string; email: string; roleWords: string };
}) {
  const [waits, setWaits] = useState<{ entries: number; photos: number } | null>(null);
  const [busy, setBusy] = useState(false);
  const [problem, setProblem] = useState(false);

  const leave = async () => {
    setBusy(true);
    setProblem(false);
    try {
      await signOut({ callbackUrl: '/sign-in' });
    } catch {
      setProblem(true);
      setBusy(false);
    }
  };
  const askToLeave = async () => {
    setBusy(true);
    const { unsentWork } = await import('./unsent-work');
    const found = await unsentWork(person.id);
    setBusy(false);
    if (found.entries + found.photos > 0) setWaits(found);
    else await leave();
  };

  return (
    <>
      <Button variant="quiet" popoverTarget="person-menu">
        {person.name}
      </Button>
      <div
        id="person-menu"
        popover="auto"
        className="fixed inset-auto top-14 right-3 m-0 w-72 border border-ink bg-sheet p-4 text-ink"
      >
        <div className="grid gap-3">
          <div>
            <p className="font-label font-semibold">{person.name}</p>
            <p className="text-label text-pencil">{person.email}</p>
            <p className="text-label text-pencil">{person.roleWords}</p>
          </div>
          <ThemeSwitch />
          <Link
            href="/account"
            prefetch={false}
            className="inline-flex min-h-target items-center text-chalk underline"
          >
            Account, devices and sessions
          </Link>
          {problem && (
            <Notice tone="hold">
              <p>You are still signed in: the server could not be reached. Try again.</p>
            </Notice>
          )}
          <Button onClick={() => void askToLeave()} busy={busy}>
            Sign out
          </Button>
        </div>
      </div>
      <ConfirmDialog
        open={waits !== null}
        title="Work on this device is not sent yet"
        confirmLabel="Sign out"
        cancelLabel="Stay signed in"
        tone="hold"
        busy={busy}
        onConfirm={() => void leave()}
        onClose={() => setWaits(null)}
      >
        <p>
          {waits?.entries ?? 0} {waits?.entries === 1 ? 'entry' : 'entries'} and {waits?.photos ?? 0}{' '}
          {waits?.photos === 1 ? 'photo' : 'photos'} wait on this device. They are kept, hidden from others
          who sign in here, and sent only after you sign in again.
        </p>
        <p className="mt-2">
          <Link className="text-chalk underline" href="/field/not-sent" prefetch={false}>
            See what is not sent
          </Link>
        </p>
      </ConfirmDialog>
    </>
  );
}
