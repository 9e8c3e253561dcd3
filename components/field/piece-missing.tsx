'use client';

import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { fieldPaths } from './field-routes';
import { Screen } from './screen';

/** A screen whose piece of the program did not arrive: what is kept, and what brings it. */
export function PieceMissing({ title = 'Not on this device yet' }: { title?: string }) {
  return (
    <Screen title={title} back={{ href: fieldPaths.pours, words: 'pours' }}>
      <Notice
        tone="watch"
        role="alert"
        title="This screen did not arrive"
        actions={
          <Button variant="primary" onClick={() => window.location.reload()}>
            Try again
          </Button>
        }
      >
        <p>
          A piece of Cagewright is not on this device yet, and it could not be fetched. Everything you
          recorded is kept. Try again where there is a network; once it is here it opens without one.
        </p>
      </Notice>
    </Screen>
  );
}
