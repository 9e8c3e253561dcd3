'use client';

import { toNestErrors } from '@hookform/resolvers';
import { useRouter } from 'next/navigation';
import { useMemo, useState } from 'react';
import { useFieldArray, useForm, useWatch, type FieldPath, type Resolver } from 'react-hook-form';
import { v7 as uuid } from 'uuid';
import { Button } from '@/components/ui/button';
import { Checkbox } from '@/components/ui/checkbox';
import { FieldError } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { Select } from '@/components/ui/select';
import { TextInput } from '@/components/ui/text-input';
import { Textarea } from '@/components/ui/textarea';
import type { AcceptableEntry } from './acceptable-entries';
import { dispositionFromDraft, mayAccept, type DispositionDraft } from './disposition-draft';
import { postJson, type Posted } from './post-json';
import { ProblemNotice } from './problem-notice';
import { decisionMeaning, decisionWords, stageWords } from './state-words';

export interface DispositionFormProps {
  nonconformanceId: string;
  pourId: string;
  seenSeq: number;
  timeZone: string;
  licence: string;
  extent: string;
  acceptable: AcceptableEntry[];
  /** What has not been opened yet, in words; empty: it can be signed. */
  unopened: string[];
  /** A decision is in force already; another one takes its place. */
  replaces: boolean;
}

const decisions = Object.entries(decisionWords) as [keyof typeof decisionWords, string][];

/** The engineer's decision: what is to be done, why, how far it reaches, what it accepts, under which conditions. */
export function DispositionForm(props: DispositionFormProps) {
  const router = useRouter();
  const [failure, setFailure] = useState<Extract<Posted, { ok: false }> | null>(null);
  const resolver = useMemo<Resolver<DispositionDraft>>(
    () => (values, _context, options) => {
      const read = dispositionFromDraft(values, props.nonconformanceId, props.timeZone);
      if (read.ok) return { values, errors: {} };
      const flat: Record<string, { type: string; message: string }> = {};
      for (const problem of read.problems) flat[problem.path] ??= { type: 'body', message: problem.message };
      return { values: {}, errors: toNestErrors(flat, options) };
    },
    [props.nonconformanceId, props.timeZone],
  );
  const { control, register, handleSubmit, formState, setError, resetField } = useForm<DispositionDraft>({
    resolver,
    defaultValues: {
      decision: '',
      reason: '',
      extent: props.extent,
      accepts: [],
      conditions: [],
      licence: props.licence,
      password: '',
    },
  });
  const conditions = useFieldArray({ control, name: 'conditions', keyName: 'key' });
  const decision = useWatch({ control, name: 'decision' });
  const { errors } = formState;

  const sign = async (draft: DispositionDraft) => {
    setFailure(null);
    const read = dispositionFromDraft(draft, props.nonconformanceId, props.timeZone);
    if (!read.ok) return;
    const answer = await postJson(`/api/pours/${props.pourId}/dispositions`, {
      body: read.body,
      password: draft.password,
      seenSeq: props.seenSeq,
    });
    resetField('password');
    if (answer.ok) {
      router.refresh();
      return;
    }
    setFailure(answer);
    for (const problem of answer.fields) {
      const path = problem.path.replace(/^body\./, '') as FieldPath<DispositionDraft>;
      setError(path, { type: 'server', message: problem.message });
    }
  };

  return (
    <form onSubmit={(event) => void handleSubmit(sign)(event)} noValidate className="grid gap-4 print:hidden">
      {props.replaces && (
        <p className="text-pencil">A further decision takes the place of the one in force.</p>
      )}
      {failure && <ProblemNotice failure={failure} title="Nothing was signed" />}
      <fieldset aria-describedby={errors.decision && 'decision-error'} className="grid gap-1">
        <legend className="font-label text-label font-semibold">What is to be done</legend>
        {decisions.map(([value, word]) => (
          <Checkbox
            key={value}
            type="radio"
            value={value}
            label={word}
            hint={decisionMeaning[value]}
            {...register('decision')}
          />
        ))}
        <FieldError id="decision" error={errors.decision?.message} />
      </fieldset>
      <Textarea label="Reason" error={errors.reason?.message} {...register('reason')} />
      <Textarea label="How far it reaches" rows={2} error={errors.extent?.message} {...register('extent')} />
      {mayAccept(decision) && (
        <fieldset aria-describedby={errors.accepts && 'accepts-error'} className="grid gap-1">
          <legend className="font-label text-label font-semibold">What it accepts</legend>
          <p className="text-label text-pencil">
            Only what is ticked, and nothing worse. The verdicts themselves stay as they are.
          </p>
          {props.acceptable.map((entry) => (
            <Checkbox key={entry.id} label={entry.label} value={entry.id} {...register('accepts')} />
          ))}
          {props.acceptable.length === 0 && (
            <p className="text-pencil">Nothing stands as not met in this matter.</p>
          )}
          <FieldError id="accepts" error={errors.accepts?.message} />
        </fieldset>
      )}
      <fieldset className="grid gap-3">
        <legend className="font-label text-label font-semibold">Conditions</legend>
        {conditions.fields.map((field, index) => {
          const wrong = errors.conditions?.[index];
          return (
            <div key={field.key} className="grid gap-3 border-l-[3px] border-ink pl-3 sm:grid-cols-2">
              <TextInput
                label="What"
                error={wrong?.text?.message}
                fieldClassName="sm:col-span-2"
                {...register(`conditions.${index}.text`)}
              />
              <TextInput
                label="Met when"
                error={wrong?.criterion?.message}
                fieldClassName="sm:col-span-2"
                {...register(`conditions.${index}.criterion`)}
              />
              <Select
                label="Stage"
                error={wrong?.stage?.message}
                options={Object.entries(stageWords).map(([value, label]) => ({ value, label }))}
                {...register(`conditions.${index}.stage`)}
              />
              <TextInput
                label="Due"
                type="datetime-local"
                optional
                error={wrong?.dueAt?.message}
                {...register(`conditions.${index}.dueAt`)}
              />
              <div>
                <Button
                  variant="quiet"
                  aria-label={`Remove condition ${index + 1}`}
                  onClick={() => conditions.remove(index)}
                >
                  Remove
                </Button>
              </div>
            </div>
          );
        })}
        <div>
          <Button
            onClick={() =>
              conditions.append({ id: uuid(), text: '', criterion: '', stage: 'before-pour', dueAt: '' })
            }
          >
            Add a condition
          </Button>
        </div>
      </fieldset>
      <div className="grid gap-3 sm:grid-cols-2">
        <TextInput label="Licence number" error={errors.licence?.message} {...register('licence')} />
        <TextInput
          label="Your password"
          type="password"
          autoComplete="current-password"
          error={errors.password?.message}
          {...register('password')}
        />
      </div>
      {props.unopened.length > 0 && (
        <Notice tone="watch">
          <p>Before it can be signed, open above: {props.unopened.join(', ')}.</p>
        </Notice>
      )}
      <div>
        <Button
          type="submit"
          variant="primary"
          busy={formState.isSubmitting}
          disabled={props.unopened.length > 0}
        >
          Sign the decision
        </Button>
      </div>
    </form>
  );
}
