'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { z } from 'zod';
import { Button } from '@/components/ui/button';
import { Textarea } from '@/components/ui/textarea';
import { requiredText } from '@/lib/inspection/primitives';
import { ActionDialog } from './action-dialog';
import { postJson, type Posted } from './post-json';
import { ProblemNotice } from './problem-notice';

const voidInput = z.object({ reason: requiredText(500) });

/** Makes a release void by hand, with the reason; it is never lifted. */
export function VoidRelease({
  pourId,
  releaseId,
  number,
}: {
  pourId: string;
  releaseId: string;
  number: number;
}) {
  return (
    <ActionDialog
      label="Make void"
      accessibleLabel={`Make void: release ${number}`}
      title={`Make release ${number} void`}
      variant="hold"
    >
      {(close) => <VoidForm {...{ pourId, releaseId, close }} />}
    </ActionDialog>
  );
}

function VoidForm({ pourId, releaseId, close }: { pourId: string; releaseId: string; close: () => void }) {
  const router = useRouter();
  const [failure, setFailure] = useState<Extract<Posted, { ok: false }> | null>(null);
  const { register, handleSubmit, formState } = useForm({
    resolver: zodResolver(voidInput),
    defaultValues: { reason: '' },
  });
  const submit = handleSubmit(async (input) => {
    setFailure(null);
    const answer = await postJson(`/api/pours/${pourId}/releases/${releaseId}/void`, input);
    if (!answer.ok) {
      setFailure(answer);
      return;
    }
    close();
    router.refresh();
  });
  return (
    <form onSubmit={(event) => void submit(event)} noValidate className="grid gap-4">
      <p>
        A void is never lifted. A new release needs a new number, new signatures and a new last walk.
        Everybody on the pour is told.
      </p>
      {failure && <ProblemNotice failure={failure} title="The release still stands" />}
      <Textarea label="Why" error={formState.errors.reason?.message} {...register('reason')} />
      <div>
        <Button type="submit" variant="hold" busy={formState.isSubmitting}>
          Make it void
        </Button>
      </div>
    </form>
  );
}
