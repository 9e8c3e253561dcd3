import type { Metadata } from 'next';
import { SheetFrame } from '@/components/ui/sheet-frame';
import { ThemeSwitch } from '@/components/ui/theme-switch';
import { safeNext } from '@/components/office/safe-next';
import { SignInForm } from '@/components/office/sign-in-form';

export const metadata: Metadata = { title: 'Sign in' };

/** Sign-in with e-mail and password, and back to where one came from. */
export default async function SignInPage({
  searchParams,
}: {
  searchParams: Promise<Record<string, string | string[] | undefined>>;
}) {
  const { next } = await searchParams;
  return (
    <main id="main" className="mx-auto grid min-h-dvh max-w-md content-center gap-6 px-4 py-10">
      <div>
        <p className="font-label text-title font-semibold">Cagewright</p>
        <p className="text-pencil">
          What must be in the form, what is, and what stands between the two before the concrete comes.
        </p>
      </div>
      <SheetFrame heading="Sign in" level={1}>
        <SignInForm next={safeNext(typeof next === 'string' ? next : null)} />
      </SheetFrame>
      <ThemeSwitch />
    </main>
  );
}
