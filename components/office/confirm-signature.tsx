'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { z } from 'zod';
import { Button } from '@/components/ui/button';
import { TextInput } from '@/components/ui/text-input';
import { ActionDialog } from './action-dialog';
import { postJson, type Posted } from './post-json';
import { ProblemNotice } from './problem-notice';

const confirmInput = z.object({ password: z.string().min(1, 'Write your password.') });

/** A signature counts once its author has confirmed it with the password. */
export function ConfirmSignature({ signatureId, words }: { signatureId: string; words: string }) {
  return (
    <ActionDialog label="Confirm my signature" title="Confirm your signature" variant="primary">
      {(close) => <ConfirmForm {...{ signatureId, words, close }} />}
    </ActionDialog>
  );
}

function ConfirmForm({
  signatureId,
  words,
  close,
}: {
  signatureId: string;
  words: string;
  close: () => void;
}) {
  const router = useRouter();
  const [failure, setFailure] = useState<Extract<Posted, { ok: false }> | null>(null);
  const { register, handleSubmit, formState, resetField } = useForm({
    resolver: zodResolver(confirmInput),
    defaultValues: { password: '' },
  });
  const submit = handleSubmit(async ({ password }) => {
    setFailure(null);
    const answer = await postJson(`/api/signatures/${signatureId}/confirm`, { password });
    resetField('password');
    if (!answer.ok) {
      setFailure(answer);
      return;
    }
    close();
    router.refresh();
  });
  return (
    <form onSubmit={(event) => void submit(event)} noValidate className="grid gap-4">
      <blockquote className="border-l-[6px] border-ink pl-3">{words}</blockquote>
      {failure && <ProblemNotice failure={failure} title="Not confirmed" />}
      <TextInput
        label="Your password"
        type="password"
        autoComplete="current-password"
        error={formState.errors.password?.message}
        {...register('password')}
      />
      <div>
        <Button type="submit" variant="primary" busy={formState.isSubmitting}>
          Confirm
        </Button>
      </div>
    </form>
  );
}
