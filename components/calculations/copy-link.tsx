'use client';

import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { TextInput } from '@/components/ui/text-input';

/** Copies the address with the inputs in it; where the browser does not let it, shows the address to be copied by hand. */
export function CopyLink({ path }: { path: string }) {
  const [copied, setCopied] = useState<{ path: string; ok: boolean } | null>(null);
  const done = copied?.path === path ? copied : null;
  const copy = async () => {
    const ok = await writeText(new URL(path, window.location.origin).href);
    setCopied({ path, ok });
  };
  return (
    <>
      <Button onClick={() => void copy()}>Copy link</Button>
      <span role="status" className="text-label text-pencil">
        {done?.ok && 'The link is copied, with the inputs in it.'}
      </span>
      {done && !done.ok && (
        <TextInput
          label="Copy this address"
          hint="The browser does not let the page copy it."
          readOnly
          value={new URL(path, window.location.origin).href}
          onFocus={(event) => event.target.select()}
          fieldClassName="basis-full"
        />
      )}
    </>
  );
}

async function writeText(text: string): Promise<boolean> {
  try {
    await navigator.clipboard.writeText(text);
    return true;
  } catch {
    return false;
  }
}
