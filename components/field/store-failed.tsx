'use client';

import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { Screen } from './screen';

/** The store of this device did not open: nothing is said of what is in it, least of all that nothing is. */
export function StoreFailed() {
  return (
    <Screen title="Cagewright on site">
      <Notice
        tone="hold"
        title="The store of this device did not open"
        actions={
          <Button variant="primary" onClick={() => window.location.reload()}>
            Load this page again
          </Button>
        }
      >
        <p>
          What was kept is still in it, and nothing was sent or lost by this. Close other tabs of Cagewright,
          make room on the device if it is full, and load this page again.
        </p>
        <p>In a private window this browser keeps nothing: use an ordinary one.</p>
      </Notice>
    </Screen>
  );
}
