import type { Metadata } from 'next';
import { LinkButton } from '@/components/ui/link-button';
import { SheetFrame } from '@/components/ui/sheet-frame';

export const metadata: Metadata = { title: 'Not here' };

/** What does not exist, and what is not for this person: the two are never told apart. */
export default function NotFound() {
  return (
    <main id="main" className="mx-auto max-w-xl px-4 py-10">
      <SheetFrame heading="There is nothing here that you can see" level={1}>
        <div className="grid gap-3">
          <p>The address may be wrong, or it belongs to a project that you are not in.</p>
          <div>
            <LinkButton href="/" variant="primary">
              Go to the start
            </LinkButton>
          </div>
        </div>
      </SheetFrame>
    </main>
  );
}
