'use client';

import { useId, useState } from 'react';
import { Button } from '@/components/ui/button';
import { fieldAria, FieldError } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { readUnsentFile, type UnsentFile } from '@/lib/device/unsent-file';
import { bringIn, type BroughtIn } from './bring-in';
import { fullTime } from './project-time';

const counted = (count: number, one: string, many: string) => `${count} ${count === 1 ? one : many}`;

/** Brings in what a device saved to a file because it could not be sent: only one's own, and nothing twice. */
export function BringInFile({ personId, timeZone }: { personId: string; timeZone: string }) {
  const id = useId();
  const [problem, setProblem] = useState<string | null>(null);
  const [file, setFile] = useState<UnsentFile | null>(null);
  const [busy, setBusy] = useState(false);
  const [so, setSo] = useState<BroughtIn | null>(null);

  const choose = async (chosen: File | undefined) => {
    setSo(null);
    setFile(null);
    setProblem(null);
    if (!chosen) return;
    const read = readUnsentFile(await chosen.text());
    if (read.ok) setFile(read.file);
    else setProblem(read.problem);
  };
  const begin = async () => {
    if (!file) return;
    setBusy(true);
    try {
      setSo(await bringIn(file, setSo));
    } finally {
      setBusy(false);
    }
  };
  const own = file?.person.id === personId;
  return (
    <div className="grid gap-4">
      <p>
        A device that cannot send can save its work to a file, at &ldquo;not sent yet&rdquo;. The same file
        can be brought in more than once: what is there already is not doubled.
      </p>
      <div className="grid gap-1">
        <label htmlFor={id} className="font-label text-label font-semibold">
          The saved file
        </label>
        <input
          {...fieldAria(id, { error: problem ?? undefined })}
          type="file"
          accept="application/json,.json"
          className="max-w-full text-body file:mr-3 file:min-h-target file:border file:border-solid file:border-ink file:bg-sheet file:px-pad file:font-label file:font-semibold file:text-ink hover:file:border-chalk hover:file:text-chalk"
          onChange={(event) => void choose(event.target.files?.[0])}
        />
        <FieldError id={id} error={problem ?? undefined} />
      </div>
      {file && (
        <dl className="grid gap-x-6 gap-y-1 sm:grid-cols-[max-content_1fr]">
          <Line label="Recorded by" text={file.person.name} />
          <Line label="Saved" text={fullTime(file.savedAt, timeZone)} />
          <Line
            label="Holds"
            text={`${counted(file.entries.length, 'entry', 'entries')}, ${counted(file.photos.length, 'photograph', 'photographs')}`}
          />
          {file.refused.length > 0 && (
            <Line
              label="Refused before"
              text={`${file.refused.length}, not sent again. ${[...new Set(file.refused.map((one) => one.sentence))].join(' ')}`}
            />
          )}
        </dl>
      )}
      {file && !own && (
        <Notice tone="hold" title={`This is the work of ${file.person.name}`}>
          <p>Nobody sends another&rsquo;s work. {file.person.name} signs in and brings it in.</p>
        </Notice>
      )}
      {file && own && (
        <div>
          <Button variant="primary" busy={busy} onClick={() => void begin()}>
            {so?.stopped ? 'Go on' : 'Bring it in'}
          </Button>
        </div>
      )}
      {so && <Outcome so={so} busy={busy} />}
    </div>
  );
}

function Outcome({ so, busy }: { so: BroughtIn; busy: boolean }) {
  const whole = !busy && so.stopped === null;
  return (
    <Notice
      tone={so.stopped ? 'hold' : so.refused.length > 0 ? 'watch' : 'met'}
      title={so.stopped ? 'Stopped before the end' : whole ? 'Brought in' : 'Bringing it in'}
    >
      {so.stopped && <p>{so.stopped} What was taken in stays; go on when it can be reached.</p>}
      <p>
        {counted(so.kept, 'entry', 'entries')} kept, {so.known} there already,{' '}
        {counted(so.photosSent, 'photograph', 'photographs')} sent.
      </p>
      {so.refused.length > 0 && (
        <ul className="list-inside list-disc">
          {so.refused.map((one, index) => (
            <li key={index}>
              {one.what}: {one.sentence}
            </li>
          ))}
        </ul>
      )}
    </Notice>
  );
}

function Line({ label, text }: { label: string; text: string }) {
  return (
    <>
      <dt className="font-label text-label font-semibold text-pencil">{label}</dt>
      <dd>{text}</dd>
    </>
  );
}
