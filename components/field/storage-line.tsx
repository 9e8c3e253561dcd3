'use client';

import { Notice } from '@/components/ui/notice';
import { bytesWords } from './sync-words';
import { useSnapshot } from './use-device';

/** How much of the device is used, and whether the browser has promised to keep it. */
export function StorageLine() {
  const { storage } = useSnapshot();
  const { usedBytes, quotaBytes, persisted } = storage;
  const share = usedBytes !== null && quotaBytes ? usedBytes / quotaBytes : null;
  return (
    <section className="grid gap-2 px-1">
      <h2 className="text-heading">Storage</h2>
      {share !== null && share > 0.9 && (
        <Notice tone="hold" title="The device is nearly full">
          <p>Readings go on being kept; photos may not fit. Send now, or take pours off this device.</p>
        </Notice>
      )}
      <p>
        {usedBytes === null
          ? 'This browser does not say how much is used.'
          : `${bytesWords(usedBytes)} used${quotaBytes ? ` of ${bytesWords(quotaBytes)} that this browser allows` : ''}.`}
      </p>
      <p className="text-label text-pencil">
        {persisted === true
          ? 'The browser keeps it until you take it off.'
          : persisted === false
            ? 'The browser may clear it when the device runs out of space. Install the application to have it kept.'
            : 'This browser does not say whether it keeps it.'}
      </p>
    </section>
  );
}
