import type { Metadata } from 'next';
import { buttonClasses } from '@/components/ui/button-classes';
import { LeaveLink } from '@/components/ui/leave-link';
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
            <LeaveLink href="/" className={buttonClasses('primary')}>
              Go to the start
            </LeaveLink>
          </div>
        </div>
      </SheetFrame>
    </main>
  );
}
