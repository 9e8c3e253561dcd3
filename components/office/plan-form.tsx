'use client';

import { toNestErrors } from '@hookform/resolvers';
import { useRouter } from 'next/navigation';
import { useEffect, useMemo, useRef, useState, useSyncExternalStore } from 'react';
import { FormProvider, useFieldArray, useForm, type FieldPath, type Resolver } from 'react-hook-form';
import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { SheetFrame } from '@/components/ui/sheet-frame';
import { Spinner } from '@/components/ui/spinner';
import { ConcreteError } from '@/lib/concrete/concrete-error';
import type { FieldProblem } from '@/lib/inspection/app-error';
import { issuePlan } from '@/lib/inspection/issue-plan';
import { ChecklistFields } from './checklist-fields';
import { ElementFields } from './element-fields';
import { EXAMPLE_POUR } from './face-preview-plan';
import { issueProblem } from './issue-problem';
import { MeasurementsFields } from './measurements-fields';
import { forgetDraft, keepDraft, readKeptDraft } from './kept-draft';
import { emptyElement, type PlanDraft } from './plan-draft';
import { draftPath, pourFromDraft } from './plan-from-draft';
import { PourFields } from './pour-fields';
import { postJson, textOf, type Posted } from './post-json';
import { ProblemNotice } from './problem-notice';
import { RulesFields } from './rules-fields';

export interface PlanFormProps {
  /** What the form starts with: empty, copied from an earlier pour, or the plan in force. */
  start: PlanDraft;
  projectId: string;
  timeZone: string;
  personId: string;
  /** Null: a new pour. Otherwise the pour whose plan is revised, from which revision, and the next one's letter. */
  revises: { pourId: string; basedOn: number; letter: string } | null;
  /** Told above the form: what it was copied from. */
  copiedFrom: string | null;
}

/** The draft's problems: text that is no length, what the schema refuses, what cannot be computed. */
function problemsOf(draft: PlanDraft, projectId: string, timeZone: string): FieldProblem[] {
  const read = pourFromDraft(draft, projectId, timeZone);
  if (!read.ok) return read.problems;
  try {
    issuePlan(read.input.plan, {
      pourId: EXAMPLE_POUR,
      revision: 1,
      issuedAt: '2000-01-01T00:00:00.000Z',
      authorId: EXAMPLE_POUR,
      reason: 'check',
    });
    return [];
  } catch (error) {
    if (error instanceof ConcreteError) return [issueProblem(error, draft)];
    throw error;
  }
}

const resolverFor =
  (projectId: string, timeZone: string): Resolver<PlanDraft> =>
  (values, _context, options) => {
    const problems = problemsOf(values, projectId, timeZone);
    if (problems.length === 0) return { values, errors: {} };
    const flat: Record<string, { type: string; message: string }> = {};
    for (const problem of problems)
      flat[problem.path || 'root'] ??= { type: 'plan', message: problem.message };
    return { values: {}, errors: toNestErrors(flat, options) };
  };

const never = () => () => undefined;

/** The plan of a pour as a form: issues a new pour's first plan, or a revision of the one in force. */
export function PlanForm(props: PlanFormProps) {
  // What this browser kept of the form is known in the browser only; the form opens with it.
  const inBrowser = useSyncExternalStore(
    never,
    () => true,
    () => false,
  );
  return inBrowser ? <OpenPlanForm {...props} /> : <Spinner label="Opening the form" />;
}

