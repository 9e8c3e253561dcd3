'use client';

import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Textarea } from '@/components/ui/textarea';
import { mayRecord } from '@/lib/inspection/entry-access';
import type { Entry, EntryOf } from '@/lib/inspection/entry';
import { dayAndTime } from './field-time';
import { FormProblem } from './form-problem';
import { nameOf, type OpenSheet } from './open-sheet';
import { useRecord } from './use-record';
import { useRefusedAgain } from './use-refused-again';

/** Questions about an entry: each holds until it is answered. Where the entry is a query, its answer. */
export function QueryParts({ open, entry }: { open: OpenSheet; entry: Entry }) {
  const queries = open.sheet.queries.filter(
    (query) => query.entry.body.entryId === entry.id || query.entry.id === entry.id,
  );
  const mayAsk = mayRecord('query', open.project.role) && entry.type !== 'query';
  if (queries.length === 0 && !mayAsk) return null;
  return (
    <section className="grid gap-3 border border-ink bg-sheet p-3">
      <h2 className="text-heading">Queries</h2>
      {queries.map((query) => (
        <QueryShown key={query.entry.id} open={open} query={query} />
      ))}
      {mayAsk && <AskForm open={open} entryId={entry.id} />}
    </section>
  );
}

function QueryShown({
  open,
  query,
}: {
  open: OpenSheet;
  query: { entry: EntryOf<'query'>; answer: EntryOf<'query-answered'> | null };
}) {
  const { entry, answer } = query;
  const again = useRefusedAgain('query-answered', (body) => body.queryId === entry.id);
  const [text, setText] = useState(again?.body.text ?? '');
  const { busy, problems, record } = useRecord(open, again);
  const said = (one: Entry) =>
    `${nameOf(open, one.authorId)} · ${dayAndTime(one.recordedAt, open.project.timeZone)}`;
  return (
    <div className={`grid gap-2 border-l-4 pl-3 ${answer ? 'border-met' : 'border-hold'}`}>
      <p>
        {entry.body.text}
        <span className="block text-label text-pencil">{said(entry)}</span>
      </p>
      {answer ? (
        <p>
          <b>Answer:</b> {answer.body.text}
          <span className="block text-label text-pencil">{said(answer)}</span>
        </p>
      ) : mayRecord('query-answered', open.project.role) ? (
        <form
          noValidate
          className="grid gap-2"
          onSubmit={(event) => {
            event.preventDefault();
            void record('query-answered', { queryId: entry.id, text });
          }}
        >
          <Textarea
            label="Answer"
            rows={2}
            value={text}
            error={problems.text}
            onChange={(event) => setText(event.target.value)}
          />
          <FormProblem problems={problems} shown={['text']} />
          <Button type="submit" busy={busy}>
            Answer the query
          </Button>
        </form>
      ) : (
        <p className="font-semibold text-hold">It holds until it is answered.</p>
      )}
    </div>
  );
}

function AskForm({ open, entryId }: { open: OpenSheet; entryId: string }) {
  const again = useRefusedAgain('query', (body) => body.entryId === entryId);
  const [text, setText] = useState(again?.body.text ?? '');
  const { busy, problems, record } = useRecord(open, again);
  return (
    <form
      noValidate
      className="grid gap-2"
      onSubmit={(event) => {
        event.preventDefault();
        void record('query', { entryId, text }).then((entry) => entry && setText(''));
      }}
    >
      <Textarea
        label="Ask about this"
        hint="A query holds the pour until it is answered."
        rows={2}
        value={text}
        error={problems.text}
        onChange={(event) => setText(event.target.value)}
      />
      <FormProblem problems={problems} shown={['text']} />
      <Button type="submit" busy={busy}>
        Ask
      </Button>
    </form>
  );
}
