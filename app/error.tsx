'use client';

import { Button } from '@/components/ui/button';
import { SheetFrame } from '@/components/ui/sheet-frame';

/** A page that could not be drawn: what happened, what is kept, what to do, and the incident to quote. */
export default function ErrorPage({
  error,
  retry,
}: {
  error: Error & { digest?: string };
  /** Asks the server for the page once more; clearing the error alone would draw the same answer again. */
  retry: () => void;
}) {
  return (
    <main id="main" className="mx-auto max-w-xl px-4 py-10">
      <SheetFrame heading="This page could not be drawn" level={1}>
        <div className="grid gap-3">
          <p role="alert">
            Nothing that was recorded is lost. Try again; if it happens once more, tell whoever runs the
            program the incident below.
          </p>
          {error.digest && (
            <p className="text-pencil">
              Incident <span className="font-figure">{error.digest}</span>
            </p>
          )}
          <div>
            <Button variant="primary" onClick={retry}>
              Try again
            </Button>
          </div>
        </div>
      </SheetFrame>
    </main>
  );
}
