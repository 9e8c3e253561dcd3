'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { useForm, type FieldErrors, type Resolver } from 'react-hook-form';
import { Button } from '@/components/ui/button';
import { Checkbox } from '@/components/ui/checkbox';
import { FieldError } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { Select } from '@/components/ui/select';
import { TextInput } from '@/components/ui/text-input';
import { Textarea } from '@/components/ui/textarea';
import { bodies } from '@/lib/inspection/entry-bodies';
import type { ActionField, ActionValues, EntryAction } from './entry-action';
import { ProblemNotice } from './problem-notice';
import type { Posted } from './post-json';

const startOf = (action: EntryAction): ActionValues =>
  Object.fromEntries(
    action.fields.map((field) => [
      field.name,
      action.start?.[field.name] ?? (field.kind === 'many' ? [] : ''),
    ]),
  );

/** The field that a path of the body belongs to: named by the action, by its own name, or by the first part of it. */
function fieldFor(action: EntryAction, path: string): string | null {
  const parts = path.split('.');
  for (let length = parts.length; length > 0; length -= 1) {
    const part = parts.slice(0, length).join('.');
    const name = action.fieldOf?.[part] ?? part;
    if (action.fields.some((field) => field.name === name)) return name;
  }
  return null;
}

const resolverFor =
  (action: EntryAction): Resolver<ActionValues> =>
  (values) => {
    const parsed = bodies[action.type].safeParse(action.toBody(values));
    if (parsed.success) return { values, errors: {} };
    const errors: FieldErrors<ActionValues> = {};
    for (const issue of parsed.error.issues) {
      const name = fieldFor(action, issue.path.join('.')) ?? 'root';
      const field = action.fields.find((one) => one.name === name);
      const message =
        field?.kind === 'select'
          ? 'Choose one.'
          : field?.kind === 'many'
            ? 'Tick at least one.'
            : field?.kind === 'time'
              ? "Write a day and a time that exist in the project's time zone."
              : issue.message.startsWith('Invalid input')
                ? 'Write a number.'
                : issue.message;
      errors[name] ??= { type: 'schema', message };
    }
    return { values: {}, errors };
  };

/** A small form that records one entry, judged by the entry's own schema before it goes and on arrival. */
export function EntryForm({
  send,
  action,
  onDone,
}: {
  send: (type: EntryAction['type'], body: unknown) => Promise<Posted>;
  action: EntryAction;
  onDone: () => void;
}) {
  const router = useRouter();
  const [failure, setFailure] = useState<Extract<Posted, { ok: false }> | null>(null);
  const { register, handleSubmit, formState, setError } = useForm<ActionValues>({
    resolver: resolverFor(action),
    defaultValues: startOf(action),
  });
  const errorOf = (name: string): string | undefined => {
    const found = formState.errors[name];
    return typeof found?.message === 'string' ? found.message : undefined;
  };

  const submit = handleSubmit(async (values) => {
    setFailure(null);
    const answer = await send(action.type, action.toBody(values));
    if (answer.ok) {
      onDone();
      router.refresh();
      return;
    }
    setFailure(answer);
    for (const problem of answer.fields) {
      const name = fieldFor(action, problem.path.replace(/^body\./, ''));
      if (name) setError(name, { type: 'server', message: problem.message });
    }
  });

  return (
    <form onSubmit={(event) => void submit(event)} noValidate className="grid gap-4">
      {action.says && <p className="text-body text-pencil">{action.says}</p>}
      {failure && <ProblemNotice failure={failure} />}
      {errorOf('root') && (
        <Notice tone="hold" title="Not recorded">
          <p>{errorOf('root')}</p>
        </Notice>
      )}
      {action.fields.map((field) => (
        <ActionControl
          key={field.name}
          field={field}
          error={errorOf(field.name)}
          register={register(field.name)}
        />
      ))}
      <div>
        <Button type="submit" variant="primary" busy={formState.isSubmitting}>
          {action.submit}
        </Button>
      </div>
    </form>
  );
}

function ActionControl({
  field,
  error,
  register,
}: {
  field: ActionField;
  error: string | undefined;
  register: ReturnType<ReturnType<typeof useForm<ActionValues>>['register']>;
}) {
  switch (field.kind) {
    case 'long':
      return (
        <Textarea
          label={field.label}
          hint={field.hint}
          optional={field.optional}
          error={error}
          {...register}
        />
      );
    case 'select':
      return (
        <Select
          label={field.label}
          hint={field.hint}
          options={field.options}
          placeholder={field.placeholder}
          error={error}
          {...register}
        />
      );
    case 'many':
      return (
        <fieldset className="grid gap-1">
          <legend className="font-label text-label font-semibold">{field.label}</legend>
          {field.hint && <p className="text-label text-pencil">{field.hint}</p>}
          <div className="grid max-h-72 overflow-auto border border-rule px-pad">
            {field.options.map((option) => (
              <Checkbox key={option.value} label={option.label} value={option.value} {...register} />
            ))}
          </div>
          <FieldError id={field.name} error={error} />
        </fieldset>
      );
    default:
      return (
        <TextInput
          label={field.label}
          hint={field.hint}
          optional={field.optional}
          error={error}
          type={field.kind === 'time' ? 'datetime-local' : field.kind === 'password' ? 'password' : 'text'}
          autoComplete={field.kind === 'password' ? 'current-password' : 'off'}
          {...register}
        />
      );
  }
}
