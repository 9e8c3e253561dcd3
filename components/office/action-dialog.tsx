'use client';

import { useState, type ReactNode } from 'react';
import { Button } from '@/components/ui/button';
import type { ButtonVariant } from '@/components/ui/button-classes';
import { Dialog } from '@/components/ui/dialog';

/** A button that opens a dialog; what is in it is made anew each time, and told how to close it. */
export function ActionDialog({
  label,
  accessibleLabel,
  title,
  variant = 'secondary',
  wide = false,
  children,
}: {
  label: ReactNode;
  /** Where several buttons say the same: which one this is. */
  accessibleLabel?: string;
  title: string;
  variant?: ButtonVariant;
  wide?: boolean;
  children: (close: () => void) => ReactNode;
}) {
  const [open, setOpen] = useState(false);
  const close = () => setOpen(false);
  return (
    <>
      <Button
        variant={variant}
        aria-label={accessibleLabel}
        aria-haspopup="dialog"
        onClick={() => setOpen(true)}
      >
        {label}
      </Button>
      <Dialog open={open} title={title} onClose={close} wide={wide}>
        {children(close)}
      </Dialog>
    </>
  );
}
