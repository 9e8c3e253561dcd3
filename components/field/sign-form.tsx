'use client';

import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { TextInput } from '@/components/ui/text-input';
import { holdsInScope } from '@/lib/inspection/holds';
import { sheetStatement } from '@/lib/inspection/sheet-statement';
import { roleWords } from '@/lib/inspection/roles';
import { ElementsField } from './elements-field';
import { FormProblem } from './form-problem';
import type { OpenSheet } from './open-sheet';
import { sha256Hex } from './sha256-hex';
import { SignaturePad } from './signature-pad';
import { isDrawn, type Strokes } from './signature-strokes';
import { signatureWords } from './signature-words';
import { useRecord } from './use-record';

/** Signs the sheet as it stands: drawn with a finger, or by typing the name. */
export function SignForm({
  open,
  as,
  elementIds,
  onElements,
}: {
  open: OpenSheet;
  as: 'inspector' | 'superintendent';
  /** What is signed for; null: the whole pour. */
  elementIds: string[] | null;
  onElements: (elementIds: string[] | null) => void;
}) {
  const { sheet, pour, person, holds } = open;
  const [strokes, setStrokes] = useState<Strokes>([]);
  const [typing, setTyping] = useState(false);
  const [typed, setTyped] = useState('');
  const [problem, setProblem] = useState<string | null>(null);
  const { busy, problems, record } = useRecord(open);
  const words = signatureWords({ sheet, pour, name: person.name, as, holds, elementIds });
  const others = holdsInScope(holds, { elementIds }).filter(
    (hold) => hold.kind !== 'signature-missing' && hold.kind !== 'plan-revised',
  );

  const sign = async () => {
    setProblem(null);
    if (typing && typed.trim().toLowerCase() !== person.name.trim().toLowerCase())
      return setProblem(`Type your name as it is on record: ${person.name}.`);
    if (!typing && !isDrawn(strokes))
      return setProblem('Sign in the field first, or type your name instead.');
    await record('signature', {
      as,
      elementIds,
      words: typing ? `${words} Signed by typing the name: ${typed.trim()}.`.slice(0, 2000) : words,
      strokes: typing ? [] : strokes.map((stroke) => [...stroke]),
      sheetDigest: await sha256Hex(sheetStatement(sheet)),
    });
  };
  return (
    <form
      noValidate
      className="grid gap-4 border border-ink bg-sheet p-3"
      onSubmit={(event) => {
        event.preventDefault();
        void sign();
      }}
    >
      <h2 className="text-heading">You sign this, as {roleWords[as].toLowerCase()}</h2>
      <ElementsField plan={sheet.plan} legend="You sign for" value={elementIds} onChange={onElements} />
      <p className="border-l-4 border-ink pl-3">{words}</p>
      {others.length > 0 && (
        <Notice
          tone="watch"
          title={`${others.length} ${others.length === 1 ? 'hold stands' : 'holds stand'}`}
        >
          <p>You can sign now. Whatever is recorded after it in its scope sets the signature aside.</p>
        </Notice>
      )}
      {typing ? (
        <TextInput
          label="Type your name"
          autoComplete="name"
          value={typed}
          error={problem}
          onChange={(event) => setTyped(event.target.value)}
        />
      ) : (
        <>
          <SignaturePad strokes={strokes} onChange={setStrokes} />
          {problem && (
            <p role="alert" className="font-label font-semibold text-hold">
              {problem}
            </p>
          )}
        </>
      )}
      <Button
        variant="quiet"
        onClick={() => {
          setTyping(!typing);
          setProblem(null);
        }}
      >
        {typing ? 'Sign with a finger or a pen' : 'Sign by typing your name'}
      </Button>
      <FormProblem problems={problems} shown={[]} />
      <Button type="submit" variant="primary" wide busy={busy} className="min-h-15">
        Sign
      </Button>
      <p className="text-label text-pencil">It counts once you have confirmed it with your password.</p>
    </form>
  );
}
