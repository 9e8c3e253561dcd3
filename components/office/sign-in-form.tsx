'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import { signIn } from 'next-auth/react';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { z } from 'zod';
import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { TextInput } from '@/components/ui/text-input';

const signInInput = z.object({
  email: z.email('Write your e-mail address.'),
  password: z.string().min(1, 'Write your password.'),
});
type SignInInput = z.infer<typeof signInInput>;

const offline =
  'There is no connection to the server. Work kept on this device is still here; sign in once the network is back.';

const sentenceFor = (error: string, status: number): string => {
  if (status === 429 || /too.?many|throttl/i.test(error)) {
    return 'Too many tries with this address. Nothing is lost; wait a few minutes and try again.';
  }
  if (status >= 500) return 'The server could not answer. Try again in a moment.';
  return 'This e-mail address and password do not go together. Check both and try again.';
};

/** E-mail and password; says apart what is wrong, too often, and out of reach. `next` has been made safe. */
export function SignInForm({ next }: { next: string }) {
  const [problem, setProblem] = useState<string | null>(null);
  const { register, handleSubmit, formState, resetField } = useForm<SignInInput>({
    resolver: zodResolver(signInInput),
    defaultValues: { email: '', password: '' },
  });

  const submit = handleSubmit(async (input) => {
    setProblem(null);
    try {
      // next-auth leaves the page where it cannot reach the server; so ask first.
      const reached = await fetch('/api/auth/csrf', { cache: 'no-store' });
      if (!reached.ok || !reached.headers.get('content-type')?.includes('json')) {
        setProblem('The server could not answer. Try again in a moment.');
        return;
      }
      const answer = await signIn('credentials', { ...input, redirect: false });
      if (!answer || answer.error) {
        setProblem(sentenceFor(answer?.error ?? '', answer?.status ?? 0));
        resetField('password');
        return;
      }
    } catch {
      setProblem(offline);
      return;
    }
    window.location.assign(next);
  });

  return (
    <form onSubmit={(event) => void submit(event)} noValidate className="grid gap-4">
      {problem && (
        <Notice tone="hold" title="Not signed in">
          <p>{problem}</p>
        </Notice>
      )}
      <TextInput
        label="E-mail"
        type="email"
        autoComplete="username"
        inputMode="email"
        autoCapitalize="none"
        spellCheck={false}
        error={formState.errors.email?.message}
        {...register('email')}
      />
      <TextInput
        label="Password"
        type="password"
        autoComplete="current-password"
        error={formState.errors.password?.message}
        {...register('password')}
      />
      <Button type="submit" variant="primary" busy={formState.isSubmitting} wide>
        Sign in
      </Button>
    </form>
  );
}
