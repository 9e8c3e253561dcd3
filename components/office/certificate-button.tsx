'use client';

import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { askJson, textOf } from './post-json';

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
    setBusy(false);
    if (url) window.location.assign(url);
    else
      setProblem(
        answer.ok ? 'It cannot be opened now.' : `${answer.sentence} It is written within a minute.`,
      );
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
