'use client';

import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { buttonClasses } from '@/components/ui/button-classes';
import { Dialog } from '@/components/ui/dialog';
import { FieldLink } from './field-router';
import { fieldPaths } from './field-routes';
import { useDevice, useSnapshot } from './use-device';

/** Who holds the device, and the key that locks it for the next person. What is not sent is kept for its author. */
export function HandOver({ words }: { words: string }) {
  const device = useDevice();
  const { person, pin } = useSnapshot();
  const [asking, setAsking] = useState(false);
  if (!person) return null;
  return (
    <>
      <button
        type="button"
        onClick={() => (pin.set ? void device.handOver() : setAsking(true))}
        className="flex min-w-target shrink-0 flex-col items-end justify-center border-l border-rule px-2.5 text-right font-label text-label leading-tight font-medium text-chalk"
      >
        <span className="max-w-20 truncate font-semibold text-ink">{person.name.split(' ')[0]}</span>
        <span>{words}</span>
      </button>
      <Dialog
        open={asking}
        title="Hand over without a PIN?"
        onClose={() => setAsking(false)}
        footer={
          <>
            <Button
              onClick={() => {
                setAsking(false);
                void device.handOver();
              }}
            >
              Hand over without
            </Button>
            <FieldLink
              href={fieldPaths.pin}
              onClick={() => setAsking(false)}
              className={buttonClasses('primary')}
              data-autofocus=""
            >
              Choose a PIN
            </FieldLink>
          </>
        }
      >
        <p>
          With a PIN you open your work here again at once, without a network. Without one it takes the
          network and your password. Either way everything you recorded stays.
        </p>
      </Dialog>
    </>
  );
}