function OpenPlanForm({ start, projectId, timeZone, personId, revises, copiedFrom }: PlanFormProps) {
  const router = useRouter();
  const draftName = `${personId}.${revises?.pourId ?? projectId}.${revises?.letter ?? 'new'}`;
  const [kept] = useState(() => readKeptDraft(draftName));
  const [restored, setRestored] = useState(kept !== null);
  const [failure, setFailure] = useState<Extract<Posted, { ok: false }> | null>(null);
  const sent = useRef(false);
  const resolver = useMemo(() => resolverFor(projectId, timeZone), [projectId, timeZone]);
  const form = useForm<PlanDraft>({
    defaultValues: kept ? { ...start, ...kept.draft } : start,
    resolver,
    // Not on blur: a message that comes or goes while the button is being pressed would move the button away.
    mode: 'onSubmit',
  });
  const elements = useFieldArray({ control: form.control, name: 'elements', keyName: 'key' });

  useEffect(() => {
    let timer: ReturnType<typeof setTimeout> | undefined;
    const stop = form.subscribe({
      formState: { values: true },
      callback: ({ values }) => {
        clearTimeout(timer);
        timer = setTimeout(() => {
          if (!sent.current) keepDraft(draftName, values, new Date().toISOString());
        }, 300);
      },
    });
    return () => {
      clearTimeout(timer);
      stop();
    };
  }, [draftName, form]);

  const startAfresh = () => {
    forgetDraft(draftName);
    form.reset(start);
    setRestored(false);
  };

  const send = async (draft: PlanDraft) => {
    setFailure(null);
    const read = pourFromDraft(draft, projectId, timeZone);
    if (!read.ok) return;
    const answer = revises
      ? await postJson(`/api/pours/${revises.pourId}/plan`, {
          reason: read.input.reason,
          basedOn: revises.basedOn,
          plan: read.input.plan,
        })
      : await postJson('/api/pours', read.input);
    if (!answer.ok) {
      setFailure(answer);
      for (const problem of answer.fields) {
        const place = issueProblem(
          { field: problem.path.replace(/^plan\./, ''), reason: problem.message },
          draft,
        );
        form.setError(draftPath(place.path) as FieldPath<PlanDraft>, {
          type: 'server',
          message: problem.message,
        });
      }
      window.scrollTo({ top: 0 });
      return;
    }
    sent.current = true;
    forgetDraft(draftName);
    router.push(`/pours/${revises?.pourId ?? textOf(answer.data, 'pourId') ?? ''}`);
    router.refresh();
  };

  const { errors, isSubmitting, submitCount } = form.formState;
  const wrong = submitCount > 0 && Object.keys(errors).length > 0;
  return (
    <FormProvider {...form}>
      <form
        onSubmit={(event) => void form.handleSubmit(send)(event)}
        noValidate
        className="grid gap-6 *:min-w-0"
      >
        {restored && (
          <Notice
            tone="info"
            title="What you typed is here again"
            actions={<Button onClick={startAfresh}>Start afresh</Button>}
          >
            <p>This form was left before it was sent. It is kept in this browser until the plan is issued.</p>
          </Notice>
        )}
        {copiedFrom && !restored && (
          <Notice tone="info">
            <p>Copied from {copiedFrom}. Look at every number: drawings and exposures may differ.</p>
          </Notice>
        )}
        {failure && <ProblemNotice failure={failure} title="The plan was not issued" />}
        <SheetFrame heading={revises ? 'Why it is revised' : 'The pour'}>
          <PourFields revises={revises !== null} timeZone={timeZone} />
        </SheetFrame>
        <SheetFrame heading="Rules and mix">
          <RulesFields />
        </SheetFrame>
        {elements.fields.map((field, index) => (
          <SheetFrame key={field.key} heading={`Element ${index + 1}`}>
            <ElementFields
              elementIndex={index}
              pourId={revises?.pourId ?? null}
              onRemove={elements.fields.length > 1 ? () => elements.remove(index) : null}
            />
          </SheetFrame>
        ))}
        <div>
          <Button onClick={() => elements.append(emptyElement())}>Add an element</Button>
        </div>
        <SheetFrame heading="Measurements">
          <MeasurementsFields />
        </SheetFrame>
        <SheetFrame heading="Checks">
          <ChecklistFields />
        </SheetFrame>
        <div className="flex flex-wrap items-center gap-4">
          <Button type="submit" variant="primary" busy={isSubmitting}>
            {revises ? `Issue plan rev ${revises.letter}` : 'Create the pour and issue its plan'}
          </Button>
          <p className="max-w-prose text-label text-pencil">
            Issuing freezes the numbers: requirements, their trails and the reading points. A change is a
            revision. The contract documents and the local code govern.
          </p>
        </div>
        {/* Below the button: a notice that goes away above it would move it from under the pointer. */}
        {wrong && !failure && (
          <Notice tone="hold" title="The plan cannot be issued yet">
            <p>The fields concerned say what is wrong. Nothing you typed is lost.</p>
          </Notice>
        )}
      </form>
    </FormProvider>
  );
}
