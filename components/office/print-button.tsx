'use client';

import { Button } from '@/components/ui/button';

/** Prints the sheet. */
export function PrintButton() {
  return (
    <Button className="print:hidden" onClick={() => window.print()}>
      Print
    </Button>
  );
}
