'use client';

import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { buttonClasses } from '@/components/ui/button-classes';
import { ConfirmDialog } from '@/components/ui/confirm-dialog';
import type { RefusedEntry } from '@/lib/device/device-types';
import { entryTitle } from './entry-title';
import { FieldLink } from './field-router';
import { againPath } from './again-path';
import { saveBlob } from './save-blob';
import { useDevice, useOpenPour, useSnapshot } from './use-device';

/** One entry that the server refused: what it says, why, and what can be done with it. */
export function RefusedLine({ refused }: { refused: RefusedEntry }) {
  const device = useDevice();
  const { entry } = refused;
  const open = useOpenPour(entry.pourId ?? '');
  const { pours } = useSnapshot();
  const [asking, setAsking] = useState(false);
  const anyPour = pours.find((pour) => pour.projectId === entry.projectId && pour.kept);
  const again = againPath(entry, open?.sheet ?? null, anyPour?.id ?? null);
  const save = () =>
    saveBlob(
      new Blob([JSON.stringify(entry, null, 2)], { type: 'application/json' }),
      `refused-${entry.type}-${entry.id.slice(0, 8)}.json`,
    );
  return (
    <li className="border border-hold bg-sheet">
      <div className="grid gap-1 px-3 py-2.5">
        <p className="font-label text-lead font-semibold">{entryTitle(entry, open?.sheet ?? null)}</p>
        <p className="font-semibold text-hold">{refused.sentence}</p>
        {open && <p className="text-label text-pencil">{open.pour.number}</p>}
      </div>
      <div className="flex flex-wrap border-t border-rule">
        {again && (
          <FieldLink href={again} className={buttonClasses('quiet')}>
            Record it again
          </FieldLink>
        )}
        <Button variant="quiet" onClick={save}>
          Save to a file
        </Button>
        <Button variant="quiet" onClick={() => setAsking(true)}>
          Let it go
        </Button>
      </div>
      <ConfirmDialog
        open={asking}
        title="Let this entry go"
        confirmLabel="Let it go"
        tone="hold"
        onConfirm={() => {
          setAsking(false);
          void device.forgetRefused(entry.id);
        }}
        onClose={() => setAsking(false)}
      >
        <p>
          It is taken off this device and is not on the server. Record it again first, or save it to a file.
        </p>
      </ConfirmDialog>
    </li>
  );
}
