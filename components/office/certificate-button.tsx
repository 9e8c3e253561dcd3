'use client';

import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { askJson, textOf } from './post-json';

/** A job writes a certificate; before that its address leads to an answer of the store that helps nobody. */
async function isThere(url: string): Promise<boolean> {
  const abort = new AbortController();
  try {
    return (await fetch(url, { signal: abort.signal })).ok;
  } catch {
    return false;
  } finally {
    abort.abort();
  }
}

/** Opens the certificate of a release by its short-lived address; says so where it is not written yet. */
export function CertificateButton({
  pourId,
  releaseId,
  number,
}: {
  pourId: string;
  releaseId: string;
  number: number;
}) {
  const [busy, setBusy] = useState(false);
  const [problem, setProblem] = useState<string | null>(null);
  const open = async () => {
    setBusy(true);
    setProblem(null);
    const answer = await askJson('GET', `/api/pours/${pourId}/releases/${releaseId}/certificate`);
    const url = answer.ok ? textOf(answer.data, 'url') : null;
    const there = url !== null && (await isThere(url));
    setBusy(false);
    if (url && there) window.location.assign(url);
    else setProblem(answer.ok ? 'It is not written yet. Try again in a minute.' : answer.sentence);
  };
  return (
    <span className="grid gap-1">
      <Button busy={busy} onClick={() => void open()} aria-label={`Certificate of release ${number}`}>
        Certificate
      </Button>
      {problem && (
        <span role="alert" className="max-w-56 text-label text-hold">
          {problem}
        </span>
      )}
    </span>
  );
}
