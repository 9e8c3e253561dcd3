'use client';

import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { Textarea } from '@/components/ui/textarea';
import { mayRecord } from '@/lib/inspection/entry-access';
import { ChoiceList } from './choice-list';
import { fieldPaths } from './field-routes';
import { dayAndTime } from './field-time';
import { FormProblem } from './form-problem';
import { nameOf, type OpenSheet } from './open-sheet';
import { Screen } from './screen';
import { useRecord } from './use-record';
import { useRefusedAgain } from './use-refused-again';

/** The walk over traffic routes, openings and reworked places, right before the release. */
export function LastWalkScreen({ open }: { open: OpenSheet }) {
  const { sheet, pour, project } = open;
  const again = useRefusedAgain('last-walk');
  const [places, setPlaces] = useState(
    () =>
      again?.body.places ??
      (sheet.corrections.length > 0
        ? 'Traffic routes, openings, reworked places'
        : 'Traffic routes, openings'),
  );
  const [outcome, setOutcome] = useState<'met' | 'not-met' | ''>(again?.body.outcome ?? '');
  const [asked, setAsked] = useState(false);
  const { busy, problems, record } = useRecord(open, again);
  const routes = sheet.plan.elements.flatMap((element) =>
    element.faces.flatMap((face) =>
      face.points
        .filter((point) => point.reason)
        .map((point) => `${element.mark}, ${face.name}: ${point.reason}`),
    ),
  );
  const keep = async () => {
    setAsked(true);
    if (!outcome) return;
    if (await record('last-walk', { outcome, places, elementIds: null })) {
      setOutcome('');
      setAsked(false);
    }
  };
  return (
    <Screen
      title="Last walk"
      aside={pour.number}
      back={{ href: fieldPaths.pour(sheet.pourId), words: pour.number }}
      form
    >
      <div className="grid gap-4">
        {sheet.lastWalk ? (
          <Notice tone="met" title="Walked">
            <p>
              {sheet.lastWalk.body.places}. {nameOf(open, sheet.lastWalk.authorId)},{' '}
              {dayAndTime(sheet.lastWalk.recordedAt, project.timeZone)}. A correction or an event on site
              after it asks for another.
            </p>
          </Notice>
        ) : (
          <p className="px-1 text-pencil">
            Not done, or something was corrected or happened since. Walk it right before the release.
          </p>
        )}
        {routes.length > 0 && (
          <section className="border border-ink bg-sheet p-3">
            <h2 className="font-label font-semibold">Chosen places to pass</h2>
            <ul className="list-inside list-disc text-label">
              {[...new Set(routes)].map((route) => (
                <li key={route}>{route}</li>
              ))}
            </ul>
          </section>
        )}
        {mayRecord('last-walk', project.role) && (
          <form
            noValidate
            className="grid gap-4 border border-ink bg-sheet p-3"
            onSubmit={(event) => {
              event.preventDefault();
              void keep();
            }}
          >
            <Textarea
              label="Where you walked"
              rows={2}
              value={places}
              error={problems.places}
              onChange={(event) => setPlaces(event.target.value)}
            />
            <ChoiceList
              legend="Bars, supports and cover as they were inspected?"
              value={outcome}
              onChoose={(value) => setOutcome(value === 'met' ? 'met' : 'not-met')}
              error={asked && !outcome ? 'Say which.' : null}
              choices={[
                { value: 'met', label: 'Met', detail: 'nothing has moved' },
                { value: 'not-met', label: 'Not met', detail: 'say where, and raise a nonconformance' },
              ]}
            />
            <FormProblem problems={problems} shown={['places']} />
            <Button type="submit" variant="primary" wide busy={busy} className="min-h-15">
              Keep the walk
            </Button>
          </form>
        )}
      </div>
    </Screen>
  );
}
