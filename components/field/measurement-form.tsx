'use client';

import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { buttonClasses } from '@/components/ui/button-classes';
import { MarkIcon } from '@/components/drawings/mark';
import { TextInput } from '@/components/ui/text-input';
import { mayRecord } from '@/lib/inspection/entry-access';
import type { BodyOf } from '@/lib/inspection/entry';
import type { MeasurementState } from '@/lib/inspection/sheet-types';
import { ChoiceList } from './choice-list';
import { FieldLink } from './field-router';
import { fieldPaths } from './field-routes';
import { FormProblem } from './form-problem';
import { measuredValue, type Measure } from './measure-draft';
import { measureOfValue, nextMeasure } from './measure-of-value';
import { MeasureInput } from './measure-input';
import type { OpenSheet } from './open-sheet';
import { signalVerdict } from './signal-verdict';
import { useDevice } from './use-device';
import { useRecord } from './use-record';
import { useRefusedAgain } from './use-refused-again';

type Stage = BodyOf<'measurement'>['stage'];
export const stageWords: Record<Stage, string> = {
  single: 'as it is',
  before: 'before load',
  under: "under a person's weight",
  after: 'after load',
};
const loadedStages = ['before', 'under', 'after'] as const;

/** The next place in a row of numbered places: "place 3". */
const nextPlace = (state: MeasurementState) =>
  `place ${new Set(state.places.map((place) => place.entry.body.place.trim().toLowerCase())).size + 1}`;

/** Measures one place of an item, and says the verdict at once. */
export function MeasurementForm({
  open,
  state,
  limits,
}: {
  open: OpenSheet;
  state: MeasurementState;
  /** What has to be met, in words. */
  limits: string;
}) {
  const { item } = state;
  const { units } = open.sheet.plan;
  const device = useDevice();
  const again = useRefusedAgain('measurement', (body) => body.itemId === item.id);
  const [place, setPlace] = useState(() => again?.body.place ?? nextPlace(state));
  const [stage, setStage] = useState<Stage>(again?.body.stage ?? (item.loaded ? 'before' : 'single'));
  const [measure, setMeasure] = useState<Measure>(() =>
    again
      ? measureOfValue(again.body.value, units)
      : nextMeasure(item, state.places.at(-1)?.current?.value ?? null, units),
  );
  const [problem, setProblem] = useState<string | null>(null);
  const [keptId, setKeptId] = useState<string | null>(null);
  const { busy, problems, record } = useRecord(open, again);
  const kept = state.places.find((one) => one.entry.id === keptId);
  const about = { kind: 'measurement', id: item.id } as const;

  const keep = async () => {
    const value = measuredValue(measure, units);
    setProblem(value.ok ? null : value.problem);
    if (!value.ok) return;
    const entry = await record('measurement', {
      itemId: item.id,
      place,
      stage,
      value: value.value,
      measuredAt: new Date().toISOString(),
    });
    if (!entry) return;
    setKeptId(entry.id);
    setMeasure(nextMeasure(item, value.value, units));
    const now = device.pour(open.sheet.pourId)?.sheet?.measurements.find((one) => one.item.id === item.id);
    const judged = now?.places.find((one) => one.entry.id === entry.id);
    if (judged) signalVerdict(judged.verdict, false);
    const following = loadedStages[loadedStages.indexOf(stage as (typeof loadedStages)[number]) + 1];
    if (item.loaded && following) setStage(following);
    else {
      if (now) setPlace(nextPlace(now));
      setStage(item.loaded ? 'before' : 'single');
    }
  };

  return (
    <form
      noValidate
      className="grid gap-4 border border-ink bg-sheet p-3"
      onSubmit={(event) => {
        event.preventDefault();
        void keep();
      }}
    >
      <p className="font-label text-lead font-semibold">{limits}</p>
      <TextInput
        label="Place"
        hint="Grid, bay or bar, so that it is found again."
        maxLength={120}
        value={place}
        error={problems.place}
        onChange={(event) => setPlace(event.target.value)}
      />
      {item.loaded && (
        <ChoiceList
          legend="A person stands on it"
          value={stage}
          onChoose={(value) => setStage(loadedStages.find((one) => one === value) ?? 'before')}
          choices={loadedStages.map((one) => ({ value: one, label: stageWords[one] }))}
        />
      )}
      <MeasureInput item={item} measure={measure} unit={units} onChange={setMeasure} />
      {problem && (
        <p role="alert" className="font-label font-semibold text-hold">
          {problem}
        </p>
      )}
      <FormProblem problems={problems} shown={['place']} />
      <Button type="submit" variant="primary" wide busy={busy} className="min-h-15">
        Keep
      </Button>
      {kept && (
        <div role="status" className="grid gap-1 border-t border-rule pt-2">
          <p className="flex items-center gap-2 font-label font-semibold">
            <MarkIcon
              kind={
                kept.verdict === 'met' ? 'met' : kept.verdict === 'not-met' ? 'not-met-low' : 'not-verified'
              }
            />
            {kept.verdict === 'met' ? 'met' : kept.verdict === 'not-met' ? 'not met' : 'not verified'}
          </p>
          <p className="text-label">{kept.reason}</p>
          {kept.verdict === 'not-met' && (
            <div className="flex flex-wrap gap-2">
              <FieldLink
                href={fieldPaths.photos(open.sheet.pourId, about)}
                className={buttonClasses('secondary')}
              >
                Photo
              </FieldLink>
              {mayRecord('nonconformance', open.project.role) && (
                <FieldLink
                  href={fieldPaths.nonconformance(open.sheet.pourId, about)}
                  className={buttonClasses('secondary')}
                >
                  Nonconformance
                </FieldLink>
              )}
            </div>
          )}
        </div>
      )}
    </form>
  );
}
